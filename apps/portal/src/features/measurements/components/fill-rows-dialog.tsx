import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { DateField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { countOf } from '../../../lib/format.ts';
import { fillRows, gaugeChoicesQuery } from '../api.ts';
import type { SheetModel } from '../sheet-model.ts';

interface FillRowsDialogProps {
  submissionId: string;
  model: SheetModel;
  /** Characteristics now in view, by filter and search. */
  shownIds: readonly string[];
  open: boolean;
  onClose: () => void;
}

/** Gauge and date for many rows in one go: most packages are measured on few gauges in few days. */
export function FillRowsDialog({ submissionId, model, shownIds, open, onClose }: FillRowsDialogProps) {
  const gauges = useQuery({ ...gaugeChoicesQuery, enabled: open });
  const [gaugeId, setGauge] = useState('');
  const [measuredOn, setDate] = useState('');
  const [which, setWhich] = useState('without');
  const [failure, setFailure] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const rows = shownIds.flatMap((characteristicId) =>
    model.streams
      .filter((stream) => {
        const row = model.row(characteristicId, stream.id);
        if (which === 'all') return true;
        return (gaugeId !== '' && row?.gaugeId == null) || (measuredOn !== '' && row?.measuredOn == null);
      })
      .map((stream) => ({ characteristicId, streamId: stream.id })),
  );
  const fill = async () => {
    setBusy(true);
    setFailure(null);
    try {
      const answer = await fillRows(submissionId, {
        rows,
        ...(gaugeId === '' ? {} : { gaugeId }),
        ...(measuredOn === '' ? {} : { measuredOn }),
      });
      model.applyRows(answer.rows);
      showToast({ text: `${countOf(answer.rows.length, 'row', 'rows')} filled` });
      onClose();
    } catch (error) {
      setFailure(error);
    } finally {
      setBusy(false);
    }
  };
  return (
    <Dialog
      open={open}
      onClose={onClose}
      title="Gauge and date for many rows"
      footer={
        <>
          <Button weight="plain" onClick={onClose}>
            Cancel
          </Button>
          <Button
            weight="primary"
            busy={busy}
            disabled={rows.length === 0 || (gaugeId === '' && measuredOn === '')}
            onClick={() => void fill()}
          >
            Fill {countOf(rows.length, 'row', 'rows')}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-4">
        {failure !== null && (
          <Notice tone="failure" title="Not filled">
            {reasonOf(failure)}
          </Notice>
        )}
        <p className="text-pencil">The rows are those in view now; search first to fill only some.</p>
        <SelectField
          id="fill-gauge"
          label="Gauge"
          value={gaugeId}
          onChange={setGauge}
          options={[
            { value: '', label: 'Leave as it is' },
            ...(gauges.data?.items ?? []).map((gauge) => ({
              value: gauge.id,
              label: `${gauge.code}, ${gauge.kind}`,
            })),
          ]}
        />
        <DateField id="fill-date" label="Measured on" optional value={measuredOn} onChange={setDate} />
        <RadioGroup
          id="fill-which"
          name="fill-which"
          label="Which rows"
          value={which}
          onChange={setWhich}
          options={[
            { value: 'without', label: 'Only rows where it is missing' },
            { value: 'all', label: 'All rows in view, replacing what is there' },
          ]}
        />
      </div>
    </Dialog>
  );
}
