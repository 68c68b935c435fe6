import { useQueryClient } from '@tanstack/react-query';
import { unitSymbols } from '@trammel/shared/characteristics';
import { gaugeRequest, gaugeResponse, type GaugeResponse } from '@trammel/shared/gauges';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { NumberTextField } from '../../../components/ui/number-text-field.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { ApiProblem } from '../../../lib/api-problem.ts';
import { useForm } from '../../../lib/use-form.ts';
import { addGauge, changeGauge } from '../api.ts';

const empty = {
  code: '',
  kind: '',
  resolution: '',
  unit: 'mm' as GaugeResponse['unit'],
  calibratedOn: '',
  dueOn: '',
  certificate: '',
};
type Values = typeof empty;

const valuesOf = (gauge: GaugeResponse): Values => ({
  code: gauge.code,
  kind: gauge.kind,
  resolution: gauge.resolution ?? '',
  unit: gauge.unit,
  calibratedOn: gauge.calibratedOn ?? '',
  dueOn: gauge.dueOn ?? '',
  certificate: gauge.certificate,
});

/** Empty entries mean that nothing is known. */
const schema = {
  safeParse: (value: unknown) => {
    const typed = value as Values;
    return gaugeRequest.safeParse({
      ...typed,
      resolution: typed.resolution === '' ? null : typed.resolution,
      calibratedOn: typed.calibratedOn === '' ? null : typed.calibratedOn,
      dueOn: typed.dueOn === '' ? null : typed.dueOn,
    });
  },
};

export function GaugeDialog({ gauge, onClose }: { gauge: GaugeResponse | null; onClose: () => void }) {
  const client = useQueryClient();
  const [base, setBase] = useState(gauge);
  const [newer, setNewer] = useState<GaugeResponse | null>(null);
  const form = useForm({
    initial: gauge ? valuesOf(gauge) : empty,
    schema,
    onSubmit: async (_values, body) => {
      try {
        await (base ? changeGauge(base, body) : addGauge(body));
      } catch (error) {
        if (error instanceof ApiProblem && error.is('stale-version')) {
          const current = gaugeResponse.safeParse(error.problem.current);
          if (current.success) setNewer(current.data);
        }
        throw error;
      }
      await client.invalidateQueries({ queryKey: ['gauges'] });
      showToast({ text: `Gauge ${body.code} saved` });
      onClose();
    },
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={gauge ? `Gauge ${gauge.code}` : 'Add a gauge'}
      footer={
        <>
          <Button weight="primary" busy={form.busy} busyLabel="Saving…" onClick={() => void form.submit()}>
            {gauge ? 'Save' : 'Add the gauge'}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-3" onSubmit={(event) => void form.submit(event)}>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        {newer && (
          <Notice
            tone="attention"
            title="A colleague changed this gauge"
            actions={
              <>
                <Button
                  onClick={() => {
                    setBase(newer);
                    setNewer(null);
                  }}
                >
                  Keep mine, save over it
                </Button>
                <Button
                  onClick={() => {
                    setBase(newer);
                    form.setAll(valuesOf(newer));
                    setNewer(null);
                  }}
                >
                  Take theirs
                </Button>
              </>
            }
          >
            Now: {newer.code}, {newer.kind}, due {newer.dueOn ?? 'without a date'},{' '}
            {newer.certificate || 'no certificate'}.
          </Notice>
        )}
        <TextField
          {...form.field('code')}
          label="Gauge code"
          hint="As it stands on the gauge."
          mono
          maxLength={60}
        />
        <TextField
          {...form.field('kind')}
          label="Kind"
          hint="Such as micrometer 0-25 or go/no-go plug."
          maxLength={200}
        />
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberTextField {...form.field('resolution')} label="Resolution" optional />
          <SelectField
            {...form.field('unit')}
            label="Unit"
            options={unitSymbols.map((value) => ({ value, label: value === '1' ? 'none' : value }))}
          />
          <DateField {...form.field('calibratedOn')} label="Calibrated on" optional />
          <DateField {...form.field('dueOn')} label="Calibration due" optional />
        </div>
        <TextField {...form.field('certificate')} label="Certificate" optional maxLength={200} />
        <button type="submit" hidden aria-hidden="true" tabIndex={-1} />
      </form>
    </Dialog>
  );
}
