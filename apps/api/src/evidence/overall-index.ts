import { minimumLowerBound, normalIndices } from '@trammel/metrology/capability';
import { isUndetermined } from '@trammel/metrology';
import { parseDecimal, toNumber } from '@trammel/metrology/decimal';
import type { CheckedRow } from '@trammel/shared/checks';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import type { RowEvaluation } from './evaluate-row.ts';

/** Below this an index says more about luck than about the process (common practice: an initial study takes at least 30, better 100). */
const fewest = 30;

/** Overall index of a row from its sample pieces. Stability is not shown by a sample, so it is Ppk and never capability. */
export function overallIndex(
  facts: CharacteristicFacts,
  row: RowEvaluation,
): Pick<CheckedRow, 'index' | 'indexReason'> {
  const none = (indexReason: string | null) => ({ index: null, indexReason });
  const { mean, standardDeviation, n } = row;
  if (row.verdict === 'no-verdict' || mean === null) return none(null);
  if (facts.geometric !== null && facts.geometric.modifier !== 'RFS') {
    return none('The limit moves with each piece’s own size, so one index would not be true.');
  }
  if (n < fewest) return none(`${n} readings are too few for an index; ${fewest} are the least.`);
  if (facts.naturalLower) {
    return none('Bounded by zero: the normal formula would flatter it; a process study names the method.');
  }
  if (standardDeviation === null || standardDeviation === 0) return none('The readings do not vary.');
  const [lower, upper] = [numberOf(facts.lowerLimit), numberOf(facts.upperLimit)];
  if (lower === undefined && upper === undefined) return none('No limit to set the spread against.');
  const limits = { ...(lower === undefined ? {} : { lower }), ...(upper === undefined ? {} : { upper }) };
  const indices = normalIndices(mean, standardDeviation, limits, 'overall');
  if (isUndetermined(indices)) return none(indices.reason);
  const bound = minimumLowerBound(indices.minimum, n);
  return {
    index: { name: 'Ppk', value: indices.minimum, lowerBound: isUndetermined(bound) ? null : bound.lower, n },
    indexReason: null,
  };
}

function numberOf(text: string | null): number | undefined {
  const value = text === null ? null : parseDecimal(text);
  return value === null || isUndetermined(value) ? undefined : toNumber(value);
}
