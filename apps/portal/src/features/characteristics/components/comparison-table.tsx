import { useSuspenseQuery } from '@tanstack/react-query';
import type { CharacteristicResponse, ComparisonResponse } from '@trammel/shared/characteristics';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { showDecimal } from '../../../lib/format.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { comparisonQuery } from '../api.ts';

type Row = ComparisonResponse['rows'][number];

const changeWords: Record<Row['change'], string> = {
  added: 'added',
  removed: 'removed',
  changed: 'changed',
  'text-only': 'wording only',
  same: 'same',
};
const signs: Record<Row['change'], string> = {
  added: '+',
  removed: '−',
  changed: '≠',
  'text-only': '≈',
  same: '=',
};

const fieldWords: Record<string, string> = {
  attributeAllowed: 'pass or fail allowed',
  controlledBy: 'controlled by',
  geometric: 'geometric tolerance',
};

/** As a drawing writes it: a basic dimension in a frame, any other without limits in brackets. */
const unlimited = (kind: CharacteristicResponse['kind'], nominal: string): string =>
  kind === 'basic' ? `[${nominal}]` : `(${nominal})`;

function limitsOf(row: CharacteristicResponse | null): string {
  if (!row) return '–';
  const lower = row.lowerLimit === null || row.naturalLower ? null : showDecimal(row.lowerLimit);
  const upper = row.upperLimit === null ? null : showDecimal(row.upperLimit);
  const band =
    lower !== null && upper !== null
      ? `${lower} … ${upper}`
      : upper !== null
        ? `≤ ${upper}`
        : lower !== null
          ? `≥ ${lower}`
          : row.nominal === null
            ? 'no limits'
            : unlimited(row.kind, showDecimal(row.nominal));
  return `${band} ${row.unit === '1' ? '' : row.unit}`.trim();
}

const columns: DataColumn<Row>[] = [
  { id: 'balloon', header: 'Balloon', cell: (row) => <span className="figures">{row.balloon}</span> },
  {
    id: 'change',
    header: 'Change',
    cell: (row) => (
      <span
        className={row.change === 'same' ? 'text-pencil' : row.change === 'text-only' ? '' : 'font-semibold'}
      >
        <span aria-hidden="true" className="figures mr-1.5 inline-block w-3 text-center">
          {signs[row.change]}
        </span>
        {changeWords[row.change]}
      </span>
    ),
  },
  {
    id: 'description',
    header: 'Description',
    wrap: true,
    cell: (row) => (row.after ?? row.before)?.description,
  },
  {
    id: 'before',
    header: 'Before',
    align: 'end',
    cell: (row) => <span className="figures">{limitsOf(row.before)}</span>,
  },
  {
    id: 'after',
    header: 'After',
    align: 'end',
    cell: (row) => <span className="figures">{limitsOf(row.after)}</span>,
  },
  {
    id: 'fields',
    header: 'What differs',
    wrap: true,
    cell: (row) => row.fields.map((field) => fieldWords[field] ?? field).join(', '),
  },
];

/** Two drawing revisions row by row; a renumbered characteristic is still the same one. */
export function ComparisonTable({
  revisionId,
  withId,
  partNumber,
}: {
  revisionId: string;
  withId: string;
  partNumber: string;
}) {
  const { data } = useSuspenseQuery(comparisonQuery(revisionId, withId));
  const [view, change] = useUrlState({ show: 'differences' });
  const count = (kind: Row['change']) => data.rows.filter((row) => row.change === kind).length;
  const rows = view.show === 'all' ? data.rows : data.rows.filter((row) => row.change !== 'same');
  return (
    <>
      <PageHead
        title={`${partNumber}: revision ${data.from.code} against ${data.to.code}`}
        lead={`${count('changed')} changed, ${count('added')} added, ${count('removed')} removed, ${count('text-only')} in wording only, ${count('same')} the same.`}
      />
      <div className="flex flex-col gap-3">
        <SelectField
          id="comparison-show"
          label="Show"
          className="w-56"
          value={view.show}
          onChange={(show) => change({ show })}
          options={[
            { value: 'differences', label: 'differences' },
            { value: 'all', label: 'all characteristics' },
          ]}
        />
        <DataTable
          caption={`Revision ${data.from.code} against ${data.to.code}`}
          columns={columns}
          rows={rows}
          rowId={(row) => `${row.balloon}-${row.before?.id ?? ''}-${row.after?.id ?? ''}`}
          empty={
            <EmptyState
              title="The two revisions ask for the same"
              actions={<Button onClick={() => change({ show: 'all' })}>Show all characteristics</Button>}
            >
              No characteristic was added, removed or changed.
            </EmptyState>
          }
        />
      </div>
    </>
  );
}
