import type { ReadingImportPreview } from '@trammel/shared/table-import';
import { Checkbox } from '../../../components/ui/choice-fields.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';

type Conflict = ReadingImportPreview['conflicts'][number];
const shown = 500;

export interface ConflictRowsProps {
  conflicts: readonly Conflict[];
  choosing: boolean;
  chosen: ReadonlySet<string>;
  onChosen: (chosen: ReadonlySet<string>) => void;
}

/** Value for value: what stands in the package and what the file says. */
export function ConflictRows({ conflicts, choosing, chosen, onChosen }: ConflictRowsProps) {
  const columns: DataColumn<Conflict>[] = [
    { id: 'line', header: 'Line', align: 'end', cell: (row) => <span className="figures">{row.line}</span> },
    { id: 'balloon', header: 'Balloon', cell: (row) => <span className="figures">{row.balloon}</span> },
    { id: 'piece', header: 'Piece', cell: (row) => <span className="figures">{row.piece}</span> },
    {
      id: 'now',
      header: 'In the package',
      align: 'end',
      cell: (row) => <span className="figures">{row.now}</span>,
    },
    {
      id: 'file',
      header: 'In the file',
      align: 'end',
      cell: (row) => <span className="figures">{row.inFile}</span>,
    },
  ];
  if (choosing) {
    columns.push({
      id: 'take',
      header: 'Take the file',
      cell: (row) => (
        <Checkbox
          id={`take-${row.key}`}
          label={`Balloon ${row.balloon}, piece ${row.piece}: take ${row.inFile} from the file`}
          labelHidden
          value={chosen.has(row.key)}
          onChange={(take) => {
            const next = new Set(chosen);
            if (take) next.add(row.key);
            else next.delete(row.key);
            onChosen(next);
          }}
        />
      ),
    });
  }
  return (
    <>
      <DataTable
        caption="Values that differ"
        columns={columns}
        rows={conflicts.slice(0, shown)}
        rowId={(row) => row.key}
        empty={null}
      />
      {conflicts.length > shown && (
        <p className="text-pencil">
          The first {shown} of {conflicts.length} are shown; the others are kept unless you take the whole
          file.
        </p>
      )}
    </>
  );
}
