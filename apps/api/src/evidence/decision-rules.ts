import {
  compileLimits,
  type CompiledLimits,
  type DecisionRule as MetrologyRule,
} from '@trammel/metrology/conformance';
import { formatDecimal, multiplyDecimals, parseDecimal, subtractDecimals } from '@trammel/metrology/decimal';
import { isUndetermined, type Undetermined } from '@trammel/metrology';
import type { DecisionRule } from '@trammel/shared/requests';
import type { CharacteristicFacts } from './characteristic-facts.ts';

const hundredth = { digits: 1n, scale: 2 };

/**
 * Expanded uncertainty as the agreed share of the tolerance; a one-sided row with a natural zero takes the limit
 * itself as the width. Null where no width exists, so that no guard band can be drawn.
 */
export function expandedUncertainty(facts: CharacteristicFacts, percent: string): string | null {
  const upper = facts.upperLimit === null ? null : parseDecimal(facts.upperLimit);
  const lowerText = facts.lowerLimit ?? (facts.naturalLower ? '0' : null);
  const lower = lowerText === null ? null : parseDecimal(lowerText);
  const share = parseDecimal(percent);
  if (upper === null || lower === null) return null;
  if (isUndetermined(upper) || isUndetermined(lower) || isUndetermined(share)) return null;
  return formatDecimal(multiplyDecimals(multiplyDecimals(subtractDecimals(upper, lower), share), hundredth));
}

/** The rule a row is judged by: what was agreed for the request, and the drawing's rounding rule. */
export function ruleFor(
  facts: CharacteristicFacts,
  agreed: DecisionRule,
  rounding: 'absolute' | 'astm-e29',
): MetrologyRule {
  if (agreed.kind === 'guard-band') {
    const uncertainty = expandedUncertainty(facts, agreed.uncertaintyPercentOfTolerance);
    if (uncertainty !== null)
      return { kind: 'guard-band', expandedUncertainty: uncertainty, proves: agreed.proves };
  }
  return rounding === 'astm-e29'
    ? { kind: 'simple', rounding: 'e29', decimals: facts.decimals }
    : { kind: 'simple' };
}

export function limitsOf(facts: Pick<CharacteristicFacts, 'lowerLimit' | 'upperLimit' | 'naturalLower'>) {
  return {
    lower: facts.lowerLimit ?? (facts.naturalLower ? '0' : null),
    upper: facts.upperLimit,
    naturalLower: facts.naturalLower && facts.lowerLimit === null,
  };
}

export function compileFor(
  facts: CharacteristicFacts,
  agreed: DecisionRule,
  rounding: 'absolute' | 'astm-e29',
): CompiledLimits | Undetermined {
  return compileLimits(limitsOf(facts), ruleFor(facts, agreed, rounding));
}
