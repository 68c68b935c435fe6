import { useState } from 'react';
import type { DeviationResponse } from '@trammel/shared/deviations';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { showCount, showDay } from '../../../lib/format.ts';
import { decideDeviation, withdrawDeviation } from '../api.ts';

interface DeviationCardProps {
  deviation: DeviationResponse;
  streamNames: ReadonlyMap<string, string>;
  onChanged: () => void;
  onEdit: () => void;
}

const stateLook: Record<DeviationResponse['state'], string> = {
  draft: 'border-rule text-pencil',
  sent: 'border-plum text-plum',
  granted: 'border-verdigris text-verdigris',
  refused: 'border-vermilion text-vermilion',
  withdrawn: 'border-rule text-pencil',
};
const stateWords: Record<DeviationResponse['state'], string> = {
  draft: 'draft',
  sent: 'waits for the customer',
  granted: 'granted',
  refused: 'refused',
  withdrawn: 'withdrawn',
};

export function DeviationCard({ deviation, streamNames, onChanged, onEdit }: DeviationCardProps) {
  const [withdrawing, setWithdrawing] = useState(false);
  const { unit } = deviation;
  const facts: [string, string][] = [
    ['Drawn', `${deviation.lowerLimit ?? 'no lower'} to ${deviation.upperLimit ?? 'no upper'} ${unit}`],
    [
      'Asked for',
      `${deviation.rangeLower ?? deviation.lowerLimit ?? 'no lower'} to ${deviation.rangeUpper ?? deviation.upperLimit ?? 'no upper'} ${unit}`,
    ],
    [
      'Streams',
      deviation.streamIds.length === 0
        ? 'all'
        : deviation.streamIds.map((id) => streamNames.get(id) ?? '').join(', '),
    ],
    ['Pieces', deviation.quantity === null ? 'no number' : showCount(deviation.quantity)],
    ['Until', deviation.untilOn === null ? 'no date' : showDay(deviation.untilOn)],
  ];
  return (
    <article className="flex flex-col gap-3 border border-rule bg-sheet p-4">
      <header className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h2>
          Deviation <span className="figures">{deviation.number}</span>: balloon{' '}
          <span className="figures">{deviation.balloon}</span> {deviation.description}
        </h2>
        <span className={`border px-1.5 ${stateLook[deviation.state]}`}>{stateWords[deviation.state]}</span>
      </header>
      {!deviation.coversReadings && (
        <Notice tone="attention" title="Does not reach every reading">
          A reading of this row lies outside the range asked for.
        </Notice>
      )}
      <dl className="flex flex-wrap gap-x-6 gap-y-2">
        {facts.map(([caption, value]) => (
          <div key={caption}>
            <dt className="caption">{caption}</dt>
            <dd className="figures">{value}</dd>
          </div>
        ))}
      </dl>
      <Words caption="Cause" text={deviation.cause} />
      <Words caption="Containment" text={deviation.containment} />
      <Words caption="Risk to function" text={deviation.risk} />
      <Words caption="Corrective action" text={deviation.correctiveAction} />
      <p className="caption">
        Asked by {deviation.askedBy}, <Moment at={deviation.askedAt} />
      </p>
      {deviation.decidedAt && (
        <p>
          {stateWords[deviation.state]} by {deviation.decidedBy}, <Moment at={deviation.decidedAt} />:{' '}
          {deviation.decisionNote}
        </p>
      )}
      {deviation.abilities.decide && <DecisionForm deviation={deviation} onChanged={onChanged} />}
      {deviation.abilities.edit && (
        <div className="flex gap-2">
          <Button size="small" weight="plain" onClick={onEdit}>
            Change
          </Button>
          <Button size="small" weight="plain" onClick={() => setWithdrawing(true)}>
            Withdraw
          </Button>
        </div>
      )}
      <ConfirmDialog
        open={withdrawing}
        onClose={() => setWithdrawing(false)}
        title={`Withdraw deviation request ${deviation.number}`}
        consequence={`Balloon ${deviation.balloon} then stops submission again until it is in tolerance or another request is sent.`}
        confirmLabel="Withdraw"
        onConfirm={async () => {
          await withdrawDeviation(deviation);
          onChanged();
        }}
      />
    </article>
  );
}

function Words({ caption, text }: { caption: string; text: string }) {
  if (text === '') return null;
  return (
    <div>
      <p className="caption">{caption}</p>
      <p className="whitespace-pre-line">{text}</p>
    </div>
  );
}

function DecisionForm({ deviation, onChanged }: { deviation: DeviationResponse; onChanged: () => void }) {
  const [note, setNote] = useState('');
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState<'granted' | 'refused' | null>(null);
  const decide = async (decision: 'granted' | 'refused') => {
    if (note.trim() === '') {
      setFailure('Give the reason; the supplier reads it.');
      return;
    }
    setBusy(decision);
    setFailure(null);
    try {
      await decideDeviation(deviation, { decision, note: note.trim() });
      onChanged();
    } catch (error) {
      setFailure(reasonOf(error));
    } finally {
      setBusy(null);
    }
  };
  return (
    <div className="flex flex-col gap-2 border-t border-rule pt-3">
      <TextArea
        id={`note-${deviation.id}`}
        label="Reason of the decision"
        value={note}
        onChange={setNote}
        rows={2}
        error={failure ?? undefined}
      />
      <div className="flex gap-2">
        <Button size="small" busy={busy === 'granted'} onClick={() => void decide('granted')}>
          Grant
        </Button>
        <Button size="small" weight="danger" busy={busy === 'refused'} onClick={() => void decide('refused')}>
          Refuse
        </Button>
      </div>
    </div>
  );
}
