import { useQuery } from '@tanstack/react-query';
import { useMemo, useState, useSyncExternalStore } from 'react';
import type { ChangeRowRequest, RowResult, SheetCharacteristic } from '@trammel/shared/measurements';
import { Beam } from '../../../components/charts/beam.tsx';
import { Button } from '../../../components/ui/button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { VerdictMark } from '../../../components/ui/verdict-mark.tsx';
import { ApiProblem, reasonOf } from '../../../lib/api-problem.ts';
import { showComputed } from '../../../lib/format.ts';
import { changeRow, gaugeChoicesQuery } from '../api.ts';
import type { SheetModel } from '../sheet-model.ts';
import { limitsInWords } from './grid-row.tsx';

interface RowPanelProps {
  submissionId: string;
  model: SheetModel;
  facts: SheetCharacteristic;
  streamId: string;
  editable: boolean;
}

/** Everything about one characteristic in one stream: beam with natural spread, figures, gauge, date, counts and note. */
export function RowPanel({ submissionId, model, facts, streamId, editable }: RowPanelProps) {
  useSyncExternalStore(model.subscribe, () => model.rowVersion(facts.id));
  const stream = model.streams.find((candidate) => candidate.id === streamId);
  const row = model.row(facts.id, streamId);
  return (
    <section
      aria-label={`Balloon ${facts.balloon}, ${stream?.name ?? ''}`}
      className="flex flex-col gap-3 border border-rule bg-sheet p-3"
    >
      <header className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h2 className="font-semibold">
          <span className="figures">{facts.balloon}</span> {facts.description}
        </h2>
        <span className="caption">{stream?.name}</span>
        <span className="figures text-pencil">{limitsInWords(facts)}</span>
        <VerdictMark verdict={row?.verdict ?? 'not-measured'} />
      </header>
      {row && row.n > 0 && <StreamBeam facts={facts} row={row} model={model} />}
      <RowForm
        key={`${facts.id} ${streamId} ${row?.version ?? 0}`}
        submissionId={submissionId}
        model={model}
        facts={facts}
        streamId={streamId}
        row={row}
        editable={editable}
      />
    </section>
  );
}

