import { useQuery } from '@tanstack/react-query';
import type { GaugeResponse } from '@trammel/shared/gauges';
import { useEffect, useState } from 'react';
import { useLocation } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ListFooter } from '../../../components/ui/list-footer.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Day, DueDay } from '../../../components/ui/time.tsx';
import { daysUntil, showDecimal } from '../../../lib/format.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { gaugeListQuery } from '../api.ts';
import { GaugeDialog } from './gauge-dialog.tsx';

const quiet = 350;
const overdue = (gauge: GaugeResponse) => gauge.dueOn !== null && daysUntil(gauge.dueOn) < 0;

export function GaugeList() {
  const [view, change] = useUrlState({ q: '', sort: 'code', cursor: '' });
  const [typed, setTyped] = useState(view.q);
  const [shown, setShown] = useState<GaugeResponse | 'new' | null>(null);
  const { data, error, isPending, isPlaceholderData, refetch } = useQuery(gaugeListQuery(view));
  const { pathname } = useLocation();
  useEffect(() => {
    if (typed === view.q) return;
    const timer = setTimeout(() => change({ q: typed }), quiet);
    return () => clearTimeout(timer);
  }, [typed, view.q, change]);

  const columns: DataColumn<GaugeResponse>[] = [
    {
      id: 'code',
      header: 'Gauge',
      sort: true,
      cell: (row) => <span className="figures font-semibold">{row.code}</span>,
    },
    { id: 'kind', header: 'Kind', wrap: true, cell: (row) => row.kind },
    {
      id: 'resolution',
      header: 'Resolution',
      align: 'end',
      cell: (row) => (
        <span className="figures">
          {row.resolution === null ? '—' : `${showDecimal(row.resolution)} ${row.unit}`}
        </span>
      ),
    },
    {
      id: 'calibratedOn',
      header: 'Calibrated',
      from: 'md',
      cell: (row) => (row.calibratedOn === null ? '—' : <Day on={row.calibratedOn} />),
    },
    {
      id: 'dueOn',
      header: 'Calibration due',
      sort: true,
      cell: (row) =>
        row.dueOn === null ? <span className="text-brass">no date</span> : <DueDay on={row.dueOn} />,
    },
    {
      id: 'certificate',
      header: 'Certificate',
      wrap: true,
      from: 'lg',
      cell: (row) => row.certificate || '—',
    },
    {
      id: 'change',
      header: 'Change',
      headerHidden: true,
      align: 'end',
      cell: (row) => (
        <Button size="small" aria-label={`Change gauge ${row.code}`} onClick={() => setShown(row)}>
          Change
        </Button>
      ),
    },
  ];
  const add = (
    <Button weight="primary" onClick={() => setShown('new')}>
      Add a gauge
    </Button>
  );
  return (
    <>
      <PageHead
        title="Gauges"
        lead="Readings name the gauge they were taken with; its calibration must hold on the day of measuring."
        actions={add}
      />
      <search className="no-print mb-3 flex">
        <TextField
          id="gauge-search"
          label="Search"
          type="search"
          placeholder="Gauge or kind"
          maxLength={100}
          value={typed}
          onChange={setTyped}
          className="min-w-48 flex-1 sm:max-w-80"
        />
      </search>
      {isPending && <Loading label="Loading gauges" />}
      {error && <LoadFailure what="The list of gauges" error={error} onRetry={() => void refetch()} />}
      {data && (
        <DataTable
          caption="Gauges"
          columns={columns}
          rows={data.items}
          rowId={(row) => row.id}
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          refreshing={isPlaceholderData}
          rowTone={(row) => (overdue(row) ? 'attention' : undefined)}
          empty={
            view.q === '' ? (
              <EmptyState title="No gauges yet" actions={add}>
                Add the gauges that readings are taken with, each with its code and the date its calibration
                runs out.
              </EmptyState>
            ) : (
              <EmptyState
                title="No gauge matches"
                actions={
                  <Button
                    onClick={() => {
                      setTyped('');
                      change({ q: '' });
                    }}
                  >
                    Clear the search
                  </Button>
                }
              >
                Search looks at the gauge's code and kind.
              </EmptyState>
            )
          }
        />
      )}
      {data && (data.items.length > 0 || view.cursor !== '') && (
        <ListFooter
          shown={data.items.length}
          one="gauge"
          many="gauges"
          nextCursor={data.nextCursor}
          cursor={view.cursor}
          onCursor={(cursor) => change({ cursor }, { push: true })}
          firstPage={pathname}
        />
      )}
      {shown && <GaugeDialog gauge={shown === 'new' ? null : shown} onClose={() => setShown(null)} />}
    </>
  );
}
