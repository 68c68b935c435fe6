import { decimalOf, formatDecimal, powerOfTen } from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { ratio, ratioToDecimal } from '../decimal/ratio.ts';
import type { Ratio } from '../decimal/ratio.ts';
import { divideRounded } from '../decimal/round-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { UNITS } from './unit-table.ts';
import type { Unit } from './unit-table.ts';

const exactNames = new Map<string, Unit>();
const looseNames = new Map<string, Unit | null>();

for (const unit of UNITS) {
  for (const name of [unit.symbol, ...unit.aliases]) exactNames.set(name, unit);
  for (const name of [unit.symbol, unit.name, ...unit.aliases]) {
    const key = name.toLowerCase();
    const known = looseNames.get(key);
    looseNames.set(key, known === undefined || known === unit ? unit : null);
  }
}

/**
 * Finds a unit by symbol or alias ("mm", "inch", "um", "°"). Case is heeded first, because mN·m and MN·m differ;
 * another case is accepted only where it can mean one unit.
 */
export function findUnit(text: string): Unit | Undetermined {
  const name = text.trim();
  const found = exactNames.get(name) ?? looseNames.get(name.toLowerCase());
  if (found) return found;
  const shown = name.length > 24 ? `${name.slice(0, 24)}…` : name;
  return found === null
    ? undetermined('ambiguous-unit', `The unit "${shown}" can mean more than one: write its symbol exactly`)
    : undetermined('unknown-unit', `The unit "${shown}" is not known: choose one from the list`);
}

/** A converted number: exact, or rounded to the places asked for and marked so. */
export interface Conversion {
  readonly text: string;
  readonly value: Decimal;
  readonly exact: boolean;
  readonly from: string;
  readonly to: string;
}

function pair(from: string, to: string): { source: Unit; target: Unit } | Undetermined {
  const source = findUnit(from);
  if ('undetermined' in source) return source;
  const target = findUnit(to);
  if ('undetermined' in target) return target;
  if (source.dimension === target.dimension) return { source, target };
  const [first, second] = [source.dimension, target.dimension];
  if (first.startsWith('hardness') && second.startsWith('hardness'))
    return undetermined(
      'hardness-scales',
      `${source.symbol} does not convert to ${target.symbol}: hardness scales have no common factor, measure in the scale of the drawing`,
    );
  if ([first, second].includes('radian') && [first, second].includes('angle'))
    return undetermined(
      'irrational-factor',
      `${source.symbol} does not convert exactly to ${target.symbol}: the factor contains π, state the limits in the unit of the readings`,
    );
  return undetermined(
    'different-quantities',
    `${source.symbol} does not convert to ${target.symbol}: they measure different things`,
  );
}

function convertRatio(value: Decimal, source: Unit, target: Unit): Ratio {
  const scale = powerOfTen(value.scale);
  const base = {
    numerator:
      value.digits * source.factor.numerator * source.offset.denominator +
      source.offset.numerator * scale * source.factor.denominator,
    denominator: scale * source.factor.denominator * source.offset.denominator,
  };
  return ratio(
    (base.numerator * target.offset.denominator - target.offset.numerator * base.denominator) *
      target.factor.denominator,
    base.denominator * target.offset.denominator * target.factor.numerator,
  );
}

/**
 * Converts a decimal number between units of one quantity, exactly: result = (value · f₁ + o₁ − o₂) / f₂ in integers.
 *
 * The result keeps at least the decimals of the entry ("1.000" in is "25.4000" mm: a thousandth of an inch is told
 * apart there). Where the decimals never end (1 mm in inches) the answer is undetermined, unless `places` is given:
 * then it is rounded half to even in one step and `exact` is false; such a number is for display, not for a verdict.
 * Hardness scales, degrees against radians and unlike quantities are refused with the reason.
 * Source of the factors: NIST SP 811 (2008) appendix B; 1 in = 25.4 mm exactly.
 */
export function convertDecimal(
  text: string,
  from: string,
  to: string,
  options: { readonly places?: number } = {},
): Conversion | Undetermined {
  const value = parseDecimal(text);
  if ('undetermined' in value) return value;
  const units = pair(from, to);
  if ('undetermined' in units) return units;
  const { source, target } = units;
  const answer = { from: source.symbol, to: target.symbol };
  if (source === target) return { text: formatDecimal(value), value, exact: true, ...answer };
  const result = convertRatio(value, source, target);
  const exact = ratioToDecimal(result, value.scale);
  if (exact !== null) return { text: formatDecimal(exact), value: exact, exact: true, ...answer };
  if (options.places === undefined)
    return undetermined(
      'endless-decimals',
      `${formatDecimal(value)} ${source.symbol} has no exact decimal value in the unit ${target.name}: judge in ${source.symbol}`,
    );
  const digits = divideRounded(
    result.numerator * powerOfTen(options.places),
    result.denominator,
    'half-even',
  );
  const rounded = decimalOf(digits, options.places);
  return { text: formatDecimal(rounded), value: rounded, exact: false, ...answer };
}
