import { useQueryClient } from '@tanstack/react-query';
import { saveRequestRequest, type RequestResponse } from '@trammel/shared/requests';
import { useCallback, useId, useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { ConflictNotice } from '../../../components/ui/conflict-notice.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { SaveState } from '../../../components/ui/save-state.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { draftKey } from '../../../lib/draft-storage.ts';
import { countOf, showDay } from '../../../lib/format.ts';
import { useSession } from '../../../lib/session.ts';
import { useAutosave } from '../../../lib/use-autosave.ts';
import { fieldErrorsOf, type FieldError } from '../../../lib/use-form.ts';
import { issueRequest, requestQuery, saveRequest } from '../api.ts';
import { bodyOf, refusalsOf, valuesOf, type RequestValues } from '../form-values.ts';
import { RequestFields } from './request-fields.tsx';
import { useRequestOptions } from './use-request-options.ts';
import { WithdrawButton } from './withdraw-button.tsx';

/** A draft that saves itself; what is not yet whole waits in the browser and says what is missing. */
export function DraftEditor({ request }: { request: RequestResponse }) {
  const options = useRequestOptions();
  const client = useQueryClient();
  const { user } = useSession();
  const prefix = useId();
  const [values, setValues] = useState(valuesOf(request));
  const [issuing, setIssuing] = useState(false);
  const [asked, setAsked] = useState(false);
  const [key] = useState(() => newIdempotencyKey());
  const set = useCallback(
    (change: Partial<RequestValues>) => setValues((now) => ({ ...now, ...change })),
    [],
  );

  const checked = saveRequestRequest.safeParse(bodyOf(values));
  const [lastWhole, setLastWhole] = useState(values);
  if (checked.success && JSON.stringify(lastWhole) !== JSON.stringify(values)) setLastWhole(values);

  const saving = useAutosave<RequestValues>({
    key: draftKey(user.id, `request.${request.id}`),
    initial: valuesOf(request),
    value: lastWhole,
    version: request.version,
    onRecover: setValues,
    save: async (value, version, { keepalive }) => {
      const saved = await saveRequest(
        request.id,
        version,
        saveRequestRequest.parse(bodyOf(value)),
        keepalive,
      );
      client.setQueryData(requestQuery(request.id).queryKey, saved);
      return saved;
    },
  });
  const theirs = saving.conflict?.theirs as RequestResponse | undefined;
  const missing: FieldError[] = checked.success ? [] : refusalsOf(checked.error.issues);
  const refused = saving.problem ? fieldErrorsOf(saving.problem) : [];
  const errors = [...missing, ...refused];
  const idOf = (field: string) => `${prefix}${field}`;
  const current = () => client.getQueryData(requestQuery(request.id).queryKey) ?? request;

  const ask = async () => {
    setAsked(true);
    await saving.flush();
    if (errors.length === 0) setIssuing(true);
  };

  return (
    <div className="flex flex-col gap-5">
      {theirs && saving.conflict && (
        <ConflictNotice
          what="This draft"
          mine={<Summary values={saving.conflict.mine} />}
          theirs={<Summary values={valuesOf(theirs)} />}
          onKeepMine={() =>
            setValues(saving.resolve('mine', { value: valuesOf(theirs), version: theirs.version }))
          }
          onTakeTheirs={() =>
            setValues(saving.resolve('theirs', { value: valuesOf(theirs), version: theirs.version }))
          }
        />
      )}
      {asked && <ErrorSummary errors={errors} idOf={idOf} />}
      <RequestFields
        values={values}
        set={set}
        idOf={idOf}
        errorOf={(field) =>
          errors.find((error) => error.field === field || error.field.startsWith(`${field}.`))?.message
        }
        options={options}
      />
      <div className="flex flex-wrap items-center gap-3 border-t border-rule pt-4">
        <Button weight="primary" onClick={() => void ask()}>
          Issue the request
        </Button>
        <WithdrawButton request={request} />
        {missing.length > 0 ? (
          <span role="status" className="text-vermilion">
            Not saved: {countOf(missing.length, 'entry is', 'entries are')} missing or wrong
          </span>
        ) : (
          <SaveState state={saving.state} savedAt={saving.savedAt} onRetry={saving.retryNow} />
        )}
      </div>
      <ConfirmDialog
        open={issuing}
        onClose={() => setIssuing(false)}
        title={`Issue request ${request.number} for ${request.part.number} rev ${request.revision.code}?`}
        consequence={`${request.supplier.name} is told by mail and sees the request with its drawing. It can be withdrawn afterwards, not changed. Due ${showDay(values.dueOn === '' ? request.dueOn : values.dueOn)}.`}
        confirmLabel="Issue the request"
        onConfirm={async () => {
          const issued = await issueRequest(current(), key);
          client.setQueryData(requestQuery(request.id).queryKey, issued);
          await client.invalidateQueries({ queryKey: ['requests'] });
        }}
      />
    </div>
  );
}

function Summary({ values }: { values: RequestValues }) {
  return (
    <p>
      Due {values.dueOn}, level {values.level}, {values.piecesPerStream} pieces from{' '}
      {values.streams.replaceAll('\n', ', ')}
      {values.message !== '' && `; ${values.message}`}
    </p>
  );
}
