import { useImperativeHandle, useRef, useState, type Ref } from 'react';
import type { ReviewRow, RowMark } from '@trammel/shared/submission-review';
import { Button } from '../../../components/ui/button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { ApiProblem, reasonOf } from '../../../lib/api-problem.ts';
import { dropDraft, readDraft, writeDraft } from '../../../lib/draft-storage.ts';
import { decideCharacteristic } from '../api.ts';
import { MarkBadge } from './mark-badge.tsx';

export interface DecisionHandle {
  mark: (mark: RowMark | null) => void;
  focusRemark: () => void;
}

interface DecisionFormProps {
  submissionId: string;
  row: ReviewRow;
  draft: string;
  handle: Ref<DecisionHandle>;
  /** `next` moves on to the row after this one. */
  onDecided: (next: boolean) => void;
  onStale: () => void;
}

interface Texts {
  remark: string;
  internalRemark: string;
  deviationId: string;
}

/** Mark of one row, with what goes to the supplier and what stays inside kept apart. What is typed outlives the tab. */
export function DecisionForm({ submissionId, row, draft, handle, onDecided, onStale }: DecisionFormProps) {
  const { decision, characteristic: facts } = row;
  const granted = row.deviations.filter((deviation) => deviation.state === 'granted');
  const saved: Texts = {
    remark: decision.remark,
    internalRemark: decision.internalRemark ?? '',
    deviationId: decision.deviationId ?? granted[0]?.id ?? '',
  };
  const [texts, setTexts] = useState<Texts>(() => readDraft<Texts>(draft)?.value ?? saved);
  const [failure, setFailure] = useState<unknown>(null);
  const [busy, setBusy] = useState<string | null>(null);
  const remark = useRef<HTMLDivElement>(null);
  const type = (patch: Partial<Texts>) => {
    const next = { ...texts, ...patch };
    setTexts(next);
    writeDraft(draft, { value: next, version: decision.version, at: new Date().toISOString() });
  };
  const mark = async (wanted: RowMark | null) => {
    if (busy !== null) return;
    setBusy(wanted ?? 'none');
    setFailure(null);
    try {
      await decideCharacteristic(submissionId, facts.id, decision.version, {
        mark: wanted,
        remark: texts.remark.trim(),
        internalRemark: texts.internalRemark.trim(),
        deviationId: wanted === 'accepted' && texts.deviationId !== '' ? texts.deviationId : null,
      });
      dropDraft(draft);
      onDecided(wanted !== null);
    } catch (error) {
      setFailure(error);
      if (error instanceof ApiProblem && error.is('stale-version')) onStale();
    } finally {
      setBusy(null);
    }
  };
  const focusRemark = () => remark.current?.querySelector('textarea')?.focus();
  useImperativeHandle(handle, () => ({ mark: (wanted) => void mark(wanted), focusRemark }));
  const errorAt = (name: string) =>
    failure instanceof ApiProblem
      ? failure.problem.errors?.find((error) => error.pointer === `/${name}`)?.detail
      : undefined;
  const elsewhere = failure !== null && !errorAt('remark') && !errorAt('deviationId');
  return (
    <div className="flex flex-col gap-3 border-t border-rule pt-3">
      {elsewhere && (
        <Notice tone="failure" title="Not marked">
          {errorAt('mark') ?? reasonOf(failure)}
        </Notice>
      )}
      <p className="flex flex-wrap items-baseline gap-x-3">
        <MarkBadge mark={decision.mark} />
        {decision.by && decision.at && (
          <span className="caption">
            {decision.by}, <Moment at={decision.at} />
          </span>
        )}
      </p>
      {granted.length > 0 && (
        <SelectField
          id={`deviation-${facts.id}`}
          label="Accept under deviation"
          value={texts.deviationId}
          onChange={(deviationId) => type({ deviationId })}
          options={[
            { value: '', label: 'None' },
            ...granted.map((deviation) => ({ value: deviation.id, label: `Deviation ${deviation.number}` })),
          ]}
          error={errorAt('deviationId')}
        />
      )}
      {granted.length === 0 && errorAt('deviationId') && (
        <Notice tone="failure" title="Needs a deviation">
          {errorAt('deviationId')}
        </Notice>
      )}
      <div ref={remark} className="grid gap-3 md:grid-cols-2">
        <TextArea
          id={`remark-${facts.id}`}
          label="Remark to the supplier"
          value={texts.remark}
          onChange={(text) => type({ remark: text })}
          rows={3}
          error={errorAt('remark')}
        />
        <TextArea
          id={`internal-${facts.id}`}
          label="Internal remark"
          hint="Never shown to the supplier"
          value={texts.internalRemark}
          onChange={(text) => type({ internalRemark: text })}
          rows={3}
        />
      </div>
      <div className="flex flex-wrap gap-2">
        <Button size="small" busy={busy === 'accepted'} onClick={() => void mark('accepted')}>
          Accept
        </Button>
        <Button size="small" weight="danger" busy={busy === 'refused'} onClick={() => void mark('refused')}>
          Refuse
        </Button>
        <Button
          size="small"
          weight="plain"
          busy={busy === 'questioned'}
          onClick={() => void mark('questioned')}
        >
          Ask
        </Button>
        {decision.mark !== null && (
          <Button size="small" weight="quiet" busy={busy === 'none'} onClick={() => void mark(null)}>
            Take back
          </Button>
        )}
      </div>
    </div>
  );
}
