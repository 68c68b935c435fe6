import {
  createSortedRowModel,
  rowSortingFeature,
  tableFeatures,
  useTable,
  type ColumnDef,
  type Row as TableRow,
} from '@tanstack/react-table';
import { useMemo, useRef, type KeyboardEvent, type MouseEvent, type ReactNode } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { cn } from '../../lib/cn.ts';
import { compareValues, readSort, writeSort, type SortValue } from './data-table-sort.ts';

export interface DataColumn<Row> {
  id: string;
  header: string;
  cell: (row: Row) => ReactNode;
  /** Name of the order in the address when it differs from `id`; the server knows it. */
  sortName?: string;
  /** Makes the column sortable. Sorting by the server needs only `true`; sorting here needs the value. */
  sort?: true | ((row: Row) => SortValue);
  align?: 'start' | 'end';
  /** Tailwind width class. */
  width?: string;
  wrap?: boolean;
  /** Left out below this width; what it holds must be readable elsewhere. */
  from?: 'md' | 'lg' | 'xl';
  /** Header for screen readers only: columns of buttons. */
  headerHidden?: boolean;
}

export interface DataTableProps<Row> {
  /** Names the table for screen readers and in print. */
  caption: string;
  columns: readonly DataColumn<Row>[];
  rows: readonly Row[];
  rowId: (row: Row) => string;
  /** Opens with Enter or a click anywhere in the row; the first column becomes the link. */
  rowHref?: (row: Row) => string;
  /** Order in force, `dueOn` or `-dueOn`; keep it in the address with `useUrlState`. */
  sort?: string;
  onSort?: (sort: string) => void;
  /** The rows are sorted here and not by the server. */
  sortHere?: boolean;
  /** Older rows stay shown, dimmed, while newer ones are fetched. */
  refreshing?: boolean;
  /** Stands in place of an empty table. */
  empty: ReactNode;
  rowTone?: (row: Row) => 'attention' | undefined;
}

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel(), sortFns: {} });
type Features = typeof features;

/** What scrolls sideways must be reached by keyboard: it is named and takes the focus. */
const scroller = { role: 'region', tabIndex: 0 } as const;

const hideBelow = { md: 'max-md:hidden', lg: 'max-lg:hidden', xl: 'max-xl:hidden' };

export function DataTable<Row extends object>(props: DataTableProps<Row>) {
  return props.rows.length === 0 && !props.refreshing ? props.empty : <FilledTable {...props} />;
}

