import { equivalentDegreesOfFreedom } from '../capability/equivalent-degrees.ts';
import { d2, d3 } from '../control-charts/constants.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { sizeOfCrossed } from './crossed-readings.ts';
import type { CrossedReadings, StudySize } from './crossed-readings.ts';
import { varianceShares } from './variance-shares.ts';
import type { GaugeShares, StudyOptions } from './variance-shares.ts';

/** d2* of ranges of n readings when only `ranges` of them are averaged: sqrt(d2(n)^2 + d3(n)^2/ranges), n from 2 on. */
export function d2Star(n: number, ranges: number): number {
  return Math.sqrt(d2(n) ** 2 + d3(n) ** 2 / ranges);
}

export interface AverageRangeOptions extends StudyOptions {
  /** K1, K2, K3 of a printed form, to follow a report that used them; computed from their definitions when missing. */
  readonly printedConstants?: { readonly k1: number; readonly k2: number; readonly k3: number };
}

export interface AverageRangeStudy extends GaugeShares {
  readonly method: string;
  readonly n: number;
  readonly inputs: StudySize;
  readonly k1: number;
  readonly k2: number;
  readonly k3: number;
  readonly meanRangeByAppraiser: readonly number[];
  readonly meanRange: number;
  readonly meanByAppraiser: readonly number[];
  /** largest less smallest appraiser mean */
  readonly appraiserDifference: number;
  readonly partMeans: readonly number[];
  /** largest less smallest part mean */
  readonly partRange: number;
  /** D4 x mean range: a larger range within a cell wants its cause found first */
  readonly rangeLimit: number;
  /** cells whose range is above the limit, part and appraiser counted from 1 */
  readonly rangesAboveLimit: readonly {
    readonly part: number;
    readonly appraiser: number;
    readonly range: number;
  }[];
  /** true when the appraiser variance came out negative and was set to 0 */
  readonly appraiserClipped: boolean;
  /** equivalent degrees of freedom of the repeatability */
  readonly repeatabilityDegreesOfFreedom: number;
}

/**
 * Gauge repeatability and reproducibility by the average-and-range method (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-B).
 *
 * EV = K1 Rbar; AV = sqrt((K2 Xdiff)^2 - EV^2/(p r)), 0 where negative; PV = K3 Rp; GRR^2 = EV^2 + AV^2; TV^2 = GRR^2 + PV^2.
 * K1 = 1/d2(r), K2 = 1/d2*(o, 1), K3 = 1/d2*(p, 1) from the definitions of d2 and d3, where the manual prints four decimals; p parts,
 * o appraisers, r trials. The method sees no interaction of part and appraiser and takes it into the repeatability; `gaugeAnova` separates it.
 * Domain: balanced readings, 2 to 25 parts, appraisers and trials each. Readings all alike: undetermined.
 * Tested against the reference cases grr-aiag-average-range and grr-k-constants.
 */
export function averageRangeStudy(
  readings: CrossedReadings,
  options: AverageRangeOptions = {},
): AverageRangeStudy | Undetermined {
  const size = sizeOfCrossed(readings);
  if ('undetermined' in size) return size;
  const { parts, appraisers, trials } = size;
  if (appraisers < 2 || trials < 2 || Math.max(parts, appraisers, trials) > 25) {
    return undetermined(
      'study-size',
      'The average-and-range method needs 2 to 25 parts, appraisers and trials each',
    );
  }
  const d2Trials = d2(trials);
  const d3Trials = d3(trials);

  const ranges = readings.map((row) => row.map((cell) => Math.max(...cell) - Math.min(...cell)));
  const cellMeans = readings.map((row) => row.map((cell) => meanOf(cell)));
  const byAppraiser = Array.from({ length: appraisers }, (_, appraiser) => appraiser);
  const meanRangeByAppraiser = byAppraiser.map((appraiser) =>
    meanOf(ranges.map((row) => row[appraiser] ?? 0)),
  );
  const meanByAppraiser = byAppraiser.map((appraiser) => meanOf(cellMeans.map((row) => row[appraiser] ?? 0)));
  const partMeans = cellMeans.map(meanOf);
  const meanRange = meanOf(meanRangeByAppraiser);
  const appraiserDifference = Math.max(...meanByAppraiser) - Math.min(...meanByAppraiser);
  const partRange = Math.max(...partMeans) - Math.min(...partMeans);

  const { k1, k2, k3 } = options.printedConstants ?? {
    k1: 1 / d2Trials,
    k2: 1 / d2Star(appraisers, 1),
    k3: 1 / d2Star(parts, 1),
  };
  const repeatability = (k1 * meanRange) ** 2;
  const appraiserBeforeClipping = (k2 * appraiserDifference) ** 2 - repeatability / (parts * trials);
  const shares = varianceShares(
    {
      repeatability,
      appraiser: Math.max(0, appraiserBeforeClipping),
      interaction: 0,
      part: (k3 * partRange) ** 2,
    },
    meanOf(partMeans),
    options,
  );
  if ('undetermined' in shares) return shares;
  const rangeLimit = (1 + (3 * d3Trials) / d2Trials) * meanRange;
  return {
    method: `average and range, K constants ${options.printedConstants ? 'of a printed form' : 'from d2*'}`,
    n: size.n,
    inputs: size,
    ...shares,
    k1,
    k2,
    k3,
    meanRangeByAppraiser,
    meanRange,
    meanByAppraiser,
    appraiserDifference,
    partMeans,
    partRange,
    rangeLimit,
    rangesAboveLimit: ranges.flatMap((row, part) =>
      row.flatMap((range, appraiser) =>
        range > rangeLimit ? [{ part: part + 1, appraiser: appraiser + 1, range }] : [],
      ),
    ),
    appraiserClipped: appraiserBeforeClipping < 0,
    repeatabilityDegreesOfFreedom: equivalentDegreesOfFreedom(
      (d3Trials / d2Trials) ** 2 / (parts * appraisers),
    ),
  };
}

function meanOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
