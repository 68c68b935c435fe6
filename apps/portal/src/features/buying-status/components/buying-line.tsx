import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { recordDeliveryRequest } from '@trammel/shared/buying-status';
import { Button } from '../../../components/ui/button.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { PageHead } from '../../../components/ui/page-head.tsx';
import { BuyingVerdictBadge } from '../../../components/ui/state-badge.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Day, Moment } from '../../../components/ui/time.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { showCount } from '../../../lib/format.ts';
import { useForm } from '../../../lib/use-form.ts';
import { buyingLineQuery, recordDelivery } from '../api.ts';

const outcomeWords: Record<string, string> = {
  approved: 'approved',
  'interim-approval': 'interim approval',
  rejected: 'rejected',
  'sent-back': 'sent back',
};

/** One part from one supplier: the verdict, its limits, pieces received, and the decisions behind it. */
export function BuyingLine({ lineId }: { lineId: string }) {
  const { data } = useSuspenseQuery(buyingLineQuery(lineId));
  const { line } = data;
  const cells: [string, string][] = [
    ['Revision approved', line.approvedRevision ?? 'none'],
    ['Drawing released', line.currentRevision ?? 'none'],
    [
      'Pieces left',
      line.piecesLeft === null ? (line.verdict === 'may-buy' ? 'no limit' : '–') : showCount(line.piecesLeft),
    ],
    ['Covers', line.streamsCovered.join(', ') || '–'],
    ['In whose hands', line.holder ?? '–'],
    ['Tooling release', line.toolingRelease ? 'yes' : 'no'],
  ];
  return (
    <div className="flex flex-col gap-5">
      <PageHead title={`${line.partNumber} from ${line.supplierName}`} lead={line.partName} />
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        <BuyingVerdictBadge verdict={line.verdict} />
        {line.until && (
          <span>
            until <Day on={line.until} />
          </span>
        )}
        <span>{line.blocker}</span>
      </div>
      <dl className="grid grid-cols-2 border-t border-l border-rule bg-sheet sm:grid-cols-3 lg:grid-cols-6">
        {cells.map(([caption, value]) => (
          <div key={caption} className="border-r border-b border-rule px-3 py-1.5">
            <dt className="caption">{caption}</dt>
            <dd className="figures break-words">{value}</dd>
          </div>
        ))}
      </dl>
      {data.conditions.length > 0 && (
        <section aria-label="Conditions">
          <h2 className="mb-1">Conditions</h2>
          <ul className="border-t border-rule">
            {data.conditions.map((condition) => (
              <li
                key={`${condition.text} ${condition.dueOn}`}
                className="flex flex-wrap gap-x-4 border-b border-rule bg-sheet px-3 py-2"
              >
                <span className="min-w-0 flex-1 basis-64">{condition.text}</span>
                <span>{condition.owner}</span>
                <Day on={condition.dueOn} />
                <span className="text-pencil">{condition.state.replace('-', ' ')}</span>
              </li>
            ))}
          </ul>
        </section>
      )}
      <section aria-label="Pieces received" className="flex flex-col gap-3">
        <h2>Pieces received</h2>
        {data.abilities.recordDelivery && line.verdict !== 'hold' && <DeliveryForm lineId={lineId} />}
        {data.deliveries.length === 0 ? (
          <EmptyState title="Nothing received yet">
            Receiving inspection counts pieces here; the limit of an interim approval runs down with them.
          </EmptyState>
        ) : (
          <ul className="border-t border-rule">
            {data.deliveries.map((delivery) => (
              <li
                key={delivery.id}
                className="flex flex-wrap gap-x-4 border-b border-rule bg-sheet px-3 py-1.5"
              >
                <span className="figures w-24 text-right">{showCount(delivery.quantity)}</span>
                <Moment at={delivery.recordedAt} />
                <span>{delivery.recordedBy}</span>
                <span className="text-pencil">{delivery.note}</span>
              </li>
            ))}
          </ul>
        )}
      </section>
      <section aria-label="Decisions">
        <h2 className="mb-1">Decisions</h2>
        {data.history.length === 0 ? (
          <p className="text-pencil">No disposition has been signed for this part from this supplier.</p>
        ) : (
          <ul className="border-t border-rule">
            {data.history.map((entry) => (
              <li key={entry.at} className="flex flex-wrap gap-x-4 border-b border-rule bg-sheet px-3 py-1.5">
                <Moment at={entry.at} />
                <span className="figures">rev {entry.revision}</span>
                <span>{outcomeWords[entry.outcome] ?? entry.outcome}</span>
                {entry.until && (
                  <span>
                    until <Day on={entry.until} />
                  </span>
                )}
                {entry.pieceLimit !== null && (
                  <span className="figures">{showCount(entry.pieceLimit)} pieces</span>
                )}
                <span className="text-pencil">{entry.decidedBy}</span>
              </li>
            ))}
          </ul>
        )}
      </section>
    </div>
  );
}

function DeliveryForm({ lineId }: { lineId: string }) {
  const client = useQueryClient();
  const [key, setKey] = useState(() => newIdempotencyKey());
  const form = useForm({
    initial: { quantity: '', note: '' },
    schema: {
      safeParse: (value) => {
        const { quantity, note } = value as { quantity: string; note: string };
        return recordDeliveryRequest.safeParse({
          quantity: quantity.trim() === '' ? undefined : Number(quantity),
          note,
        });
      },
    },
    onSubmit: async (_values, body) => {
      const answer = await recordDelivery(lineId, body, key);
      setKey(newIdempotencyKey());
      showToast({
        text:
          answer.piecesLeft === null
            ? `${showCount(body.quantity)} pieces received`
            : `${showCount(body.quantity)} pieces received, ${showCount(answer.piecesLeft)} left`,
      });
      form.setAll({ quantity: '', note: '' });
      await client.invalidateQueries({ queryKey: ['buying-line', lineId] });
      await client.invalidateQueries({ queryKey: ['buying-status'] });
    },
  });
  return (
    <form className="flex flex-col gap-3" onSubmit={(event) => void form.submit(event)}>
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <div className="flex flex-wrap items-end gap-3">
        <TextField {...form.field('quantity')} label="Pieces" inputMode="numeric" mono />
        <TextField {...form.field('note')} label="Delivery note" optional />
        <Button type="submit" weight="primary" busy={form.busy}>
          Count as received
        </Button>
      </div>
    </form>
  );
}
