import type { RowResult, SheetCharacteristic } from '@trammel/shared/measurements';
import type { Verdict } from '@trammel/shared/status';

const verdicts: Record<string, Verdict> = {
  i: 'in-tolerance',
  o: 'out-of-tolerance',
  u: 'undecided',
  x: 'no-verdict',
};
const number = (text: string | null) => (text === null ? null : Number(text));

/** What a beam shows of these results; the natural spread only where they are one stream's, because streams are not pooled. */
export function beamOf(facts: SheetCharacteristic, results: readonly RowResult[]) {
  const points = results.flatMap((row) =>
    row.readings.flatMap((text, place) => {
      const verdict = verdicts[row.marks.charAt(place)];
      const value = text === null ? NaN : Number.parseFloat(text);
      return Number.isFinite(value) && verdict ? [{ value, verdict, label: text ?? '' }] : [];
    }),
  );
  const checked = results.reduce((sum, row) => sum + row.n, 0);
  const failed = results.reduce((sum, row) => sum + row.outCount, 0);
  const [only] = results;
  const { mean, standardDeviation: s } = only ?? { mean: null, standardDeviation: null };
  return {
    limits: {
      lower: number(facts.lowerLimit),
      upper: number(facts.upperLimit),
      naturalLower: facts.naturalLower,
    },
    nominal: number(facts.nominal),
    points,
    unit: facts.unit,
    decimals: facts.decimals,
    ...(results.length === 1 && mean !== null && s !== null && s > 0
      ? { spread: { lower: mean - 3 * s, upper: mean + 3 * s } }
      : {}),
    ...(points.length === 0 && checked > 0 ? { attribute: { checked, failed } } : {}),
  };
}

export function limitsInWords({ lowerLimit, upperLimit, unit, nominal }: SheetCharacteristic): string {
  const shown = unit === '1' ? '' : ` ${unit}`;
  if (lowerLimit !== null && upperLimit !== null) return `${lowerLimit}…${upperLimit}${shown}`;
  if (upperLimit !== null) return `≤ ${upperLimit}${shown}`;
  if (lowerLimit !== null) return `≥ ${lowerLimit}${shown}`;
  return nominal === null ? 'pass or fail' : `(${nominal})${shown}`;
}
