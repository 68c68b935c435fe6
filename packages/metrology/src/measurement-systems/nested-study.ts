import { fUpperTail } from '../distributions/f.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { sizeOfCrossed } from './crossed-readings.ts';
import { largeSampleInterval } from './large-sample-interval.ts';
import type { Interval } from './large-sample-interval.ts';
import { varianceShares } from './variance-shares.ts';
import type { GaugeShares, StudyOptions } from './variance-shares.ts';

/** Readings of a destructive test: `readings[appraiser][part][trial]`, each appraiser with parts of their own from like material. */
export type NestedReadings = readonly (readonly (readonly number[])[])[];

export interface NestedGaugeStudy extends GaugeShares {
  readonly method: string;
  readonly n: number;
  readonly inputs: {
    readonly appraisers: number;
    readonly partsPerAppraiser: number;
    readonly trials: number;
    readonly confidence: number;
  };
  readonly meanSquares: { readonly appraiser: number; readonly part: number; readonly error: number };
  readonly degreesOfFreedom: { readonly appraiser: number; readonly part: number; readonly error: number };
  readonly appraiserP: number | Undetermined;
  readonly partP: number | Undetermined;
  readonly componentsBeforeClipping: {
    readonly appraiser: number;
    readonly part: number;
    readonly repeatability: number;
  };
  readonly intervals:
    | {
        readonly method: string;
        readonly confidence: number;
        readonly repeatability: Interval;
        readonly appraiser: Interval;
        readonly part: Interval;
        readonly gauge: Interval;
      }
    | Undetermined;
}

/**
 * Gauge study with parts nested in appraisers, for tests that destroy or change the piece, so that no piece goes from hand to hand.
 *
 * o appraisers, p parts each, r trials: s2_e = MS_e; s2_part = (MS_part(appraiser) - MS_e)/r; s2_appraiser = (MS_appraiser - MS_part)/(p r).
 * F of the appraiser over MS_part, of the part over MS_e. Trials stand for pieces so alike that they count as one part; how far they are not,
 * the repeatability is too large. Negative components are set to 0. Intervals by the modified large-sample method, repeatability exact.
 * Undetermined: fewer than two appraisers, parts each or trials, an unbalanced block, no variation.
 */
export function nestedGaugeStudy(
  readings: NestedReadings,
  options: StudyOptions & { readonly confidence?: number } = {},
): NestedGaugeStudy | Undetermined {
  const size = sizeOfCrossed(readings);
  if ('undetermined' in size) return size;
  const { parts: o, appraisers: p, trials: r, n } = size;
  if (p < 2 || r < 2)
    return undetermined(
      'too-few',
      'A nested study needs two appraisers, two parts each and two readings of each',
    );
  const confidence = options.confidence ?? 0.95;
  const cellMeans = readings.map((row) => row.map(meanOf));
  const appraiserMeans = cellMeans.map(meanOf);
  const mean = meanOf(appraiserMeans);
  const squares = (values: readonly number[], around: number): number =>
    values.reduce((sum, value) => sum + (value - around) ** 2, 0);
  const degreesOfFreedom = { appraiser: o - 1, part: o * (p - 1), error: o * p * (r - 1) };
  const error =
    readings.reduce(
      (sum, row, i) => sum + row.reduce((inner, cell, j) => inner + squares(cell, cellMeans[i]?.[j] ?? 0), 0),
      0,
    ) / degreesOfFreedom.error;
  const part =
    (r * cellMeans.reduce((sum, row, i) => sum + squares(row, appraiserMeans[i] ?? 0), 0)) /
    degreesOfFreedom.part;
  const appraiser = (p * r * squares(appraiserMeans, mean)) / degreesOfFreedom.appraiser;
  const componentsBeforeClipping = {
    repeatability: error,
    part: (part - error) / r,
    appraiser: (appraiser - part) / (p * r),
  };
  const shares = varianceShares(
    {
      repeatability: error,
      appraiser: Math.max(0, componentsBeforeClipping.appraiser),
      interaction: 0,
      part: Math.max(0, componentsBeforeClipping.part),
    },
    mean,
    options,
  );
  if ('undetermined' in shares) return shares;
  const noSpread = undetermined('no-variation', 'The readings to compare with are all alike');
  const term = (weight: number, meanSquare: number, source: keyof typeof degreesOfFreedom) => ({
    weight,
    meanSquare,
    degreesOfFreedom: degreesOfFreedom[source],
  });
  const alpha = (1 - confidence) / 2;
  return {
    method: 'analysis of variance, parts nested in appraisers',
    n,
    inputs: { appraisers: o, partsPerAppraiser: p, trials: r, confidence },
    ...shares,
    meanSquares: { appraiser, part, error },
    degreesOfFreedom,
    appraiserP:
      part > 0 ? fUpperTail(appraiser / part, degreesOfFreedom.appraiser, degreesOfFreedom.part) : noSpread,
    partP: error > 0 ? fUpperTail(part / error, degreesOfFreedom.part, degreesOfFreedom.error) : noSpread,
    componentsBeforeClipping,
    intervals:
      error > 0 && part > 0
        ? {
            method: 'modified large sample (Graybill-Wang; Ting and others), repeatability by chi-square',
            confidence,
            repeatability: largeSampleInterval([term(1, error, 'error')], alpha),
            part: largeSampleInterval([term(1 / r, part, 'part'), term(-1 / r, error, 'error')], alpha),
            appraiser: largeSampleInterval(
              [term(1 / (p * r), appraiser, 'appraiser'), term(-1 / (p * r), part, 'part')],
              alpha,
            ),
            gauge: largeSampleInterval(
              [
                term(1 / (p * r), appraiser, 'appraiser'),
                term(-1 / (p * r), part, 'part'),
                term(1, error, 'error'),
              ],
              alpha,
            ),
          }
        : noSpread,
  };
}

function meanOf(values: readonly number[]): number {
  const origin = values[0] ?? 0;
  return origin + values.reduce((sum, value) => sum + (value - origin), 0) / values.length;
}
