import type { ImportIssue } from '@trammel/shared/table-import';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { countOf } from '../../../lib/format.ts';

const columns: DataColumn<ImportIssue & { id: string }>[] = [
  { id: 'line', header: 'Line', align: 'end', cell: (row) => <span className="figures">{row.line}</span> },
  { id: 'column', header: 'Column', cell: (row) => row.column ?? 'whole row' },
  { id: 'detail', header: 'Why it is refused', wrap: true, cell: (row) => row.detail },
  { id: 'remedy', header: 'What to do', wrap: true, cell: (row) => row.remedy },
];

/** Every refused place of the file; a long list says how much more there is. */
export function RefusedRows({ issues, total }: { issues: readonly ImportIssue[]; total: number }) {
  if (total === 0) return null;
  return (
    <section className="flex flex-col gap-2">
      <h2 className="text-vermilion">{countOf(total, 'place is refused', 'places are refused')}</h2>
      <p className="text-pencil">
        They stay out when you confirm. Mend them in the file and send it again, or change the settings above.
        {total > issues.length && ` The first ${issues.length} are shown.`}
      </p>
      <DataTable
        caption="Refused places"
        columns={columns}
        rows={issues.map((issue, index) => ({ ...issue, id: String(index) }))}
        rowId={(row) => row.id}
        empty={null}
      />
    </section>
  );
}
