/**
 * The answer of a calculation that cannot be done: a reason a person can read and a code a program can test.
 * Every exported function returns its result or this, never NaN and never a silent zero.
 */
export interface Undetermined {
  readonly undetermined: true;
  /** One sentence, without a full stop at the end, that says what is wrong and how to mend it. */
  readonly reason: string;
  /** Stable kebab-case name of the reason, e.g. `too-few` or `not-finite`. */
  readonly code: string;
}

/** Builds an undetermined answer. */
export function undetermined(code: string, reason: string): Undetermined {
  return { undetermined: true, reason, code };
}

/** Tells an undetermined answer from a result, whatever the type of the result. */
export function isUndetermined(value: unknown): value is Undetermined {
  return (
    typeof value === 'object' && value !== null && (value as Partial<Undetermined>).undetermined === true
  );
}
