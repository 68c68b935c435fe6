import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { gaugeVerdict } from './gauge-verdict.ts';
import type { GaugeBands, GaugeVerdict } from './gauge-verdict.ts';

/** Tolerance the gauge must serve. One side may be missing; then the share is of the room between the mean and the limit. */
export interface GaugeTolerance {
  readonly lower?: number;
  readonly upper?: number;
}

export interface StudyOptions {
  readonly tolerance?: GaugeTolerance;
  /** Standard deviations that make a study variation: 6 (default, 99.73 %) or 5.15 (older practice, 99 %). */
  readonly multiplier?: number;
  /** Which share the verdict looks at; the tolerance needs to be given for the second. */
  readonly judgedBy?: 'study-variation' | 'tolerance';
  readonly bands?: GaugeBands;
}

/** One source of variation, from every angle a report shows it. */
export interface VarianceShare {
  readonly variance: number;
  readonly standardDeviation: number;
  /** multiplier x standard deviation */
  readonly studyVariation: number;
  /** standard deviation in per cent of the total standard deviation; the shares do not add up to 100 */
  readonly percentStudy: number;
  /** variance in per cent of the total variance; the shares add up to 100 */
  readonly percentContribution: number;
  readonly percentTolerance: number | Undetermined;
}

export interface GaugeShares {
  readonly repeatability: VarianceShare;
  /** appraiser, and appraiser x part where the study separates it */
  readonly reproducibility: VarianceShare;
  readonly appraiser: VarianceShare;
  readonly interaction: VarianceShare;
  /** repeatability and reproducibility together */
  readonly gauge: VarianceShare;
  readonly part: VarianceShare;
  readonly total: VarianceShare;
  /** 1.41 x part standard deviation / gauge standard deviation, before truncation; Infinity when the gauge did not vary */
  readonly distinctCategoriesRaw: number;
  /** the same, truncated to a whole number */
  readonly distinctCategories: number;
  readonly multiplier: number;
  readonly verdict: GaugeVerdict | Undetermined;
}

export interface VarianceComponents {
  readonly repeatability: number;
  readonly appraiser: number;
  readonly interaction: number;
  readonly part: number;
}

/**
 * Turns variance components into the shares a gauge report shows. Negative components must already be set to 0.
 *
 * Share of the tolerance: multiplier x s / (upper - lower); with one limit (multiplier / 2) x s / |limit - mean|. Number of distinct
 * categories: 1.41 x part / gauge, truncated (AIAG, Measurement Systems Analysis, 4th ed., ch. III-B; 1.41 and truncation as printed there).
 * Undetermined when nothing varied at all. With no gauge variation the count of categories is Infinity: the resolution hides the repeatability.
 */
export function varianceShares(
  components: VarianceComponents,
  mean: number,
  options: StudyOptions = {},
): GaugeShares | Undetermined {
  const multiplier = options.multiplier ?? 6;
  if (!(multiplier > 0)) return undetermined('multiplier', 'The study multiplier must be greater than 0');
  const reproducibility = components.appraiser + components.interaction;
  const gauge = components.repeatability + reproducibility;
  const total = gauge + components.part;
  if (!(total > 0))
    return undetermined('no-variation', 'All readings are alike, so no share of variation exists');
  const room = toleranceRoom(options.tolerance, mean, multiplier);
  const share = (variance: number): VarianceShare => {
    const standardDeviation = Math.sqrt(variance);
    return {
      variance,
      standardDeviation,
      studyVariation: multiplier * standardDeviation,
      percentStudy: (100 * standardDeviation) / Math.sqrt(total),
      percentContribution: (100 * variance) / total,
      percentTolerance: typeof room === 'number' ? (100 * standardDeviation) / room : room,
    };
  };
  const raw = gauge > 0 ? (1.41 * Math.sqrt(components.part)) / Math.sqrt(gauge) : Infinity;
  const gaugeShare = share(gauge);
  return {
    repeatability: share(components.repeatability),
    reproducibility: share(reproducibility),
    appraiser: share(components.appraiser),
    interaction: share(components.interaction),
    gauge: gaugeShare,
    part: share(components.part),
    total: share(total),
    distinctCategoriesRaw: raw,
    distinctCategories: Math.floor(raw),
    multiplier,
    verdict: judge(gaugeShare, Math.floor(raw), options),
  };
}

function judge(gauge: VarianceShare, categories: number, options: StudyOptions): GaugeVerdict | Undetermined {
  if (options.judgedBy !== 'tolerance') return gaugeVerdict(gauge.percentStudy, categories, options.bands);
  if (typeof gauge.percentTolerance !== 'number') return gauge.percentTolerance;
  return gaugeVerdict(gauge.percentTolerance, categories, options.bands);
}

/** The standard deviation that would fill the tolerance. */
function toleranceRoom(
  tolerance: GaugeTolerance | undefined,
  mean: number,
  multiplier: number,
): number | Undetermined {
  const { lower, upper } = tolerance ?? {};
  if (lower === undefined && upper === undefined)
    return undetermined('no-tolerance', 'No tolerance was given');
  if (lower !== undefined && upper !== undefined) {
    return upper > lower
      ? (upper - lower) / multiplier
      : undetermined('limits', 'The upper limit must be greater than the lower limit');
  }
  const room = Math.abs((upper ?? lower ?? mean) - mean);
  return room > 0
    ? (2 * room) / multiplier
    : undetermined(
        'no-room',
        'The mean of the study lies on the limit, so it leaves no room to compare with',
      );
}
