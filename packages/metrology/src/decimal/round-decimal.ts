import { digitsAtScale, powerOfTen } from './decimal.ts';
import type { Decimal } from './decimal.ts';

/**
 * What happens to a rest. `half-even`: nearest, a tie to the even digit (ISO 80000-1 annex B rule A, ASTM E29).
 * `half-up`: nearest, a tie to the greater magnitude (ISO 80000-1 annex B rule B). `half-down`: nearest, a tie to
 * the smaller magnitude. `up`/`down`: away from / towards zero. `ceiling`/`floor`: towards +∞ / −∞.
 */
export type RoundingMode = 'half-even' | 'half-up' | 'half-down' | 'up' | 'down' | 'ceiling' | 'floor';

/** Integer quotient numerator / denominator (denominator > 0) rounded in one step. */
export function divideRounded(numerator: bigint, denominator: bigint, mode: RoundingMode): bigint {
  const negative = numerator < 0n;
  const magnitude = negative ? -numerator : numerator;
  const quotient = magnitude / denominator;
  const rest = magnitude % denominator;
  const twice = rest * 2n;
  let away = false;
  if (rest !== 0n) {
    switch (mode) {
      case 'up':
        away = true;
        break;
      case 'down':
        break;
      case 'ceiling':
        away = !negative;
        break;
      case 'floor':
        away = negative;
        break;
      case 'half-up':
        away = twice >= denominator;
        break;
      case 'half-down':
        away = twice > denominator;
        break;
      case 'half-even':
        away = twice > denominator || (twice === denominator && quotient % 2n === 1n);
    }
  }
  const result = away ? quotient + 1n : quotient;
  return negative ? -result : result;
}

/**
 * Rounds in one step to `places` decimals; negative places round to tens, hundreds, …
 *
 * The result has exactly `places` decimals (2.5 to two places is 2.50), none when places ≤ 0.
 * Source: ISO 80000-1:2009 annex B (rules A and B); ASTM E29 section 6.4 for half to even.
 * Never round twice: 12.2549 to one decimal is 12.3, and 12.25 on the way would have made it 12.2.
 */
export function roundDecimal(d: Decimal, places: number, mode: RoundingMode = 'half-even'): Decimal {
  if (places >= d.scale) return { digits: digitsAtScale(d, places), scale: places };
  const quotient = divideRounded(d.digits, powerOfTen(d.scale - places), mode);
  return places >= 0
    ? { digits: quotient, scale: places }
    : { digits: quotient * powerOfTen(-places), scale: 0 };
}
