import { absolute, compareDecimals, formatDecimal, subtractDecimals } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { roundDecimal } from '../decimal/round-decimal.ts';
import { compileLimits, SIMPLE_ACCEPTANCE } from './compile-limits.ts';
import type { CompiledLimits, DecisionRule, Zone } from './compile-limits.ts';
import type { Limits } from './limits.ts';
import type { Verdict } from './verdict.ts';

/** The verdict on one reading with everything a screen shows beside it. */
export interface ReadingJudgement {
  readonly verdict: Verdict;
  /** The reading as a plain decimal with the decimals it was given. */
  readonly value?: string;
  /** How far the reading (rounded where the rule rounds) lies beyond the nearest tolerance limit; above 0. */
  readonly deviationBeyond?: string;
  readonly beyond?: 'lower' | 'upper';
  /** The rounded reading, where the rule compares rounded readings. */
  readonly rounded?: string;
  readonly code?: string;
  readonly reason?: string;
  /** The party against whom an undecided reading counts (guard band only). */
  readonly countsAgainst?: 'supplier' | 'customer';
}

function inside(value: Decimal, zone: Zone): boolean {
  if (zone.low !== null) {
    const order = compareDecimals(value, zone.low.value);
    if (order < 0 || (order === 0 && !zone.low.inclusive)) return false;
  }
  if (zone.high !== null) {
    const order = compareDecimals(value, zone.high.value);
    if (order > 0 || (order === 0 && !zone.high.inclusive)) return false;
  }
  return true;
}

/** Exact verdict on a number already read. Without limits, or without an acceptance zone, nothing is accepted. */
export function classifyDecimal(value: Decimal, compiled: CompiledLimits): Exclude<Verdict, 'not-measured'> {
  if (!compiled.acceptEmpty && inside(value, compiled.accept)) return 'in-tolerance';
  return inside(value, compiled.possible) ? 'undecided' : 'out-of-tolerance';
}

function beyondLimit(value: Decimal, compiled: CompiledLimits): Partial<ReadingJudgement> {
  const { lower, upper } = compiled.limits;
  const below = lower !== null && compareDecimals(value, lower) < 0;
  const above = upper !== null && compareDecimals(value, upper) > 0;
  const limit = below ? lower : above ? upper : null;
  if (limit === null) return {};
  return {
    deviationBeyond: formatDecimal(absolute(subtractDecimals(value, limit))),
    beyond: below ? 'lower' : 'upper',
  };
}

function explainUndecided(value: Decimal, compiled: CompiledLimits): Partial<ReadingJudgement> {
  const { lower, upper, naturalLower, naturalUpper } = compiled.limits;
  if (lower === null && upper === null)
    return { code: 'no-limits', reason: 'There is no limit to judge against: the value is recorded only' };
  if (naturalLower !== null && compareDecimals(value, naturalLower) < 0)
    return {
      code: 'beyond-natural-bound',
      reason: `No value below ${formatDecimal(naturalLower)} can occur here: check the reading and the set-up`,
    };
  if (naturalUpper !== null && compareDecimals(value, naturalUpper) > 0)
    return {
      code: 'beyond-natural-bound',
      reason: `No value above ${formatDecimal(naturalUpper)} can occur here: check the reading and the set-up`,
    };
  const party = compiled.rule.kind === 'guard-band' ? compiled.rule.proves : 'supplier';
  return {
    code: 'within-uncertainty',
    countsAgainst: party,
    reason:
      party === 'supplier'
        ? 'Within the uncertainty of a limit: the supplier has not proved that the value conforms'
        : 'Within the uncertainty of a limit: the customer has not proved that the value does not conform',
  };
}

/** Judges a number already read; see `judgeReading`. */
export function judgeDecimal(value: Decimal, compiled: CompiledLimits): ReadingJudgement {
  const verdict = classifyDecimal(value, compiled);
  const { roundingPlaces } = compiled;
  const compared = roundingPlaces === null ? value : roundDecimal(value, roundingPlaces, 'half-even');
  return {
    verdict,
    value: formatDecimal(value),
    ...(roundingPlaces === null ? {} : { rounded: formatDecimal(compared) }),
    ...beyondLimit(compared, compiled),
    ...(verdict === 'undecided' ? explainUndecided(value, compiled) : {}),
  };
}

/**
 * Judges one reading, given as text, against limits already compiled; see `judgeReading`.
 */
export function judgeCompiled(text: string | null, compiled: CompiledLimits): ReadingJudgement {
  if (text === null) return { verdict: 'not-measured', code: 'missing', reason: 'No reading is entered' };
  const value = parseDecimal(text);
  if ('undetermined' in value) return { verdict: 'not-measured', code: value.code, reason: value.reason };
  return judgeDecimal(value, compiled);
}

/**
 * Judges one reading against its limits, exactly: reading and limits are decimal text and never pass through
 * binary floating point. A reading equal to a limit conforms, whatever zeros either is written with.
 *
 * Result: `in-tolerance`; `out-of-tolerance` with the distance beyond the limit; `undecided` with the reason (inside
 * the uncertainty of a limit under a guard band, beyond a natural bound, no limit, limits that cannot be read);
 * `not-measured` when the text is null or is no number, with the reason that says how to mend it.
 * Sources: ISO 14253-1 (decision rules), ASTM E29 clauses 5 and 6 (absolute and rounding method).
 */
export function judgeReading(
  text: string | null,
  limits: Limits,
  rule: DecisionRule = SIMPLE_ACCEPTANCE,
): ReadingJudgement {
  const compiled = compileLimits(limits, rule);
  return 'undetermined' in compiled
    ? { verdict: 'undecided', code: compiled.code, reason: compiled.reason }
    : judgeCompiled(text, compiled);
}

/** The band inside which a reading is accepted, as text, for drawing the guard bands; null on an open side. */
export function acceptanceLimits(compiled: CompiledLimits): { lower: string | null; upper: string | null } {
  const side = (bound: Zone['low']) => (bound === null ? null : formatDecimal(bound.value));
  return { lower: side(compiled.accept.low), upper: side(compiled.accept.high) };
}
