import { useId, useState, type FormEvent } from 'react';
import { ApiProblem, reasonOf } from './api-problem.ts';

export interface FieldError {
  /** Dotted path of the value: `name`, `conditions.0.owner`. */
  field: string;
  message: string;
  /** What the field is called on the page. */
  label?: string;
}

interface FormSchema<Out> {
  safeParse(
    value: unknown,
  ):
    | { success: true; data: Out }
    | { success: false; error: { issues: readonly { path: readonly PropertyKey[]; message: string }[] } };
}

export interface FormOptions<Values extends object, Out> {
  initial: Values;
  schema: FormSchema<Out>;
  /** Gets what was typed after the schema has passed it; throws what the server refuses. */
  onSubmit: (values: Values, parsed: Out) => Promise<unknown>;
}

export interface Form<Values extends object> {
  values: Values;
  set: <Key extends keyof Values & string>(key: Key, value: Values[Key]) => void;
  setAll: (values: Values) => void;
  /** Spread into a field of the kit. */
  field: <Key extends keyof Values & string>(
    key: Key,
  ) => {
    id: string;
    name: Key;
    value: Values[Key];
    onChange: (value: Values[Key]) => void;
    error: string | undefined;
  };
  errorOf: (path: string) => string | undefined;
  idOf: (path: string) => string;
  /** For `ErrorSummary`. */
  errors: FieldError[];
  /** What the server said that belongs to no field. */
  failure: string | null;
  busy: boolean;
  submit: (event?: FormEvent) => Promise<void>;
}

/** A form that keeps what was typed, checks it by the contract's schema, and puts each refusal beside its field. */
export function useForm<Values extends object, Out>(options: FormOptions<Values, Out>): Form<Values> {
  const prefix = useId();
  const [values, setAll] = useState(options.initial);
  const [errors, setErrors] = useState<FieldError[]>([]);
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const idOf = (path: string) => `${prefix}${path}`;
  const errorOf = (path: string) => errors.find((error) => error.field === path)?.message;
  const set: Form<Values>['set'] = (key, value) => {
    setAll((before) => ({ ...before, [key]: value }));
    setErrors((before) =>
      before.filter((error) => error.field !== key && !error.field.startsWith(`${key}.`)),
    );
  };

  // Read from the page at the moment of refusal: the summary then calls a field what the person sees it called.
  const named = (list: FieldError[]) => list.map((error) => ({ ...error, ...labelOf(idOf(error.field)) }));

  const submit = async (event?: FormEvent) => {
    event?.preventDefault();
    if (busy) return;
    setFailure(null);
    const checked = options.schema.safeParse(values);
    if (!checked.success) {
      const refused = checked.error.issues.map((issue) => ({
        field: issue.path.join('.'),
        message: issue.message,
      }));
      setErrors(named(firstOfEach(refused)));
      return;
    }
    setErrors([]);
    setBusy(true);
    try {
      await options.onSubmit(values, checked.data);
    } catch (error) {
      const refused = error instanceof ApiProblem ? fieldErrorsOf(error) : [];
      setErrors(named(refused));
      if (refused.length === 0) setFailure(reasonOf(error));
    } finally {
      setBusy(false);
    }
  };

  return {
    values,
    set,
    setAll,
    field: (key) => ({
      id: idOf(key),
      name: key,
      value: values[key],
      onChange: (value) => set(key, value),
      error: errorOf(key),
    }),
    errorOf,
    idOf,
    errors,
    failure,
    busy,
    submit,
  };
}

/** The refusals of a 422, by the dotted path of their JSON pointer. */
export function fieldErrorsOf(problem: ApiProblem): FieldError[] {
  const refused = (problem.problem.errors ?? []).map(({ pointer, detail }) => ({
    field: pointer
      .replace(/^#?\/?(?:body\/)?/, '')
      .split('/')
      .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
      .join('.'),
    message: detail,
  }));
  return firstOfEach(refused);
}

function firstOfEach(errors: FieldError[]): FieldError[] {
  return errors.filter((error, index) => errors.findIndex((other) => other.field === error.field) === index);
}

function labelOf(id: string): { label?: string } {
  const control = document.getElementById(id);
  const isControl =
    control instanceof HTMLInputElement ||
    control instanceof HTMLSelectElement ||
    control instanceof HTMLTextAreaElement;
  const label = isControl ? control.labels?.[0] : control?.querySelector('legend');
  const text = label?.firstChild?.textContent?.trim() ?? '';
  return text === '' ? {} : { label: text };
}
