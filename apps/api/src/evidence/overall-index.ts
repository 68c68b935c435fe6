import { toNumber, parseDecimal } from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import { normalQuantile } from '@trammel/metrology/distributions';
import type { CheckedRow } from '@trammel/shared/checks';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import type { RowEvaluation } from './evaluate-row.ts';

/** Below this an index says more about luck than about the process (common practice: an initial study takes at least 30, better 100). */
const fewest = 30;

/**
 * Overall index of a row from its sample pieces: Ppk = min((USL − mean), (mean − LSL)) / 3 s, with a one-sided 95 %
 * lower bound in the normal approximation Ppk − z·√(1/(9n) + Ppk²/(2(n − 1))). A zero bound set by nature is no limit.
 * Stability is not shown by a sample, so the name is Ppk and never capability.
 */
export function overallIndex(
  facts: CharacteristicFacts,
  row: RowEvaluation,
): Pick<CheckedRow, 'index' | 'indexReason'> {
  const none = (indexReason: string | null) => ({ index: null, indexReason });
  if (row.verdict === 'no-verdict' || row.mean === null) return none(null);
  if (facts.kind === 'geometric' && facts.geometric !== null && facts.geometric.modifier !== 'RFS') {
    return none('The limit moves with each piece’s own size, so one index would not be true.');
  }
  if (row.n < fewest) return none(`${row.n} readings are too few for an index; ${fewest} are the least.`);
  if (facts.naturalLower)
    return none('Bounded by zero: the normal formula would flatter it; a process study names the method.');
  const { mean, standardDeviation: s, n } = row;
  if (mean === null || s === null || s === 0) return none('The readings do not vary.');
  const side = (text: string | null) => {
    const value = text === null ? null : parseDecimal(text);
    return value === null || isUndetermined(value) ? null : toNumber(value);
  };
  const lower = side(facts.lowerLimit);
  const upper = side(facts.upperLimit);
  if (lower === null && upper === null) return none('No limit to set the spread against.');
  const value = Math.min(
    upper === null ? Infinity : (upper - mean) / (3 * s),
    lower === null ? Infinity : (mean - lower) / (3 * s),
  );
  const z = normalQuantile(0.95);
  const lowerBound = isUndetermined(z)
    ? null
    : value - z * Math.sqrt(1 / (9 * n) + (value * value) / (2 * (n - 1)));
  return { index: { name: 'Ppk', value, lowerBound, n }, indexReason: null };
}
