import {
  compareDecimals,
  parseDecimal,
  parseLocaleDecimal,
  formatDecimal,
  subtractDecimals,
  absolute,
  multiplyDecimals,
  decimalOf,
} from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology/conformance';
import { readTolerance } from '@trammel/metrology/tolerance-notation';
import type { ToleranceSpec } from '@trammel/shared/characteristics';
import type { CharacteristicColumn, ImportSettings } from '@trammel/shared/table-import';
import { yesOrNo } from './cell-words.ts';
import { localeOf } from './import-settings.ts';

/** A fault of one row: where, what, and how to mend it. */
export interface RowFault {
  readonly column: CharacteristicColumn | null;
  readonly detail: string;
  readonly remedy: string;
}

export class RowRefused extends Error {
  constructor(readonly fault: RowFault) {
    super(fault.detail);
  }
}

export const refuse = (column: CharacteristicColumn | null, detail: string, remedy: string): never => {
  throw new RowRefused({ column, detail, remedy });
};

export type CellOf = (column: CharacteristicColumn) => string;

export interface RowTolerance {
  readonly tolerance: ToleranceSpec;
  readonly unit: string | null;
  readonly hint: 'basic' | 'reference' | null;
}

const dash = (text: string): string => (/^[-–—]$/.test(text) ? '' : text);

