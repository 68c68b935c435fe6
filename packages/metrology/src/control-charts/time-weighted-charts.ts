import { isUndetermined, undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { summarize } from '../statistics/summarize.ts';
import { d2 } from './constants.ts';

/** Values in time order with the centre and deviation that hold for them; estimated from the values unless told. */
export interface TimeWeightedInput {
  readonly values: readonly number[];
  /** Target or centre; the mean unless told. */
  readonly centre?: number;
  /** Deviation of one value; mean moving range over d2(2) unless told. */
  readonly sigma?: number;
}

/** Where centre and sigma come from. */
interface Base {
  readonly centre: number;
  readonly sigma: number;
  readonly centreFrom: 'mean of the values' | 'given';
  readonly sigmaFrom: 'mean moving range over d2' | 'given';
}

function baseOf({ values, centre, sigma }: TimeWeightedInput): Base | Undetermined {
  const summary = summarize(values);
  if (isUndetermined(summary)) return summary;
  let total = 0;
  for (let index = 1; index < values.length; index += 1)
    total += Math.abs((values[index] as number) - (values[index - 1] as number));
  if (sigma === undefined && values.length < 2)
    return undetermined('too-few', 'Sigma is not given and cannot be estimated from fewer than two values');
  const used = sigma ?? total / (values.length - 1) / d2(2);
  if (!(used > 0 && used < Infinity))
    return undetermined('no-variation', 'Sigma must be a finite number above 0');
  if (centre !== undefined && !Number.isFinite(centre))
    return undetermined('not-finite', 'The centre must be a finite number');
  return {
    centre: centre ?? summary.mean,
    sigma: used,
    centreFrom: centre === undefined ? 'mean of the values' : 'given',
    sigmaFrom: sigma === undefined ? 'mean moving range over d2' : 'given',
  };
}

/** Exponentially weighted moving average. */
export interface EwmaChart extends Base {
  readonly method: 'ewma';
  readonly n: number;
  readonly lambda: number;
  readonly width: number;
  readonly points: readonly {
    readonly point: number;
    readonly value: number;
    readonly lower: number;
    readonly upper: number;
  }[];
  readonly beyond: readonly number[];
}

/**
 * Chart of the exponentially weighted moving average z(i) = λx(i) + (1 − λ)z(i−1), z(0) = centre, with limits
 * centre ± L·σ√(λ/(2 − λ)·(1 − (1 − λ)^(2i))), which widen to their final place over the first points.
 *
 * It finds small lasting shifts; λ 0.05 to 0.3 and L 2.7 to 3 are common practice (0.2 and 3 unless told).
 * Source: ISO 7870-6:2016; NIST/SEMATECH e-Handbook 6.3.2.4. A point on a limit is not beyond it.
 */
export function ewmaChart(
  input: TimeWeightedInput & { readonly lambda?: number; readonly width?: number },
): EwmaChart | Undetermined {
  const { lambda = 0.2, width = 3 } = input;
  if (!(lambda > 0 && lambda <= 1))
    return undetermined('outside-domain', 'Lambda must be above 0 and not above 1');
  if (!(width > 0 && width < Infinity))
    return undetermined('outside-domain', 'The width of the limits must be above 0');
  const base = baseOf(input);
  if (isUndetermined(base)) return base;
  let z = base.centre;
  const points = input.values.map((x, index) => {
    z = lambda * x + (1 - lambda) * z;
    const reach =
      width *
      base.sigma *
      Math.sqrt((lambda / (2 - lambda)) * -Math.expm1(2 * (index + 1) * Math.log1p(-lambda)));
    return { point: index + 1, value: z, lower: base.centre - reach, upper: base.centre + reach };
  });
  const slack = 8 * Number.EPSILON * (Math.abs(base.centre) + base.sigma);
  return {
    method: 'ewma',
    ...base,
    n: points.length,
    lambda,
    width,
    points,
    beyond: points.filter((p) => p.value > p.upper + slack || p.value < p.lower - slack).map((p) => p.point),
  };
}

/** Tabular cumulative sums in units of the values. */
export interface CusumChart extends Base {
  readonly method: 'tabular cusum';
  readonly n: number;
  /** K = k·σ, half the shift to be found. */
  readonly allowance: number;
  /** H = h·σ. */
  readonly decision: number;
  readonly points: readonly { readonly point: number; readonly upper: number; readonly lower: number }[];
  /** A signal with the estimate of when the shift began and where the mean went. */
  readonly signals: readonly {
    readonly point: number;
    readonly side: 'above' | 'below';
    readonly begunAfter: number;
    readonly estimatedMean: number;
  }[];
}

/**
 * Tabular cumulative sums: C⁺(i) = max(0, x(i) − (centre + K) + C⁺(i−1)), C⁻(i) = max(0, (centre − K) − x(i) + C⁻(i−1)); a
 * signal where one exceeds H. K = k·σ and H = h·σ; k 0.5 with h 5 finds a shift of one sigma in about 10 points, a false
 * signal comes about every 465 (D. C. Montgomery, Introduction to Statistical Quality Control, section 9.1, from memory).
 * `headStart` begins both sums at that share of H (0.5 is the fast initial response of Lucas and Crosier, 1982).
 * Source: ISO 7870-4:2021; NIST/SEMATECH e-Handbook 6.3.2.3.
 */
export function cusumChart(
  input: TimeWeightedInput & { readonly k?: number; readonly h?: number; readonly headStart?: number },
): CusumChart | Undetermined {
  const { k = 0.5, h = 5, headStart = 0 } = input;
  if (!(k >= 0 && k < Infinity && h > 0 && h < Infinity))
    return undetermined('outside-domain', 'k must be 0 or more and h above 0');
  if (!(headStart >= 0 && headStart < 1))
    return undetermined('outside-domain', 'The head start is a share of h below 1');
  const base = baseOf(input);
  if (isUndetermined(base)) return base;
  const allowance = k * base.sigma;
  const decision = h * base.sigma;
  const slack = 8 * Number.EPSILON * (Math.abs(base.centre) + decision);
  let [upper, lower] = [headStart * decision, headStart * decision];
  let [zeroAbove, zeroBelow] = [0, 0];
  const points: { point: number; upper: number; lower: number }[] = [];
  const signals: CusumChart['signals'][number][] = [];
  input.values.forEach((x, index) => {
    const point = index + 1;
    upper = Math.max(0, x - (base.centre + allowance) + upper);
    lower = Math.max(0, base.centre - allowance - x + lower);
    if (upper === 0) zeroAbove = point;
    if (lower === 0) zeroBelow = point;
    points.push({ point, upper, lower });
    if (upper > decision + slack) {
      const estimatedMean = base.centre + allowance + upper / (point - zeroAbove);
      signals.push({ point, side: 'above', begunAfter: zeroAbove, estimatedMean });
    }
    if (lower > decision + slack) {
      const estimatedMean = base.centre - allowance - lower / (point - zeroBelow);
      signals.push({ point, side: 'below', begunAfter: zeroBelow, estimatedMean });
    }
  });
  return { method: 'tabular cusum', ...base, n: points.length, allowance, decision, points, signals };
}
