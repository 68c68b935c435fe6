import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { DispositionResponse } from '@trammel/shared/dispositions';
import { Button } from '../../../components/ui/button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Day, Moment } from '../../../components/ui/time.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { showCount } from '../../../lib/format.ts';
import { changeCondition, dispositionQuery } from '../api.ts';
import { outcomeWords, reasonWords } from '../disposition-words.ts';

/** The signed decision as it stands: outcome, limits, reasons, and the conditions with their progress. */
export function DispositionView({
  submissionId,
  side,
}: {
  submissionId: string;
  side: 'customer' | 'supplier';
}) {
  const { data } = useSuspenseQuery(dispositionQuery(submissionId));
  return (
    <div className="flex flex-col gap-4">
      <dl className="flex flex-wrap gap-x-8 gap-y-2 border border-rule bg-sheet px-4 py-3">
        <Cell caption="Outcome">{outcomeWords[data.outcome]}</Cell>
        {data.endOn && (
          <Cell caption="Ends on">
            <Day on={data.endOn} />
          </Cell>
        )}
        {data.pieceLimit !== null && <Cell caption="Pieces">{showCount(data.pieceLimit)}</Cell>}
        {data.resubmitBy && (
          <Cell caption="Resubmit by">
            <Day on={data.resubmitBy} />
          </Cell>
        )}
        <Cell caption="Covers">{data.streamsCovered.join(', ')}</Cell>
        {data.containment && <Cell caption="Containment">{data.containment}</Cell>}
        {data.comment && <Cell caption="Comment">{data.comment}</Cell>}
      </dl>
      {data.reasons.length > 0 && (
        <section aria-label="Reasons">
          <h2 className="mb-1">Reasons</h2>
          <ul className="border-t border-rule">
            {data.reasons.map((reason, index) => (
              <li key={index} className="border-b border-rule bg-sheet px-3 py-2">
                <span className="font-semibold">{reasonWords[reason.code]}</span>
                {reason.balloon && <span className="figures"> balloon {reason.balloon}</span>}
                {reason.element && <span> {reason.element}</span>}: {reason.text}
              </li>
            ))}
          </ul>
        </section>
      )}
      {data.conditions.length > 0 && (
        <section aria-label="Conditions">
          <h2 className="mb-1">Conditions</h2>
          <ul className="border-t border-rule">
            {data.conditions.map((condition) => (
              <ConditionRow
                key={`${condition.id} ${condition.version}`}
                submissionId={submissionId}
                condition={condition}
                side={side}
              />
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}

function Cell({ caption, children }: { caption: string; children: ReactNode }) {
  return (
    <div className="min-w-0">
      <dt className="caption">{caption}</dt>
      <dd className="break-words">{children}</dd>
    </div>
  );
}

const conditionWords = {
  open: 'open',
  'evidence-given': 'evidence given, to be verified',
  verified: 'verified',
} as const;

interface ConditionRowProps {
  submissionId: string;
  condition: DispositionResponse['conditions'][number];
  side: 'customer' | 'supplier';
}

function ConditionRow({ submissionId, condition, side }: ConditionRowProps) {
  const client = useQueryClient();
  const [evidence, setEvidence] = useState(condition.evidence);
  const [failure, setFailure] = useState<unknown>(null);
  const settle = async (state: 'evidence-given' | 'verified') => {
    setFailure(null);
    try {
      const saved = await changeCondition(condition, { state, evidence });
      client.setQueryData(dispositionQuery(submissionId).queryKey, saved);
    } catch (error) {
      setFailure(error);
    }
  };
  return (
    <li className="flex flex-col gap-2 border-b border-rule bg-sheet px-3 py-2">
      <div className="flex flex-wrap gap-x-4">
        <span className="min-w-0 flex-1 basis-64">{condition.text}</span>
        <span>{condition.owner}</span>
        <span className={condition.overdue ? 'text-vermilion' : ''}>
          {condition.overdue ? 'overdue since ' : 'due '}
          <Day on={condition.dueOn} />
        </span>
        <span className={condition.state === 'verified' ? 'text-verdigris' : 'text-plum'}>
          {conditionWords[condition.state]}
        </span>
      </div>
      {condition.closedAt && (
        <p className="caption">
          Verified by {condition.closedBy}, <Moment at={condition.closedAt} />
        </p>
      )}
      {failure !== null && (
        <Notice tone="failure" title="Not saved">
          {reasonOf(failure)}
        </Notice>
      )}
      {condition.state !== 'verified' && (
        <div className="flex flex-wrap items-end gap-2">
          <TextField
            id={`evidence-${condition.id}`}
            label="Evidence"
            value={evidence}
            onChange={setEvidence}
          />
          <Button size="small" weight="plain" onClick={() => void settle('evidence-given')}>
            Give evidence
          </Button>
          {side === 'customer' && (
            <Button size="small" onClick={() => void settle('verified')}>
              Verify
            </Button>
          )}
        </div>
      )}
      {condition.state === 'verified' && condition.evidence && <p>{condition.evidence}</p>}
    </li>
  );
}
