import {
  addDecimals,
  compareDecimals,
  formatDecimal,
  powerOfTen,
  subtractDecimals,
} from '../decimal/decimal.ts';
import type { Decimal } from '../decimal/decimal.ts';
import { parseDecimal } from '../decimal/parse-decimal.ts';
import { divideRounded } from '../decimal/round-decimal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { GeneralClass } from '../tables/iso2768-tables.ts';
import { fitClassLimits } from './fit-class.ts';
import { generalTolerance } from './general-tolerances.ts';
import type { GeneralFeature } from './general-tolerances.ts';
import type { Limits } from './limits.ts';

/** How a drawing states a tolerance. All numbers are decimal text in the unit of the characteristic. */
export type ToleranceSpec =
  | { readonly form: 'symmetric'; readonly nominal: string; readonly tolerance: string }
  | { readonly form: 'deviations'; readonly nominal: string; readonly upper: string; readonly lower: string }
  | { readonly form: 'limits'; readonly lower: string; readonly upper: string; readonly nominal?: string }
  | { readonly form: 'max'; readonly upper: string; readonly naturalZero?: boolean }
  | { readonly form: 'min'; readonly lower: string }
  | { readonly form: 'fit'; readonly nominal: string; readonly fitClass: string }
  | {
      readonly form: 'general';
      /** Millimetres; for an angle degrees. */
      readonly nominal: string;
      readonly generalClass: GeneralClass;
      readonly feature: GeneralFeature;
      /** Length of the shorter leg of an angle in mm: the table of angles is entered with it. */
      readonly shorterLeg?: string;
    }
  | { readonly form: 'none'; readonly nominal?: string };

/** Limits with the nominal they belong to and a line that says where they come from. */
export interface ToleranceLimits extends Limits {
  readonly nominal: string | null;
  readonly explanation: string;
}

type Named = readonly [name: string, text: string];

function readAll(entries: readonly Named[]): Decimal[] | Undetermined {
  const values: Decimal[] = [];
  for (const [name, text] of entries) {
    const value = parseDecimal(text);
    if ('undetermined' in value) return undetermined(value.code, `${name} cannot be read. ${value.reason}`);
    values.push(value);
  }
  return values;
}

function band(nominal: Decimal, lower: Decimal, upper: Decimal, explanation: string): ToleranceLimits {
  return {
    lower: formatDecimal(addDecimals(nominal, lower)),
    upper: formatDecimal(addDecimals(nominal, upper)),
    nominal: formatDecimal(nominal),
    explanation,
  };
}

function signed(d: Decimal): string {
  return d.digits > 0n ? `+${formatDecimal(d)}` : formatDecimal(d);
}

function even(a: Decimal, b: Decimal): [Decimal, Decimal] {
  const scale = Math.max(a.scale, b.scale);
  const raise = (d: Decimal) => ({ digits: d.digits * powerOfTen(scale - d.scale), scale });
  return [raise(a), raise(b)];
}

function symmetric(nominal: string, tolerance: string): ToleranceLimits | Undetermined {
  const values = readAll([
    ['The nominal size', nominal],
    ['The tolerance', tolerance],
  ]);
  if (!Array.isArray(values)) return values;
  const [middle, width] = values as [Decimal, Decimal];
  if (width.digits < 0n)
    return undetermined('tolerance-negative', 'The tolerance after ± is negative: enter it without a sign');
  const minus = { digits: -width.digits, scale: width.scale };
  return band(middle, minus, width, `${formatDecimal(middle)} ± ${formatDecimal(width)}`);
}

function deviations(nominal: string, lower: string, upper: string): ToleranceLimits | Undetermined {
  const values = readAll([
    ['The nominal size', nominal],
    ['The lower deviation', lower],
    ['The upper deviation', upper],
  ]);
  if (!Array.isArray(values)) return values;
  const [middle, low, high] = values as [Decimal, Decimal, Decimal];
  if (compareDecimals(low, high) > 0)
    return undetermined(
      'limits-crossed',
      'The lower deviation is above the upper deviation: exchange or correct them',
    );
  const [evenLow, evenHigh] = even(low, high);
  return band(middle, evenLow, evenHigh, `${formatDecimal(middle)} ${signed(high)} / ${signed(low)}`);
}

function twoLimits(lower: string, upper: string, nominal?: string): ToleranceLimits | Undetermined {
  const entries: Named[] = [
    ['The lower limit', lower],
    ['The upper limit', upper],
  ];
  if (nominal !== undefined) entries.push(['The nominal size', nominal]);
  const values = readAll(entries);
  if (!Array.isArray(values)) return values;
  const [low, high, middle] = values as [Decimal, Decimal, Decimal | undefined];
  if (compareDecimals(low, high) > 0)
    return undetermined(
      'limits-crossed',
      'The lower limit is above the upper limit: exchange or correct them',
    );
  const [evenLow, evenHigh] = even(low, high);
  return {
    lower: formatDecimal(evenLow),
    upper: formatDecimal(evenHigh),
    nominal: middle === undefined ? null : formatDecimal(middle),
    explanation: `From ${formatDecimal(low)} to ${formatDecimal(high)}`,
  };
}

