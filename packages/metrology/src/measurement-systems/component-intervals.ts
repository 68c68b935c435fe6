import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import type { StudySize } from './crossed-readings.ts';
import type { AnovaRow, AnovaTable } from './gauge-anova.ts';
import { intervalQuantiles, largeSampleInterval } from './large-sample-interval.ts';
import type { Interval, WeightedSquare } from './large-sample-interval.ts';

/** Two-sided confidence intervals of the variances (not of the standard deviations) of a crossed study. */
export interface ComponentIntervals {
  readonly method: string;
  readonly confidence: number;
  readonly repeatability: Interval;
  readonly appraiser: Interval;
  /** missing when the interaction was pooled */
  readonly interaction?: Interval;
  readonly reproducibility: Interval;
  readonly gauge: Interval;
  readonly part: Interval;
  readonly total: Interval;
}

/**
 * Modified large-sample confidence intervals of the variance components of a crossed study with random parts and appraisers
 * (`largeSampleInterval`); the repeatability interval is the exact chi-square one. Each component is written as a weighted sum of the mean
 * squares of the table the components themselves come from. Undetermined without variation in the error.
 */
export function componentIntervals(
  table: AnovaTable,
  size: Pick<StudySize, 'parts' | 'appraisers' | 'trials'>,
  confidence: number,
): ComponentIntervals | Undetermined {
  if (!(confidence > 0 && confidence < 1)) {
    return undetermined('confidence', 'The confidence must lie between 0 and 1');
  }
  if (!(table.error.meanSquare > 0)) {
    return undetermined(
      'no-variation',
      'Repeated readings are all alike, so the components have no interval',
    );
  }
  const alpha = (1 - confidence) / 2;
  const quantiles = intervalQuantiles(alpha);
  const { parts: p, appraisers: o, trials: r } = size;
  const interval = (...terms: readonly (readonly [AnovaRow | undefined, number])[]): Interval =>
    largeSampleInterval(
      terms.flatMap(([source, weight]): WeightedSquare[] =>
        source && weight !== 0 ? [{ ...source, weight }] : [],
      ),
      alpha,
      quantiles,
    );
  const { appraiser, part, interaction, error } = table;
  const shared = {
    method: 'modified large sample (Graybill-Wang; Ting and others), repeatability by chi-square',
    confidence,
    repeatability: interval([error, 1]),
  };
  if (!interaction) {
    return {
      ...shared,
      appraiser: interval([appraiser, 1 / (p * r)], [error, -1 / (p * r)]),
      reproducibility: interval([appraiser, 1 / (p * r)], [error, -1 / (p * r)]),
      gauge: interval([appraiser, 1 / (p * r)], [error, 1 - 1 / (p * r)]),
      part: interval([part, 1 / (o * r)], [error, -1 / (o * r)]),
      total: interval([part, 1 / (o * r)], [appraiser, 1 / (p * r)], [error, 1 - 1 / (o * r) - 1 / (p * r)]),
    };
  }
  return {
    ...shared,
    appraiser: interval([appraiser, 1 / (p * r)], [interaction, -1 / (p * r)]),
    interaction: interval([interaction, 1 / r], [error, -1 / r]),
    reproducibility: interval([appraiser, 1 / (p * r)], [interaction, (p - 1) / (p * r)], [error, -1 / r]),
    gauge: interval([appraiser, 1 / (p * r)], [interaction, (p - 1) / (p * r)], [error, (r - 1) / r]),
    part: interval([part, 1 / (o * r)], [interaction, -1 / (o * r)]),
    total: interval(
      [part, 1 / (o * r)],
      [appraiser, 1 / (p * r)],
      [interaction, (p * o - p - o) / (p * o * r)],
      [error, (r - 1) / r],
    ),
  };
}
