import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { d2 } from './constants.ts';
import { controlLimits } from './limits.ts';
import type { NaturalEnds } from './limits.ts';
import { describePhase, pointsOfPhase } from './phase.ts';
import type { Phase } from './phase.ts';
import type { RunRule } from './rules.ts';
import { chartSeries } from './series.ts';
import type { ChartSeries, Statistic } from './series.ts';
import { judgeProcess } from './verdict.ts';
import type { ProcessVerdict } from './verdict.ts';

/** p: share of nonconforming pieces; np: their number; c: nonconformities; u: nonconformities per unit. */
export type AttributeChartKind = 'p' | 'np' | 'c' | 'u';

/** What a chart of counts is drawn from. */
export interface AttributeChartInput {
  readonly kind: AttributeChartKind;
  /** Nonconforming pieces (p, np) or nonconformities (c, u) of each sample. */
  readonly counts: readonly number[];
  /** Pieces (p, np: whole numbers) or units (u: any number above 0) of each sample, or one size for all. Not for c. */
  readonly sizes?: number | readonly number[];
  readonly phase?: Phase;
  /** Centre fixed before: the share (p, np), count (c) or rate (u) of a process that was shown in control. */
  readonly frozenCentre?: number;
  /** p and u only: limits widened or narrowed by the spread seen between samples (Laney). */
  readonly laney?: boolean;
  readonly rules?: readonly RunRule[];
}

/** A chart of counts. */
export interface AttributeChart {
  readonly method: AttributeChartKind | "p'" | "u'";
  readonly samples: number;
  readonly limitsFrom: string;
  /** p̄, c̄ or ū of the samples that make the limits; for np the share p̄. */
  readonly average: number;
  /**
   * Moving-range deviation of z = (value − centre)/σ: 1 when the counts scatter as the binomial or Poisson distribution
   * says, above when samples differ more (the limits of p and u are then too narrow and Laney's are meant). Null when
   * fewer than two samples follow each other.
   */
  readonly dispersion: number | null;
  readonly series: ChartSeries;
  readonly verdict: ProcessVerdict;
}

/** Sizes as one number a sample, or why they cannot be used. */
function sizesOf(input: AttributeChartInput): readonly number[] | Undetermined {
  const { kind, counts, sizes } = input;
  if (kind === 'c') return counts.map(() => 1);
  if (sizes === undefined) return undetermined('too-few', 'This chart needs the size of each sample');
  const list = typeof sizes === 'number' ? counts.map(() => sizes) : sizes;
  if (list.length !== counts.length)
    return undetermined(
      'outside-domain',
      `There are ${counts.length} counts but ${list.length} sizes: each count needs one`,
    );
  const pieces = kind !== 'u';
  const wrong = list.findIndex(
    (size) => !(size > 0 && size < Infinity) || (pieces && !Number.isInteger(size)),
  );
  if (wrong < 0) return list;
  const must = pieces ? 'a whole number above 0' : 'a number above 0';
  return undetermined('outside-domain', `The size of sample ${wrong + 1} must be ${must}`);
}

function refuseCounts(
  counts: readonly number[],
  sizes: readonly number[],
  pieces: boolean,
): Undetermined | null {
  for (let index = 0; index < counts.length; index += 1) {
    const count = counts[index] as number;
    if (!Number.isInteger(count) || count < 0)
      return undetermined(
        'outside-domain',
        `The count of sample ${index + 1} must be a whole number of 0 or more`,
      );
    if (pieces && count > (sizes[index] as number))
      return undetermined('outside-domain', `Sample ${index + 1} has more nonconforming pieces than pieces`);
  }
  return null;
}

const STATISTICS: Readonly<Record<AttributeChartKind, Statistic>> = {
  p: 'fraction',
  np: 'count',
  c: 'count',
  u: 'rate',
};