function oneSided(
  side: 'lower' | 'upper',
  text: string,
  naturalZero: boolean,
): ToleranceLimits | Undetermined {
  const values = readAll([[`The ${side} limit`, text]]);
  if (!Array.isArray(values)) return values;
  const [limit] = values as [Decimal];
  const shown = formatDecimal(limit);
  if (side === 'lower') return { lower: shown, upper: null, nominal: null, explanation: `${shown} min` };
  if (!naturalZero) return { lower: null, upper: shown, nominal: null, explanation: `${shown} max` };
  if (limit.digits < 0n)
    return undetermined(
      'limits-crossed',
      'The upper limit is below 0, where no value can occur: correct the limit',
    );
  return {
    lower: '0',
    upper: shown,
    naturalLower: true,
    nominal: null,
    explanation: `${shown} max; 0 is a natural bound, not a limit`,
  };
}

const ANGLE_PLACES = 6;

/** Minutes of arc as degrees, rounded towards zero: the band never grows, and readings to six decimals judge alike. */
function degrees(minutes: Decimal, places: number): Decimal {
  return {
    digits: divideRounded(minutes.digits * powerOfTen(places), 60n * powerOfTen(minutes.scale), 'down'),
    scale: places,
  };
}

function general(spec: Extract<ToleranceSpec, { form: 'general' }>): ToleranceLimits | Undetermined {
  const angular = spec.feature === 'angular';
  if (angular && spec.shorterLeg === undefined)
    return undetermined(
      'shorter-leg-missing',
      'The general tolerance of an angle needs its shorter leg in mm: enter it',
    );
  const found = generalTolerance(spec.shorterLeg ?? spec.nominal, spec.generalClass, spec.feature);
  if ('undetermined' in found) return found;
  const values = readAll([
    ['The nominal size', spec.nominal],
    ['The tolerance', found.tolerance],
  ]);
  if (!Array.isArray(values)) return values;
  const [nominal, tolerance] = values as [Decimal, Decimal];
  const source = `general tolerance ISO 2768-${spec.generalClass}`;
  if (!angular)
    return { ...symmetricOf(nominal, tolerance), explanation: `± ${found.tolerance} mm, ${source}` };
  const whole = (tolerance.digits * 10n) % 60n === 0n;
  const width = degrees(tolerance, whole ? 1 : Math.max(ANGLE_PLACES, nominal.scale));
  const note = whole ? '' : `, as degrees rounded inwards to ${width.scale} decimals`;
  return { ...symmetricOf(nominal, width), explanation: `± ${found.tolerance}′${note}, ${source}` };
}

function symmetricOf(nominal: Decimal, width: Decimal): Limits & { nominal: string } {
  return {
    lower: formatDecimal(subtractDecimals(nominal, width)),
    upper: formatDecimal(addDecimals(nominal, width)),
    nominal: formatDecimal(nominal),
  };
}

/**
 * The limits of a characteristic from the way its drawing states the tolerance, in exact text arithmetic.
 *
 * Both limits get the decimals of the finer of nominal and tolerance (25 ± 0.05 → 24.95 and 25.05; 25.000 ± 0.05 →
 * 24.950 and 25.050). `max` with `naturalZero` marks 0 as a natural bound. `fit` takes ISO 286 limits in mm, `general`
 * ISO 2768-1: sizes in mm, angles in degrees with the shorter leg in mm; a third of a degree is rounded inwards to six
 * decimals. `none` has no limits: a reference dimension never fails.
 * Undetermined with the reason where a number cannot be read, limits are crossed or a table gives no value.
 */
export function toleranceLimits(spec: ToleranceSpec): ToleranceLimits | Undetermined {
  switch (spec.form) {
    case 'symmetric':
      return symmetric(spec.nominal, spec.tolerance);
    case 'deviations':
      return deviations(spec.nominal, spec.lower, spec.upper);
    case 'limits':
      return twoLimits(spec.lower, spec.upper, spec.nominal);
    case 'max':
      return oneSided('upper', spec.upper, spec.naturalZero ?? false);
    case 'min':
      return oneSided('lower', spec.lower, false);
    case 'fit': {
      const found = fitClassLimits(spec.nominal, spec.fitClass);
      if ('undetermined' in found) return found;
      const { nominal, lower, upper, fitClass } = found;
      return { lower, upper, nominal, explanation: `${nominal} ${fitClass}, ISO 286` };
    }
    case 'general':
      return general(spec);
    case 'none':
      return {
        lower: null,
        upper: null,
        nominal: spec.nominal ?? null,
        explanation: 'No tolerance: the value is recorded only',
      };
  }
}
