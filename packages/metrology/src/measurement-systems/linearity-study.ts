import { tUpperQuantile, tUpperTail } from '../distributions/student-t.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { isUsableReading } from './usable-reading.ts';

/** Repeated readings of one part whose true size is known. */
export interface ReferencePart {
  readonly reference: number;
  readonly values: readonly number[];
}

export interface LinearityPoint {
  readonly reference: number;
  readonly meanBias: number;
  /** bias on the fitted line, with its confidence limits */
  readonly fitted: number;
  readonly lower: number;
  readonly upper: number;
}

export interface LinearityStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: { readonly parts: number; readonly alpha: number };
  readonly slope: number;
  readonly intercept: number;
  readonly residualDeviation: number;
  readonly rSquared: number | Undetermined;
  readonly slopeT: number;
  readonly slopeP: number;
  readonly interceptT: number;
  readonly interceptP: number;
  readonly tCritical: number;
  readonly points: readonly LinearityPoint[];
  /** 100 |slope| */
  readonly percentLinearity: number;
  /** mean bias over all readings */
  readonly meanBias: number;
  /** true when the line of zero bias lies inside the confidence band at every reference part */
  readonly zeroInsideBand: boolean;
  readonly verdict: 'acceptable' | 'not-acceptable';
}

/**
 * Linearity of a gauge: the straight line of the bias of every single reading over the reference size, with its confidence band
 * (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-B). y = a x + b by least squares; s^2 = residual sum of squares/(n - 2);
 * band at x0: b + a x0 -/+ t(1 - alpha/2, n - 2) s sqrt(1/n + (x0 - xbar)^2/Sxx).
 * Acceptable when neither slope nor intercept differs from 0 and the zero line stays inside the band at every reference part.
 * Undetermined: fewer than two distinct references or fewer than three readings, no residual spread, values that are not finite.
 */
export function linearityStudy(parts: readonly ReferencePart[], alpha = 0.05): LinearityStudy | Undetermined {
  const points = parts.flatMap((part) =>
    part.values.map((value) => ({ x: part.reference, y: value - part.reference })),
  );
  const n = points.length;
  if (!points.every(({ x, y }) => isUsableReading(x) && isUsableReading(y))) {
    return undetermined('not-finite', 'A reading or a reference is not a number');
  }
  if (!(alpha > 0 && alpha < 1)) return undetermined('alpha', 'Alpha must lie between 0 and 1');
  if (n < 3 || new Set(points.map(({ x }) => x)).size < 2) {
    return undetermined(
      'too-few',
      'A linearity study needs two or more reference sizes and three or more readings',
    );
  }
  const xMean = points.reduce((sum, { x }) => sum + x, 0) / n;
  const yMean = points.reduce((sum, { y }) => sum + y, 0) / n;
  const sxx = points.reduce((sum, { x }) => sum + (x - xMean) ** 2, 0);
  const slope = points.reduce((sum, { x, y }) => sum + (x - xMean) * (y - yMean), 0) / sxx;
  const intercept = yMean - slope * xMean;
  const residual = points.reduce((sum, { x, y }) => sum + (y - yMean - slope * (x - xMean)) ** 2, 0);
  const total = points.reduce((sum, { y }) => sum + (y - yMean) ** 2, 0);
  const s = Math.sqrt(residual / (n - 2));
  if (!(s > 0))
    return undetermined(
      'no-variation',
      'The biases lie on a line exactly: the resolution is too coarse to judge it',
    );
  const tCritical = tUpperQuantile(alpha / 2, n - 2);
  const leverage = (x: number): number => s * Math.sqrt(1 / n + (x - xMean) ** 2 / sxx);
  const slopeT = slope / (s / Math.sqrt(sxx));
  const interceptT = intercept / leverage(0);
  const band = parts.map((part): LinearityPoint => {
    const fitted = intercept + slope * part.reference;
    const half = tCritical * leverage(part.reference);
    const meanBias =
      part.values.reduce((sum, value) => sum + (value - part.reference), 0) / part.values.length;
    return { reference: part.reference, meanBias, fitted, lower: fitted - half, upper: fitted + half };
  });
  const zeroInsideBand = band.every((point) => point.lower <= 0 && point.upper >= 0);
  return {
    method: 'linearity, least squares of bias on reference size',
    n,
    inputs: { parts: parts.length, alpha },
    slope,
    intercept,
    residualDeviation: s,
    rSquared: total > 0 ? 1 - residual / total : undetermined('no-variation', 'All biases are alike'),
    slopeT,
    slopeP: 2 * tUpperTail(Math.abs(slopeT), n - 2),
    interceptT,
    interceptP: 2 * tUpperTail(Math.abs(interceptT), n - 2),
    tCritical,
    points: band,
    percentLinearity: 100 * Math.abs(slope),
    meanBias: yMean,
    zeroInsideBand,
    verdict:
      zeroInsideBand && Math.abs(slopeT) <= tCritical && Math.abs(interceptT) <= tCritical
        ? 'acceptable'
        : 'not-acceptable',
  };
}