function FilledTable<Row extends object>({
  caption,
  columns,
  rows,
  rowId,
  rowHref,
  sort = '',
  onSort,
  sortHere = false,
  refreshing = false,
  rowTone,
}: DataTableProps<Row>) {
  const body = useRef<HTMLTableSectionElement>(null);
  const navigate = useNavigate();
  const definitions = useMemo(() => columns.map((column) => toDefinition(column)), [columns]);
  const table = useTable({
    features,
    columns: definitions,
    data: rows,
    getRowId: rowId,
    manualSorting: !sortHere,
    enableMultiSort: false,
    enableSortingRemoval: false,
    state: { sorting: readSort(sort, columns) },
    onSortingChange: (change) => {
      const now = readSort(sort, columns);
      onSort?.(writeSort(typeof change === 'function' ? change(now) : change, columns));
    },
  });
  const columnOf = (id: string) => columns.find((column) => column.id === id);

  const moveAlongRows = (event: KeyboardEvent) => {
    const links = [...(body.current?.querySelectorAll<HTMLElement>('[data-row-link]') ?? [])];
    const at = links.indexOf(event.currentTarget as HTMLElement);
    const steps: Record<string, number> = {
      ArrowDown: at + 1,
      ArrowUp: at - 1,
      Home: 0,
      End: links.length - 1,
    };
    const target = steps[event.key];
    if (at < 0 || target === undefined) return;
    event.preventDefault();
    links[Math.max(0, Math.min(target, links.length - 1))]?.focus();
  };

  const openRow = (event: MouseEvent, row: Row) => {
    const onControl = (event.target as Element).closest('a, button, input, select, textarea, label, summary');
    const selecting = window.getSelection()?.toString() !== '';
    if (rowHref === undefined || onControl || selecting) return;
    void navigate(rowHref(row));
  };

  return (
    <div
      {...scroller}
      aria-label={caption}
      className={cn('overflow-x-auto border border-rule bg-sheet', refreshing && 'opacity-60')}
    >
      <table aria-busy={refreshing || undefined} className="as-cards w-full border-collapse text-[0.875rem]">
        <caption className="sr-only">{caption}</caption>
        <thead className="border-b border-pencil">
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const column = columnOf(header.column.id);
                const sorted = header.column.getIsSorted();
                const sortable = header.column.getCanSort() && onSort !== undefined;
                return (
                  <th
                    key={header.id}
                    scope="col"
                    aria-sort={
                      sorted ? (sorted === 'asc' ? 'ascending' : 'descending') : sortable ? 'none' : undefined
                    }
                    className={cn(
                      'h-row px-3 align-bottom text-[0.8125rem] font-semibold',
                      column?.align === 'end' ? 'text-end' : 'text-start',
                      column?.from && hideBelow[column.from],
                      column?.width,
                    )}
                  >
                    {sortable ? (
                      <button
                        type="button"
                        onClick={header.column.getToggleSortingHandler()}
                        className="inline-flex min-h-7 items-center gap-1 font-semibold hover:text-marking"
                      >
                        {column?.header}
                        <SortSign direction={sorted} />
                      </button>
                    ) : (
                      <span
                        className={cn('inline-flex min-h-7 items-center', column?.headerHidden && 'sr-only')}
                      >
                        {column?.header}
                      </span>
                    )}
                  </th>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody ref={body}>
          {table.getRowModel().rows.map((row) => (
            <tr
              key={row.id}
              onClick={(event) => openRow(event, row.original)}
              className={cn(
                'h-row border-b border-rule last:border-b-0 hover:bg-marking/6',
                rowHref && 'cursor-pointer',
                rowTone?.(row.original) === 'attention' && 'bg-vermilion/5',
              )}
            >
              {row.getAllCells().map((cell, index) => {
                const column = columnOf(cell.column.id);
                const content = column?.cell(row.original);
                return (
                  <td
                    key={cell.id}
                    data-label={column?.headerHidden ? '' : column?.header}
                    className={cn(
                      'px-3 py-1 align-middle',
                      column?.align === 'end' && 'text-end',
                      !column?.wrap && 'whitespace-nowrap',
                      column?.from && hideBelow[column.from],
                    )}
                  >
                    {index === 0 && rowHref ? (
                      <Link
                        to={rowHref(row.original)}
                        data-row-link=""
                        onKeyDown={moveAlongRows}
                        className="inline-block font-medium"
                      >
                        {content}
                      </Link>
                    ) : (
                      content
                    )}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function toDefinition<Row extends object>(column: DataColumn<Row>): ColumnDef<Features, Row> {
  const { sort } = column;
  const valueOf = typeof sort === 'function' ? sort : () => null;
  return {
    id: column.id,
    accessorFn: valueOf,
    enableSorting: sort !== undefined,
    sortDescFirst: false,
    sortFn: (a: TableRow<Features, Row>, b: TableRow<Features, Row>) =>
      compareValues(valueOf(a.original), valueOf(b.original)),
  };
}

function SortSign({ direction }: { direction: false | 'asc' | 'desc' }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 8 12" className="w-2 fill-current">
      <path
        d="M4 0l3.5 5h-7z"
        className={direction === 'desc' ? 'opacity-25' : direction ? '' : 'opacity-40'}
      />
      <path
        d="M4 12L.5 7h7z"
        className={direction === 'asc' ? 'opacity-25' : direction ? '' : 'opacity-40'}
      />
    </svg>
  );
}
