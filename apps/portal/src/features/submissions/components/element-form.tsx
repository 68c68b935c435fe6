import { useQueryClient } from '@tanstack/react-query';
import type { ChangeElementRequest, ElementResponse, SubmissionResponse } from '@trammel/shared/submissions';
import { useState } from 'react';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import { ConflictNotice } from '../../../components/ui/conflict-notice.tsx';
import { SaveState } from '../../../components/ui/save-state.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { draftKey } from '../../../lib/draft-storage.ts';
import { useSession } from '../../../lib/session.ts';
import { useAutosave } from '../../../lib/use-autosave.ts';
import { fieldErrorsOf } from '../../../lib/use-form.ts';
import { changeElement, elementsQuery, submissionQuery } from '../api.ts';
import { elementStateWords } from '../words.ts';

type Facts = Required<ChangeElementRequest>;

const factsOf = (element: ElementResponse): Facts => ({
  state: element.state,
  reason: element.reason,
  statedPart: element.statedPart,
  statedRevision: element.statedRevision,
  dated: element.dated,
  note: element.note,
});

/** Remounts when files moved the element on by themselves, so that the form starts from what stands there. */
export function ElementForm(props: { element: ElementResponse; submission: SubmissionResponse }) {
  const files = props.element.files.map((file) => file.id).join();
  return <Fields key={files} {...props} />;
}

function Fields({ element, submission }: { element: ElementResponse; submission: SubmissionResponse }) {
  const client = useQueryClient();
  const { user } = useSession();
  const [facts, setFacts] = useState(factsOf(element));
  const set = (change: Partial<Facts>) => setFacts((now) => ({ ...now, ...change }));

  const saving = useAutosave<Facts>({
    key: draftKey(user.id, `element.${element.id}`),
    initial: factsOf(element),
    value: facts,
    version: element.version,
    onRecover: setFacts,
    save: async (value, version, { keepalive }) => {
      const saved = await changeElement(element, version, value, keepalive);
      client.setQueryData(
        elementsQuery(submission.id).queryKey,
        (now) => now && { items: now.items.map((one) => (one.id === saved.id ? saved : one)) },
      );
      void client.invalidateQueries({ queryKey: submissionQuery(submission.id).queryKey });
      return saved;
    },
  });
  const errors = saving.problem === null ? [] : fieldErrorsOf(saving.problem);
  const errorOf = (field: string) => errors.find((error) => error.field === field)?.message;
  const theirs = saving.conflict?.theirs as ElementResponse | undefined;
  const id = (name: string) => `element-${element.id}-${name}`;

  return (
    <div className="flex flex-col gap-3">
      {theirs && saving.conflict && (
        <ConflictNotice
          what={element.label}
          mine={<Summary facts={saving.conflict.mine} />}
          theirs={<Summary facts={factsOf(theirs)} />}
          onKeepMine={() =>
            setFacts(saving.resolve('mine', { value: factsOf(theirs), version: theirs.version }))
          }
          onTakeTheirs={() =>
            setFacts(saving.resolve('theirs', { value: factsOf(theirs), version: theirs.version }))
          }
        />
      )}
      {!element.derived && (
        <RadioGroup
          id={id('state')}
          name="state"
          label="How it is met"
          inline
          error={errorOf('state')}
          value={facts.state}
          onChange={(state) => set({ state })}
          options={[
            { value: 'open', label: elementStateWords.open },
            { value: 'submitted', label: elementStateWords.submitted },
            { value: 'kept-at-supplier', label: elementStateWords['kept-at-supplier'] },
            { value: 'not-applicable', label: elementStateWords['not-applicable'] },
          ]}
        />
      )}
      {(facts.state === 'not-applicable' || facts.state === 'kept-at-supplier') && (
        <TextArea
          id={id('reason')}
          label="Reason"
          hint="The reviewer reads it and accepts or refuses it."
          rows={2}
          error={errorOf('reason')}
          value={facts.reason}
          onChange={(reason) => set({ reason })}
        />
      )}
      <div className="grid gap-3 sm:grid-cols-3">
        <TextField
          id={id('statedPart')}
          label="Part number stated in it"
          mono
          optional
          hint={differs(facts.statedPart, submission.part.number)}
          error={errorOf('statedPart')}
          value={facts.statedPart}
          onChange={(statedPart) => set({ statedPart })}
        />
        <TextField
          id={id('statedRevision')}
          label="Revision stated in it"
          mono
          optional
          hint={differs(facts.statedRevision, submission.revision.code)}
          error={errorOf('statedRevision')}
          value={facts.statedRevision}
          onChange={(statedRevision) => set({ statedRevision })}
        />
        <DateField
          id={id('dated')}
          label="Dated"
          optional
          error={errorOf('dated')}
          value={facts.dated ?? ''}
          onChange={(dated) => set({ dated: dated === '' ? null : dated })}
        />
      </div>
      <TextArea
        id={id('note')}
        label="Note"
        optional
        rows={2}
        error={errorOf('note')}
        value={facts.note}
        onChange={(note) => set({ note })}
      />
      <SaveState state={saving.state} savedAt={saving.savedAt} onRetry={saving.retryNow} />
    </div>
  );
}

function differs(stated: string, asked: string): string | undefined {
  return stated !== '' && stated !== asked ? `Differs from the package: ${asked}` : undefined;
}

function Summary({ facts }: { facts: Facts }) {
  return (
    <p>
      {elementStateWords[facts.state]}
      {facts.reason !== '' && `, ${facts.reason}`}
      {facts.note !== '' && `; ${facts.note}`}
    </p>
  );
}
