import { hashKey, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import {
  outcomes,
  signDispositionRequest,
  type Outcome,
  type SignDispositionRequest,
} from '@trammel/shared/dispositions';
import { Button } from '../../../components/ui/button.tsx';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { ApiProblem } from '../../../lib/api-problem.ts';
import { useForm } from '../../../lib/use-form.ts';
import { draftQuery, signDisposition } from '../api.ts';
import { outcomeHints, outcomeWords } from '../disposition-words.ts';
import { ConditionsField, type ConditionEntry } from './conditions-field.tsx';
import { ReasonsField, type ReasonEntry } from './reasons-field.tsx';

interface DispositionFormProps {
  submissionId: string;
  name: string;
}

interface Values {
  outcome: Outcome;
  reasons: ReasonEntry[];
  conditions: ConditionEntry[];
  endOn: string;
  pieceLimit: string;
  containment: string;
  resubmitBy: string;
  comment: string;
  password: string;
}

const orNull = (text: string) => (text.trim() === '' ? null : text.trim());

function bodyOf(values: Values, digest: string): SignDispositionRequest {
  const interim = values.outcome === 'interim-approval';
  const reasoned = values.outcome === 'rejected' || values.outcome === 'sent-back';
  return {
    outcome: values.outcome,
    reasons: reasoned
      ? values.reasons.map(({ code, target, text }) => ({
          code: code as 'other',
          characteristicId: target.startsWith('row:') ? target.slice(4) : null,
          elementId: target.startsWith('element:') ? target.slice(8) : null,
          text,
        }))
      : [],
    conditions: interim ? values.conditions : [],
    endOn: interim ? orNull(values.endOn) : null,
    pieceLimit: interim && orNull(values.pieceLimit) !== null ? Number(values.pieceLimit) : null,
    containment: interim ? values.containment : '',
    resubmitBy: interim ? orNull(values.resubmitBy) : null,
    comment: values.comment,
    password: values.password,
    digest,
  };
}

/** Outcome, what it needs, the statement that is signed, and the password of the person who signs. */
export function DispositionForm({ submissionId, name }: DispositionFormProps) {
  const { data: draft } = useSuspenseQuery(draftQuery(submissionId));
  const client = useQueryClient();
  const [key] = useState(() => newIdempotencyKey());
  const form = useForm<Values, SignDispositionRequest>({
    initial: {
      outcome: draft.blockers.approved.length === 0 ? 'approved' : 'sent-back',
      reasons: [],
      conditions: [],
      endOn: '',
      pieceLimit: '',
      containment: '',
      resubmitBy: '',
      comment: '',
      password: '',
    },
    schema: {
      safeParse: (value) => {
        const body = bodyOf(value as Values, draft.digest);
        const parsed = signDispositionRequest.safeParse(body);
        return parsed.success ? { success: true, data: body } : parsed;
      },
    },
    onSubmit: async (_values, body) => {
      try {
        await signDisposition(submissionId, body, key);
      } catch (error) {
        if (error instanceof ApiProblem && error.is('stale-version'))
          await client.invalidateQueries({ queryKey: draftQuery(submissionId).queryKey });
        throw error;
      }
      showToast({ text: `${name}: ${outcomeWords[body.outcome].toLowerCase()}, signed` });
      // Once signed there is no draft any more: asking for it again would be refused.
      const gone = hashKey(draftQuery(submissionId).queryKey);
      await client.invalidateQueries({
        queryKey: ['submission', submissionId],
        predicate: (query) => query.queryHash !== gone,
      });
    },
  });
  const { outcome } = form.values;
  const blockers = draft.blockers[outcome];
  const { counts } = draft;
  return (
    <form className="flex flex-col gap-5" onSubmit={(event) => void form.submit(event)}>
      {draft.caution && (
        <Notice tone="attention" title="Safety or regulatory characteristics">
          {draft.caution}
        </Notice>
      )}
      <p className="figures">
        {counts.accepted} accepted, {counts.refused} refused, {counts.questioned} questioned,{' '}
        {counts.unmarked} not marked, of {counts.rows}
      </p>
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <RadioGroup
        {...form.field('outcome')}
        label="Outcome"
        options={outcomes.map((value) => ({ value, label: outcomeWords[value], hint: outcomeHints[value] }))}
      />
      {blockers.length > 0 && (
        <Notice tone="attention" title={`${outcomeWords[outcome]} is not possible yet`}>
          <ul className="list-disc pl-5">
            {blockers.map((blocker) => (
              <li key={blocker}>{blocker}</li>
            ))}
          </ul>
        </Notice>
      )}
      {outcome === 'interim-approval' && (
        <>
          <div className="grid gap-4 sm:grid-cols-3">
            <DateField {...form.field('endOn')} label="Ends on" hint="Last day on which may be bought" />
            <TextField
              {...form.field('pieceLimit')}
              label="Number of pieces"
              inputMode="numeric"
              mono
              hint="A date, a number, or both"
            />
            <DateField {...form.field('resubmitBy')} label="Resubmit by" optional />
          </div>
          <TextArea
            {...form.field('containment')}
            label="Containment"
            hint="How the parts are kept safe until the conditions are met"
            rows={2}
          />
          <ConditionsField
            value={form.values.conditions}
            onChange={(conditions) => form.set('conditions', conditions)}
            errorOf={form.errorOf}
            idOf={form.idOf}
          />
        </>
      )}
      {(outcome === 'rejected' || outcome === 'sent-back') && (
        <ReasonsField
          submissionId={submissionId}
          value={form.values.reasons}
          onChange={(reasons) => form.set('reasons', reasons)}
          errorOf={form.errorOf}
          idOf={form.idOf}
        />
      )}
      <TextArea
        {...form.field('comment')}
        label="Comment to the supplier"
        optional={outcome !== 'sent-back'}
        rows={3}
      />
      <section aria-label="Statement" className="border-l-4 border-marking bg-sheet px-4 py-3">
        <p className="caption">Signed statement</p>
        <p className="max-w-prose">{draft.statement[outcome]}</p>
      </section>
      <div className="flex flex-wrap items-end gap-3">
        <TextField
          {...form.field('password')}
          label="Your password"
          type="password"
          autoComplete="current-password"
        />
        <Button type="submit" weight="primary" busy={form.busy} disabled={blockers.length > 0}>
          Sign: {outcomeWords[outcome].toLowerCase()}
        </Button>
      </div>
    </form>
  );
}