/** Value, centre, sigma and natural ends of one sample, given the average of the process. */
function plotted(kind: AttributeChartKind, count: number, size: number, average: number) {
  const ends: NaturalEnds =
    kind === 'p' ? { lowest: 0, highest: 1 } : kind === 'np' ? { lowest: 0, highest: size } : { lowest: 0 };
  switch (kind) {
    case 'p':
      return {
        value: count / size,
        centre: average,
        sigma: Math.sqrt((average * (1 - average)) / size),
        ends,
      };
    case 'np':
      return { value: count, centre: size * average, sigma: Math.sqrt(size * average * (1 - average)), ends };
    case 'c':
      return { value: count, centre: average, sigma: Math.sqrt(average), ends };
    case 'u':
      return { value: count / size, centre: average, sigma: Math.sqrt(average / size), ends };
  }
}

/** Mean moving range of z over d2(2), over neighbours that both make the limits. */
function dispersionOf(z: readonly number[], inPhase: ReadonlySet<number>): number | null {
  const ranges: number[] = [];
  for (let index = 1; index < z.length; index += 1)
    if (inPhase.has(index) && inPhase.has(index - 1))
      ranges.push(Math.abs((z[index] as number) - (z[index - 1] as number)));
  return ranges.length === 0 ? null : ranges.reduce((a, b) => a + b, 0) / ranges.length / d2(2);
}

/**
 * Chart of counts: p, np, c or u with limits at three sigma, sample by sample where sizes differ.
 *
 * p: p̄ ± 3√(p̄(1 − p̄)/n); np: n·p̄ ± 3√(n·p̄(1 − p̄)); c: c̄ ± 3√c̄; u: ū ± 3√(ū/n), with p̄ = Σd/Σn and ū = Σc/Σn; limits cut at 0
 * (and at 1 or n). `laney` multiplies σ by the moving-range deviation of the z values (D. B. Laney, Quality Engineering 14
 * (2002) 531-537). The default rule is a point beyond a limit, because counts are not symmetrical about their centre.
 * Source: ISO 7870-2:2013; NIST/SEMATECH e-Handbook 6.3.3.
 */
export function attributeChart(input: AttributeChartInput): AttributeChart | Undetermined {
  const { kind, counts, frozenCentre, laney = false } = input;
  const sizes = sizesOf(input);
  if (isUndetermined(sizes)) return sizes;
  const pieces = kind === 'p' || kind === 'np';
  const refused = refuseCounts(counts, sizes, pieces);
  if (refused !== null) return refused;
  if (laney && kind !== 'p' && kind !== 'u')
    return undetermined('outside-domain', 'Limits after Laney are defined for p and u charts');
  const chosen = pointsOfPhase(input.phase, counts.length);
  if (isUndetermined(chosen)) return chosen;
  const total = (values: readonly number[]) =>
    chosen.reduce((sum, index) => sum + (values[index] as number), 0);
  const average = frozenCentre ?? total(counts) / total(sizes);
  if (!(average > 0 && average < (pieces ? 1 : Infinity)))
    return undetermined(
      'no-variation',
      'The average count is 0 or the whole sample: limits at three sigma have no width',
    );
  const lines = counts.map((count, index) => plotted(kind, count, sizes[index] as number, average));
  const z = lines.map(({ value, centre, sigma }) => (value - centre) / sigma);
  const dispersion = dispersionOf(z, new Set(chosen));
  if (laney && (dispersion === null || dispersion === 0))
    return undetermined(
      'too-few',
      'Limits after Laney need at least two different samples that follow each other',
    );
  const factor = laney ? (dispersion ?? 1) : 1;
  const series = chartSeries(
    STATISTICS[kind],
    lines.map(({ value, centre, sigma, ends }, index) => ({
      point: index + 1,
      value,
      size: sizes[index] as number,
      limits: controlLimits(centre, factor * sigma, ends),
    })),
    input.rules ?? ['beyond-three-sigma'],
  );
  if (isUndetermined(series)) return series;
  return {
    method: laney ? `${kind as 'p' | 'u'}'` : kind,
    samples: counts.length,
    limitsFrom: frozenCentre === undefined ? describePhase(input.phase, counts.length) : 'frozen before',
    average,
    dispersion,
    series,
    verdict: judgeProcess([series]),
  };
}
