import { chartConstants } from '../control-charts/constants.ts';
import { tUpperTail } from '../distributions/student-t.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { isUsableReading } from './usable-reading.ts';

export interface StabilityPoint {
  /** occasion, counted from 1 */
  readonly occasion: number;
  readonly mean: number;
  readonly deviation: number;
  readonly meanBeyond: boolean;
  readonly deviationBeyond: boolean;
}

export interface StabilityStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: {
    readonly occasions: number;
    readonly perOccasion: number;
    readonly reference: number | null;
  };
  /** natural limits of the occasion means and deviations: control limits, not tolerance limits */
  readonly meanLimits: { readonly lower: number; readonly centre: number; readonly upper: number };
  readonly deviationLimits: { readonly lower: number; readonly centre: number; readonly upper: number };
  readonly points: readonly StabilityPoint[];
  /** change of the mean per occasion, by least squares */
  readonly drift: number;
  readonly driftP: number | Undetermined;
  /** mean of all readings less the reference, when one was given */
  readonly bias: number | Undetermined;
  readonly verdict: 'stable' | 'not-stable';
  readonly reasons: readonly string[];
}

/** Occasions under which a chart cannot say much; common practice asks for 20 to 25. */
const FEWEST_OCCASIONS = 10;

/**
 * Stability of a gauge: one master part read several times on each of many occasions, in order of time (AIAG, Measurement Systems Analysis,
 * 4th ed. 2010, ch. III-B). Means and deviations of the occasions are charted with limits of three sigma, mean +/- A3 sbar, B3 sbar and B4 sbar, and the means are tested for a straight drift (t test of the slope, 1 %).
 * Not stable: a point beyond its limits (a point on a limit is not beyond it), or a drift. For run rules on the same means use the control charts.
 * Undetermined: fewer than ten occasions, unequal or single readings, more than 25 on an occasion, no variation within occasions, values not finite.
 */
export function stabilityStudy(
  occasions: readonly (readonly number[])[],
  reference?: number,
): StabilityStudy | Undetermined {
  const k = occasions.length;
  const size = occasions[0]?.length ?? 0;
  if (k < FEWEST_OCCASIONS || size < 2) {
    return undetermined(
      'too-few',
      `A stability study needs ${FEWEST_OCCASIONS} or more occasions with two or more readings each`,
    );
  }
  if (occasions.some((readings) => readings.length !== size)) {
    return undetermined('unbalanced', 'Every occasion needs the same number of readings');
  }
  if (!occasions.flat().every(isUsableReading))
    return undetermined('not-finite', 'A reading is not a number');
  const means = occasions.map(meanOf);
  const deviations = occasions.map((readings, place) =>
    Math.sqrt(readings.reduce((sum, value) => sum + (value - (means[place] ?? 0)) ** 2, 0) / (size - 1)),
  );
  const centre = meanOf(means);
  const typical = meanOf(deviations);
  if (!(typical > 0))
    return undetermined(
      'no-variation',
      'Readings of the same occasion are all alike: the resolution is too coarse',
    );
  const constants = chartConstants(size);
  if ('undetermined' in constants) return constants;
  const half = constants.A3 * typical;
  const meanLimits = { lower: centre - half, centre, upper: centre + half };
  const deviationLimits = { lower: constants.B3 * typical, centre: typical, upper: constants.B4 * typical };
  const points = means.map((mean, place): StabilityPoint => {
    const deviation = deviations[place] ?? 0;
    return {
      occasion: place + 1,
      mean,
      deviation,
      meanBeyond: mean < meanLimits.lower || mean > meanLimits.upper,
      deviationBeyond: deviation < deviationLimits.lower || deviation > deviationLimits.upper,
    };
  });
  const { drift, driftP } = driftOf(means, centre);
  const reasons = [
    ...points
      .filter((point) => point.meanBeyond)
      .map((point) => `Mean of occasion ${point.occasion} beyond its control limit`),
    ...points
      .filter((point) => point.deviationBeyond)
      .map((point) => `Deviation of occasion ${point.occasion} beyond its control limit`),
    ...(typeof driftP === 'number' && driftP < 0.01 ? ['The means drift'] : []),
  ];
  return {
    method: 'stability, means and deviations with limits of three sigma, slope of the means',
    n: k * size,
    inputs: { occasions: k, perOccasion: size, reference: reference ?? null },
    meanLimits,
    deviationLimits,
    points,
    drift,
    driftP,
    bias:
      reference === undefined
        ? undetermined('no-reference', 'No reference value was given')
        : centre - reference,
    verdict: reasons.length === 0 ? 'stable' : 'not-stable',
    reasons,
  };
}

function driftOf(means: readonly number[], centre: number): { drift: number; driftP: number | Undetermined } {
  const k = means.length;
  const middle = (k - 1) / 2;
  const sxx = (k * (k * k - 1)) / 12;
  const drift = means.reduce((sum, mean, place) => sum + (place - middle) * (mean - centre), 0) / sxx;
  const residual = means.reduce(
    (sum, mean, place) => sum + (mean - centre - drift * (place - middle)) ** 2,
    0,
  );
  if (!(residual > 0))
    return { drift, driftP: drift === 0 ? undetermined('no-variation', 'The means are all alike') : 0 };
  const t = drift / Math.sqrt(residual / (k - 2) / sxx);
  return { drift, driftP: 2 * tUpperTail(Math.abs(t), k - 2) };
}

function meanOf(values: readonly number[]): number {
  const origin = values[0] ?? 0;
  return origin + values.reduce((sum, value) => sum + (value - origin), 0) / values.length;
}
