import { useQueryClient } from '@tanstack/react-query';
import { saveRequestRequest } from '@trammel/shared/requests';
import { useCallback, useEffect, useId, useState, type FormEvent } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { ApiProblem, reasonOf } from '../../../lib/api-problem.ts';
import { draftKey, dropDraft, readDraft, writeDraft } from '../../../lib/draft-storage.ts';
import { paths } from '../../../lib/paths.ts';
import { useSession } from '../../../lib/session.ts';
import { fieldErrorsOf, type FieldError } from '../../../lib/use-form.ts';
import { createRequest, requestQuery } from '../api.ts';
import { bodyOf, emptyRequest, refusalsOf, type RequestValues } from '../form-values.ts';
import { RequestFields } from './request-fields.tsx';
import { useRequestOptions } from './use-request-options.ts';

/** A request before its first save: kept in the browser until it is whole enough for the server. */
export function NewRequest() {
  const options = useRequestOptions();
  const client = useQueryClient();
  const navigate = useNavigate();
  const { user } = useSession();
  const [search] = useSearchParams();
  const prefix = useId();
  const key = draftKey(user.id, 'request.new');
  const [recovered] = useState(() => readDraft<RequestValues>(key)?.value ?? null);
  const start: RequestValues = {
    ...emptyRequest,
    partId: search.get('part') ?? '',
    elements: options.template.find((one) => one.level === emptyRequest.level)?.elements ?? [],
    reviewerIds: options.reviewers.some((person) => person.id === user.id) ? [user.id] : [],
  };
  const [values, setValues] = useState<RequestValues>(recovered ?? start);
  const [errors, setErrors] = useState<FieldError[]>([]);
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const [touched, setTouched] = useState(recovered !== null);

  useEffect(() => {
    if (touched) writeDraft(key, { value: values, version: 0, at: new Date().toISOString() });
  }, [key, values, touched]);

  const set = useCallback((change: Partial<RequestValues>) => {
    setTouched(true);
    setValues((now) => ({ ...now, ...change }));
    setErrors((now) => now.filter((error) => !((error.field.split('.')[0] ?? '') in change)));
  }, []);

  const save = async (event?: FormEvent) => {
    event?.preventDefault();
    if (busy) return;
    setFailure(null);
    const checked = saveRequestRequest.safeParse(bodyOf(values));
    if (!checked.success) {
      setErrors(refusalsOf(checked.error.issues));
      return;
    }
    setErrors([]);
    setBusy(true);
    try {
      const request = await createRequest(checked.data);
      dropDraft(key);
      client.setQueryData(requestQuery(request.id).queryKey, request);
      void client.invalidateQueries({ queryKey: ['requests', 'list'] });
      void navigate(paths.request(request.id), { replace: true });
    } catch (error) {
      const refused = error instanceof ApiProblem ? fieldErrorsOf(error) : [];
      setErrors(refused);
      if (refused.length === 0) setFailure(reasonOf(error));
      setBusy(false);
    }
  };

  const idOf = (field: string) => `${prefix}${field}`;
  return (
    <form noValidate className="flex flex-col gap-5" onSubmit={(event) => void save(event)}>
      <ErrorSummary errors={errors} idOf={idOf} failure={failure} />
      {recovered && (
        <Notice
          title="What you typed last time is here again"
          actions={
            <Button
              onClick={() => {
                dropDraft(key);
                setTouched(false);
                setValues(start);
              }}
            >
              Start with an empty request
            </Button>
          }
        />
      )}
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
        <Button type="submit" weight="primary" busy={busy} busyLabel="Saving…">
          Save the draft
        </Button>
        <p className="text-pencil">
          {touched ? 'Kept in this browser until it is saved. ' : ''}The supplier sees nothing before you
          issue it.
        </p>
      </div>
    </form>
  );
}
