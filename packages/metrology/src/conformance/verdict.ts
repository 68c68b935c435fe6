import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** What can be said of one reading, one sample or one row against its band. */
export type Verdict = 'in-tolerance' | 'out-of-tolerance' | 'undecided' | 'not-measured';

/** The verdicts in the order of their codes 0 to 3, as `evaluateReadings` stores them in a byte each. */
export const VERDICTS: readonly Verdict[] = ['not-measured', 'in-tolerance', 'out-of-tolerance', 'undecided'];

/** Codes of the verdicts in a `Uint8Array`. */
export const VERDICT_CODE = { notMeasured: 0, inTolerance: 1, outOfTolerance: 2, undecided: 3 } as const;

/** The verdict of a stored code; a code outside 0 to 3 is not a measurement. */
export function verdictOfCode(code: number): Verdict {
  return VERDICTS[code] ?? 'not-measured';
}

const SEVERITY: Record<Verdict, number> = {
  'in-tolerance': 0,
  'not-measured': 1,
  undecided: 2,
  'out-of-tolerance': 3,
};

/**
 * The verdict a whole takes from its parts (readings of a row, rows of a part, streams of a tool): the worst.
 *
 * Order from worst: out of tolerance, undecided, not measured, in tolerance. A whole without parts is not measured.
 * Common practice: each cavity, spindle or line is judged by itself and the part takes the worst verdict.
 */
export function worstVerdict(verdicts: Iterable<Verdict>): Verdict {
  let worst: Verdict | null = null;
  for (const verdict of verdicts) if (worst === null || SEVERITY[verdict] > SEVERITY[worst]) worst = verdict;
  return worst ?? 'not-measured';
}

/** Pieces checked and pieces failed with a go/no-go gauge or by eye. */
export interface AttributeResult {
  readonly checked: number;
  readonly failed: number;
}

/** The verdict on an attribute row with what it was taken from. */
export interface AttributeJudgement {
  readonly verdict: Verdict;
  readonly method: 'attribute, no piece may fail';
  readonly n: number;
  readonly failed: number;
}

/**
 * Judges an attribute row: one failed piece fails the row; no piece checked is not measured.
 *
 * `checked` and `failed` are whole numbers with 0 ≤ failed ≤ checked; anything else is undetermined.
 * Common practice of part approval (a sample that qualifies a part has acceptance number 0).
 */
export function judgeAttribute(result: AttributeResult): AttributeJudgement | Undetermined {
  const { checked, failed } = result;
  if (!Number.isSafeInteger(checked) || !Number.isSafeInteger(failed) || checked < 0 || failed < 0)
    return undetermined(
      'not-a-count',
      'Pieces checked and pieces failed are whole numbers from 0: correct the entry',
    );
  if (failed > checked)
    return undetermined(
      'more-failed-than-checked',
      'More pieces failed than were checked: correct one of the two numbers',
    );
  const verdict: Verdict = checked === 0 ? 'not-measured' : failed > 0 ? 'out-of-tolerance' : 'in-tolerance';
  return { verdict, method: 'attribute, no piece may fail', n: checked, failed };
}
