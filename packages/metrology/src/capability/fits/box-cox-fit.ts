import { chiSquareQuantile } from '../../distributions/chi-square.ts';
import { findRoot } from '../../distributions/find-root.ts';
import { undetermined } from '../../result.ts';
import type { Undetermined } from '../../result.ts';
import type { Distribution, FittedModel } from './fitted-model.ts';
import { normalDistribution } from './normal-fits.ts';
import { onBound, positiveReadings } from './positive-readings.ts';
import type { PositiveReadings } from './positive-readings.ts';

const LARGEST_LAMBDA = 5;

export interface BoxCoxTransformation {
  readonly method: string;
  readonly n: number;
  readonly lambda: number;
  /** profile log likelihood -n/2 ln(var_n(y)) + (lambda - 1) sum ln x, constants dropped */
  readonly logLikelihood: number;
  readonly logLikelihoodAt0: number;
  readonly logLikelihoodAt1: number;
  readonly confidence: number;
  /** likelihood-ratio limits of lambda */
  readonly lower: number;
  readonly upper: number;
  readonly includesLog: boolean;
  readonly includesIdentity: boolean;
}

/** Mean and variance (n) of y = (w^lambda - 1)/lambda with w = x/geometric mean. */
function transformedMoments(readings: PositiveReadings, lambda: number): { mean: number; variance: number } {
  const { n, logs, meanLog } = readings;
  const transform = transformer(lambda);
  const powers = logs.map((log) => transform(log - meanLog));
  let sum = 0;
  for (const y of powers) sum += y;
  const mean = sum / n;
  let squares = 0;
  for (const y of powers) squares += (y - mean) * (y - mean);
  return { mean, variance: squares / n };
}

function transformer(lambda: number): (log: number) => number {
  return Math.abs(lambda) < 1e-12 ? (log) => log : (log) => Math.expm1(lambda * log) / lambda;
}

/** In units of the geometric mean the Jacobian is gone: -n/2 ln(variance) - n mean(ln x). */
function profile(readings: PositiveReadings, lambda: number): number {
  return (
    -0.5 * readings.n * Math.log(transformedMoments(readings, lambda).variance) -
    readings.n * readings.meanLog
  );
}

/** Golden section on [-5, 5]; the profile of real data has one peak there. */
function likeliest(readings: PositiveReadings): number {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let low = -LARGEST_LAMBDA;
  let high = LARGEST_LAMBDA;
  let left = high - ratio * (high - low);
  let right = low + ratio * (high - low);
  let fLeft = profile(readings, left);
  let fRight = profile(readings, right);
  while (high - low > 1e-7) {
    if (fLeft < fRight) {
      low = left;
      [left, fLeft] = [right, fRight];
      right = low + ratio * (high - low);
      fRight = profile(readings, right);
    } else {
      high = right;
      [right, fRight] = [left, fLeft];
      left = high - ratio * (high - low);
      fLeft = profile(readings, left);
    }
  }
  return (low + high) / 2;
}

/**
 * Box-Cox power that makes positive readings most nearly normal, y = (x^lambda - 1)/lambda, ln x at 0, by maximum profile likelihood on
 * [-5, 5] (Box and Cox, J. R. Stat. Soc. B 26, 1964), with likelihood-ratio limits.
 * @param origin natural bound subtracted first
 * Undetermined: fewer than three readings, all alike, a reading on or below the bound, or no peak inside the range.
 * Tested against the reference case boxcox-rupture-strength.
 */
export function boxCoxTransformation(
  values: readonly number[],
  origin = 0,
  confidence = 0.95,
): BoxCoxTransformation | Undetermined {
  const readings = positiveReadings(values, origin);
  if ('undetermined' in readings) return readings;
  const refused = onBound(readings);
  if (refused) return refused;
  const lambda = likeliest(readings);
  if (Math.abs(lambda) > LARGEST_LAMBDA - 1e-6) return noPeak();
  const logLikelihood = profile(readings, lambda);
  const drop = chiSquareQuantile(confidence, 1) / 2;
  const excess = (trial: number): number => logLikelihood - drop - profile(readings, trial);
  const lower = findRoot((step) => excess(lambda - step), 0.1, 0.5);
  const upper = findRoot((step) => excess(lambda + step), 0.1, 0.5);
  const limits = { lower: lambda - lower, upper: lambda + upper };
  return {
    method: 'Box-Cox, maximum profile likelihood',
    n: readings.n,
    lambda,
    logLikelihood,
    logLikelihoodAt0: profile(readings, 0),
    logLikelihoodAt1: profile(readings, 1),
    confidence,
    ...limits,
    includesLog: limits.lower <= 0 && limits.upper >= 0,
    includesIdentity: limits.lower <= 1 && limits.upper >= 1,
  };
}

function noPeak(): Undetermined {
  return undetermined(
    'no-fit',
    `No power between -${LARGEST_LAMBDA} and ${LARGEST_LAMBDA} makes these readings normal`,
  );
}

/** Normal distribution after the likeliest power. Parameters: lambda, scale (geometric mean), mean and deviation (n - 1) of the powers. */
export function fitBoxCox(readings: PositiveReadings): FittedModel | Undetermined {
  const refused = onBound(readings);
  if (refused) return refused;
  const { n, origin, meanLog } = readings;
  const lambda = likeliest(readings);
  if (Math.abs(lambda) > LARGEST_LAMBDA - 1e-6) return noPeak();
  const { mean, variance } = transformedMoments(readings, lambda);
  return {
    family: 'box-cox',
    method: 'maximum profile likelihood of the power, mean and sample standard deviation of the powers',
    n,
    origin,
    parameters: { lambda, scale: Math.exp(meanLog), mean, deviation: Math.sqrt((variance * n) / (n - 1)) },
    estimated: 3,
    logLikelihood: profile(readings, lambda) - 0.5 * n * (Math.log(2 * Math.PI) + 1),
  };
}

export function boxCoxDistribution(
  lambda: number,
  scale: number,
  mean: number,
  deviation: number,
): Distribution {
  const normal = normalDistribution(mean, deviation);
  const transform = transformer(lambda);
  // A power that leaves its range means that the curve ends there: at 0 for positive lambda, nowhere for negative.
  const back = (y: number): number => {
    if (Math.abs(lambda) < 1e-12) return scale * Math.exp(y);
    if (1 + lambda * y <= 0) return lambda > 0 ? 0 : Infinity;
    return scale * Math.exp(Math.log1p(lambda * y) / lambda);
  };
  return {
    lowerTail: (x) => (x <= 0 ? 0 : normal.lowerTail(transform(Math.log(x / scale)))),
    upperTail: (x) => (x <= 0 ? 1 : normal.upperTail(transform(Math.log(x / scale)))),
    lowerQuantile: (p) => back(normal.lowerQuantile(p)),
    upperQuantile: (p) => back(normal.upperQuantile(p)),
  };
}
