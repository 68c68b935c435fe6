import { useQuery } from '@tanstack/react-query';
import type { BuyingStatusItem } from '@trammel/shared/buying-status';
import { buyingVerdicts } from '@trammel/shared/status';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { BuyingVerdictBadge, buyingVerdictWords } from '../../../components/ui/state-badge.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Day, MomentWithZone } from '../../../components/ui/time.tsx';
import { apiUrl } from '../../../lib/api-client.ts';
import { showCount } from '../../../lib/format.ts';
import { paths } from '../../../lib/paths.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { buyingStatusQuery } from '../api.ts';

const columns: DataColumn<BuyingStatusItem>[] = [
  {
    id: 'part',
    header: 'Verdict and part',
    sort: true,
    sortName: 'partNumber',
    cell: (line) => (
      <span className="inline-flex flex-wrap items-center gap-x-2">
        <BuyingVerdictBadge verdict={line.verdict} />
        <span className="figures">{line.partNumber}</span>
      </span>
    ),
  },
  { id: 'name', header: 'Name', cell: (line) => line.partName, wrap: true, from: 'md' },
  { id: 'supplier', header: 'Supplier', sort: true, cell: (line) => line.supplierName, wrap: true },
  { id: 'revision', header: 'Revision', cell: (line) => <Revision line={line} /> },
  {
    id: 'left',
    header: 'Pieces left',
    align: 'end',
    cell: (line) => <span className="figures">{piecesLeft(line)}</span>,
  },
  {
    id: 'until',
    header: 'Until',
    sort: true,
    cell: (line) => (line.until === null ? '–' : <Day on={line.until} />),
  },
  {
    id: 'blocker',
    header: 'What stands in the way',
    cell: (line) => line.blocker ?? 'nothing',
    wrap: true,
    width: 'min-w-64',
  },
  { id: 'holder', header: 'In whose hands', cell: (line) => line.holder ?? '–', wrap: true, from: 'md' },
  {
    id: 'due',
    header: 'Due',
    cell: (line) => (line.dueOn === null ? '–' : <Day on={line.dueOn} />),
    from: 'lg',
  },
  {
    id: 'waiting',
    header: 'Days waiting',
    sort: true,
    sortName: 'waitingSince',
    align: 'end',
    cell: (line) => (line.waitingDays === null ? '–' : String(line.waitingDays)),
    from: 'lg',
  },
  {
    id: 'tooling',
    header: 'Tooling release',
    cell: (line) => (line.toolingRelease ? 'yes' : 'no'),
    from: 'xl',
  },
];

function piecesLeft(line: BuyingStatusItem): string {
  if (line.verdict === 'hold') return '–';
  return line.piecesLeft === null ? 'no limit' : showCount(line.piecesLeft);
}

function Revision({ line }: { line: BuyingStatusItem }) {
  const newer = line.currentRevision !== null && line.currentRevision !== line.approvedRevision;
  return (
    <span className="figures">
      {line.approvedRevision ?? 'none'}
      {newer && <span className="text-plum"> (drawing {line.currentRevision})</span>}
    </span>
  );
}

/** One row a part and supplier, the verdict first; derived by the server from decisions and the clock. */
export function BuyingStatusList() {
  const [view, change] = useUrlState({ q: '', verdict: '', sort: 'partNumber', cursor: '' });
  const query = useQuery(buyingStatusQuery(view));
  const { data } = query;
  return (
    <>
      <PageHead
        title="Buying status"
        lead={
          data ? (
            <>
              As of <MomentWithZone at={data.asOf} />. It follows from signed dispositions and the clock
              alone; a word by phone changes nothing.
            </>
          ) : undefined
        }
        actions={
          <DownloadLink
            href={apiUrl('/api/buying-status.csv', { q: view.q, verdict: view.verdict, sort: view.sort })}
          >
            CSV of this list
          </DownloadLink>
        }
      />
      <div className="mb-3 flex flex-wrap items-end gap-3">
        <TextField
          id="buying-search"
          label="Find part or supplier"
          type="search"
          value={view.q}
          onChange={(q) => change({ q })}
        />
        <SelectField
          id="buying-verdict"
          label="Verdict"
          value={view.verdict}
          onChange={(verdict) => change({ verdict })}
          options={[
            { value: '', label: 'All' },
            ...buyingVerdicts.map((verdict) => ({
              value: verdict,
              label: `${buyingVerdictWords[verdict]}${data ? ` (${data.counts[verdict]})` : ''}`,
            })),
          ]}
        />
      </div>
      {query.isPending ? (
        <Loading />
      ) : query.isError ? (
        <LoadFailure what="Buying status" error={query.error} onRetry={() => void query.refetch()} />
      ) : (
        <>
          <DataTable
            caption="What may be bought"
            columns={columns}
            rows={query.data.items}
            rowId={(line) => line.id}
            rowHref={(line) => paths.buyingLine(line.id)}
            sort={view.sort}
            onSort={(sort) => change({ sort })}
            refreshing={query.isFetching}
            empty={
              view.q !== '' || view.verdict !== '' ? (
                <EmptyState title="Nothing fits">Clear the search or choose all verdicts.</EmptyState>
              ) : (
                <EmptyState title="No parts yet">
                  A part appears here as soon as quality asks a supplier for its approval.
                </EmptyState>
              )
            }
          />
          <ListFooter
            shown={query.data.items.length}
            one="part"
            many="parts"
            nextCursor={query.data.nextCursor}
            cursor={view.cursor}
            onCursor={(cursor) => change({ cursor }, { push: true })}
            firstPage={paths.buyingStatus}
          />
        </>
      )}
    </>
  );
}