function StreamBeam({
  facts,
  row,
  model,
}: {
  facts: SheetCharacteristic;
  row: RowResult;
  model: SheetModel;
}) {
  const data = useMemo(() => {
    const number = (text: string | null) => (text === null ? null : Number(text));
    const verdicts = { i: 'in-tolerance', o: 'out-of-tolerance', u: 'undecided', x: 'no-verdict' } as const;
    const pieces = model.columns.filter((column) => column.streamId === row.streamId);
    const points = row.readings.flatMap((text, place) => {
      const verdict = verdicts[row.marks.charAt(place) as keyof typeof verdicts];
      const value = text === null ? NaN : Number.parseFloat(text);
      return Number.isFinite(value) && verdict
        ? [{ value, verdict, label: pieces[place]?.piece.label ?? '' }]
        : [];
    });
    const { mean, standardDeviation: s } = row;
    return {
      limits: {
        lower: number(facts.lowerLimit),
        upper: number(facts.upperLimit),
        naturalLower: facts.naturalLower,
      },
      nominal: number(facts.nominal),
      points,
      ...(mean !== null && s !== null && s > 0
        ? { spread: { lower: mean - 3 * s, upper: mean + 3 * s } }
        : {}),
      ...(points.length === 0 && row.n > 0 ? { attribute: { checked: row.n, failed: row.outCount } } : {}),
    };
  }, [facts, row, model]);
  const figures: [string, string][] = [
    ['n', String(row.n)],
    ['lowest', row.minimum ?? '–'],
    ['highest', row.maximum ?? '–'],
    ['mean', row.mean === null ? '–' : showComputed(row.mean, facts.decimals + 1)],
    ['s', row.standardDeviation === null ? '–' : showComputed(row.standardDeviation, facts.decimals + 2)],
  ];
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
      <Beam
        name={`Balloon ${facts.balloon}`}
        className="w-72"
        unit={facts.unit}
        decimals={facts.decimals}
        {...data}
      />
      <dl className="flex flex-wrap gap-x-4 gap-y-1">
        {figures.map(([caption, value]) => (
          <div key={caption} className="flex flex-col">
            <dt className="caption">{caption}</dt>
            <dd className="figures">{value}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}

interface RowFormProps extends RowPanelProps {
  row: RowResult | undefined;
}

function RowForm({ submissionId, model, facts, streamId, row, editable }: RowFormProps) {
  const gauges = useQuery({ ...gaugeChoicesQuery, enabled: editable });
  const [gaugeId, setGauge] = useState(row?.gaugeId ?? '');
  const [measuredOn, setDate] = useState(row?.measuredOn ?? '');
  const [note, setNote] = useState(row?.note ?? '');
  const [checked, setChecked] = useState(row?.attribute ? String(row.attribute.checked) : '');
  const [failed, setFailed] = useState(row?.attribute ? String(row.attribute.failed) : '');
  const [failure, setFailure] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const counted = facts.attributeAllowed || facts.kind === 'attribute' || facts.kind === 'note';
  if (!editable) return row?.note ? <p className="whitespace-pre-line">{row.note}</p> : null;
  const dirty =
    gaugeId !== (row?.gaugeId ?? '') ||
    measuredOn !== (row?.measuredOn ?? '') ||
    note !== (row?.note ?? '') ||
    checked !== (row?.attribute ? String(row.attribute.checked) : '') ||
    failed !== (row?.attribute ? String(row.attribute.failed) : '');
  const save = async () => {
    setBusy(true);
    setFailure(null);
    const body: ChangeRowRequest = {
      gaugeId: gaugeId === '' ? null : gaugeId,
      measuredOn: measuredOn === '' ? null : measuredOn,
      note,
      attribute:
        counted && checked !== ''
          ? { checked: Number(checked), failed: failed === '' ? 0 : Number(failed) }
          : null,
    };
    try {
      model.applyRows([
        await changeRow(submissionId, { characteristicId: facts.id, streamId }, row?.version ?? 0, body),
      ]);
    } catch (error) {
      setFailure(error);
    } finally {
      setBusy(false);
    }
  };
  const errorAt = (name: string) =>
    failure instanceof ApiProblem
      ? failure.problem.errors?.find((error) => error.pointer.startsWith(`/${name}`))?.detail
      : undefined;
  const options = [
    { value: '', label: 'No gauge named' },
    ...(gauges.data?.items ?? []).map((gauge) => ({
      value: gauge.id,
      label: `${gauge.code}, ${gauge.kind}${gauge.dueOn ? `, due ${gauge.dueOn}` : ''}`,
    })),
  ];
  return (
    <form
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        void save();
      }}
    >
      {failure !== null && !errorAt('gaugeId') && !errorAt('attribute') && (
        <Notice tone="failure" title="Not saved">
          {reasonOf(failure)}
        </Notice>
      )}
      <div className="grid gap-3 sm:grid-cols-2 xl:grid-cols-4">
        <SelectField
          id="row-gauge"
          label="Gauge"
          value={gaugeId}
          onChange={setGauge}
          options={options}
          error={errorAt('gaugeId')}
        />
        <DateField id="row-measured-on" label="Measured on" value={measuredOn} onChange={setDate} />
        {counted && (
          <>
            <TextField
              id="row-checked"
              label="Pieces checked"
              inputMode="numeric"
              mono
              value={checked}
              onChange={setChecked}
              error={errorAt('attribute')}
              hint="In place of pass or fail piece by piece"
            />
            <TextField
              id="row-failed"
              label="Pieces failed"
              inputMode="numeric"
              mono
              value={failed}
              onChange={setFailed}
            />
          </>
        )}
      </div>
      <TextArea
        id="row-note"
        label="Note for the reviewer"
        optional
        value={note}
        onChange={setNote}
        rows={2}
      />
      <div>
        <Button type="submit" size="small" busy={busy} disabled={!dirty}>
          Save row
        </Button>
      </div>
    </form>
  );
}