/** The tolerance of a row from whichever of the columns are filled. */
export function toleranceOfRow(cell: CellOf, settings: ImportSettings, geometric: boolean): RowTolerance {
  const locale = localeOf(settings);
  const number = (column: CharacteristicColumn): string | null => {
    const text = dash(cell(column))
      .replace(/\s*(?:mm|µm|um|μm|in|inch|°|deg|"|N|g)$/u, '')
      .replace(/^[≤≥Ø⌀]\s*/, '');
    if (text === '') return null;
    const parsed = parseLocaleDecimal(text, locale);
    if (isUndetermined(parsed))
      return refuse(
        column,
        parsed.reason,
        'Correct the cell, or check decimal sign and thousands mark above.',
      );
    return formatDecimal(parsed);
  };
  const read = (nominal: string, tolerance: string, column: CharacteristicColumn): RowTolerance => {
    const found = readTolerance({ nominal, tolerance, locale, geometric });
    if (isUndetermined(found))
      return refuse(
        found.code.startsWith('nominal') ? 'nominal' : column,
        found.reason,
        'Correct the cell, or map another column.',
      );
    return { tolerance: found.stated, unit: found.unit, hint: found.hint };
  };

  const nominalText = dash(cell('nominal'));
  const alone = read(nominalText === '' ? '' : nominalText, '', 'nominal');
  const nominal = alone.tolerance.form === 'none' ? alone.tolerance.nominal : null;
  const lower = number('lowerLimit');
  const upper = number('upperLimit');
  const stated = statedOf();
  if (stated) {
    if (lower !== null && upper !== null) assertAgrees(stated.tolerance, lower, upper);
    return { ...stated, hint: stated.hint ?? alone.hint };
  }
  return { tolerance: ofLimits(), unit: alone.unit, hint: alone.hint };

  function statedOf(): RowTolerance | null {
    const fitClass = dash(cell('fitClass'));
    if (fitClass !== '') return read(nominalText, fitClass, 'fitClass');
    const generalClass = dash(cell('generalClass'));
    if (generalClass !== '') return generalOf(read(nominalText, generalClass, 'generalClass'));
    const text = dash(cell('tolerance'));
    // A zone stands on no nominal: sheets often write 0 beside it.
    if (text !== '') return read(geometric && /^[\s\d.,]+$/.test(text) ? '' : nominalText, text, 'tolerance');
    const above = number('upperDeviation');
    const below = number('lowerDeviation');
    if (above === null && below === null) return alone.tolerance.form === 'none' ? null : alone;
    if (nominal === null)
      return refuse('nominal', 'Deviations are given without a nominal.', 'Fill in the nominal of this row.');
    return {
      tolerance: deviationsOf(nominal, above ?? '0', below ?? '0'),
      unit: alone.unit,
      hint: alone.hint,
    };
  }

  function generalOf(found: RowTolerance): RowTolerance {
    if (found.tolerance.form !== 'general') return found;
    const word = cell('generalFeature').toLowerCase();
    const feature = /radi|chamf|fase/.test(word)
      ? 'radius-chamfer'
      : /angul|winkel/.test(word)
        ? 'angular'
        : found.tolerance.feature;
    const leg = number('shorterLeg');
    return {
      ...found,
      tolerance: { ...found.tolerance, feature, ...(leg === null ? {} : { shorterLeg: leg }) },
    };
  }

  function deviationsOf(base: string, above: string, below: string): ToleranceSpec {
    const a = parseDecimal(above);
    const b = parseDecimal(below);
    if (isUndetermined(a) || isUndetermined(b))
      return refuse('upperDeviation', 'A deviation cannot be read.', 'Correct the cell.');
    if (compareDecimals(a, b) < 0)
      return refuse(
        'upperDeviation',
        `The upper deviation ${above} is below the lower one ${below}.`,
        'Exchange the two columns or the values.',
      );
    return { form: 'deviations', nominal: base, upper: above, lower: below };
  }

  function ofLimits(): ToleranceSpec {
    if (lower === null && upper === null) return { form: 'none', nominal };
    const zeroCell = cell('zeroBound');
    const zero = zeroCell === '' ? geometric : (yesOrNo(zeroCell) ?? geometric);
    if (upper !== null && (lower === null || (zero && /^0(?:\.0*)?$/.test(lower))))
      return { form: 'max', upper, zeroBound: zero };
    if (lower !== null && upper === null) return { form: 'min', lower };
    const low = lower ?? '0';
    const high = upper ?? '0';
    assertNearNominal(nominal, low, high);
    return { form: 'limits', lower: low, upper: high, nominal };
  }
}

function assertNearNominal(nominal: string | null, lower: string, upper: string): void {
  if (nominal === null) return;
  const [at, low, high] = [parseDecimal(nominal), parseDecimal(lower), parseDecimal(upper)];
  if (isUndetermined(at) || isUndetermined(low) || isUndetermined(high)) return;
  const width = absolute(subtractDecimals(high, low));
  const far = [low, high].every(
    (limit) =>
      compareDecimals(absolute(subtractDecimals(at, limit)), multiplyDecimals(width, decimalOf(10n))) > 0,
  );
  if (far && width.digits !== 0n) {
    refuse(
      'lowerLimit',
      `The limits ${lower} and ${upper} lie far from the nominal ${nominal}.`,
      'If they are deviations from the nominal, map the two columns as upper and lower deviation.',
    );
  }
}

function assertAgrees(tolerance: ToleranceSpec, lower: string, upper: string): void {
  if (tolerance.form !== 'symmetric' && tolerance.form !== 'deviations') return;
  const nominal = parseDecimal(tolerance.nominal);
  const plus = parseDecimal(tolerance.form === 'symmetric' ? tolerance.tolerance : tolerance.upper);
  const minus = parseDecimal(tolerance.form === 'symmetric' ? `-${tolerance.tolerance}` : tolerance.lower);
  const [low, high] = [parseDecimal(lower), parseDecimal(upper)];
  if ([nominal, plus, minus, low, high].some(isUndetermined)) return;
  const value = (d: typeof nominal) => (isUndetermined(d) ? decimalOf(0n) : d);
  const add = (a: typeof nominal, b: typeof nominal) =>
    subtractDecimals(value(a), subtractDecimals(decimalOf(0n), value(b)));
  if (
    compareDecimals(add(nominal, plus), value(high)) !== 0 ||
    compareDecimals(add(nominal, minus), value(low)) !== 0
  ) {
    refuse(
      'tolerance',
      `Nominal and tolerance give ${formatDecimal(add(nominal, minus))} to ${formatDecimal(add(nominal, plus))}, but the limits say ${lower} to ${upper}.`,
      'Correct one of them, or leave out the limit columns.',
    );
  }
}
