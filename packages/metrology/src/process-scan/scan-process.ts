import type { NumericLimits } from '../conformance/conformance-probability.ts';
import { NELSON_RULES } from '../control-charts/rules.ts';
import type { RunRule } from '../control-charts/rules.ts';
import { POINTS_TO_SHOW_CONTROL } from '../control-charts/verdict.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { signalBytes } from './run-registers.ts';

/** d2 for two readings: the mean range of a pair is 2σ/√π. */
const D2_OF_TWO = 2 / Math.sqrt(Math.PI);
/** d3 for two readings: the standard deviation of the range of a pair is σ·√(2 − 4/π). */
const D3_OF_TWO = Math.sqrt(2 - 4 / Math.PI);
const UPPER_RANGE_FACTOR = 1 + (3 * D3_OF_TWO) / D2_OF_TWO;

/** Everything a row of a worklist shows of one characteristic, from single readings in production order. */
export interface ProcessScan {
  readonly method: 'individuals and moving ranges of two, Nelson tests 1 to 8';
  readonly n: number;
  readonly mean: number;
  readonly standardDeviation: number;
  readonly minimum: number;
  readonly maximum: number;
  readonly meanMovingRange: number;
  /** MR̄/d2(2): the spread between neighbours. */
  readonly withinSigma: number;
  /** Natural limits x̄ ± 3·MR̄/d2 of the process; never tolerance limits. */
  readonly naturalLimits: { readonly lower: number; readonly upper: number };
  readonly movingRangeUpper: number;
  /** One byte a reading, bit k for test k + 1. */
  readonly signals: Uint8Array;
  /** Readings at which each test signals, by rule. */
  readonly signalCounts: Readonly<Record<RunRule, number>>;
  readonly movingRangesBeyond: number;
  readonly control: 'in-control' | 'not-in-control' | 'too-few';
  readonly indices: ScanIndices;
  /** False unless control was shown: the indices then describe these readings and predict nothing. */
  readonly indicesAreCapability: boolean;
}

/** Indices by the ordinary formula; null where a side has no limit. Within: MR̄/d2; overall: s. */
export interface ScanIndices {
  readonly cp: number | null;
  readonly cpk: number;
  readonly pp: number | null;
  readonly ppk: number;
}

interface Sums {
  mean: number;
  deviation: number;
  minimum: number;
  maximum: number;
  movingRange: number;
}

function sumsOf(values: ArrayLike<number>): Sums | Undetermined {
  const count = values.length;
  if (count < 2) return undetermined('too-few', 'A process needs at least two readings');
  let minimum = values[0] ?? 0;
  let maximum = minimum;
  let sum = 0;
  let ranges = 0;
  let previous = minimum;
  for (let index = 0; index < count; index += 1) {
    const value = values[index] ?? 0;
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
    sum += value;
    ranges += Math.abs(value - previous);
    previous = value;
  }
  if (!Number.isFinite(sum + ranges))
    return undetermined(
      'not-finite',
      'One of the readings is not a finite number: leave it out or correct it',
    );
  const centre = sum / count;
  let rest = 0;
  let squares = 0;
  for (let index = 0; index < count; index += 1) {
    const deviation = (values[index] ?? 0) - centre;
    rest += deviation;
    squares += deviation * deviation;
  }
  return {
    mean: centre + rest / count,
    deviation: Math.sqrt((squares - (rest * rest) / count) / (count - 1)),
    minimum,
    maximum,
    movingRange: ranges / (count - 1),
  };
}

function indicesOf(mean: number, within: number, overall: number, limits: NumericLimits): ScanIndices {
  const { lower, upper } = limits;
  const room = Math.min(lower === null ? Infinity : mean - lower, upper === null ? Infinity : upper - mean);
  const width = lower === null || upper === null ? null : upper - lower;
  return {
    cp: width === null ? null : width / (6 * within),
    cpk: room / (3 * within),
    pp: width === null ? null : width / (6 * overall),
    ppk: room / (3 * overall),
  };
}

function rangesBeyond(values: ArrayLike<number>, limit: number): number {
  let count = 0;
  for (let index = 1; index < values.length; index += 1)
    if (Math.abs((values[index] ?? 0) - (values[index - 1] ?? 0)) > limit) count += 1;
  return count;
}

function countSignals(signals: Uint8Array): Record<RunRule, number> {
  const counts = new Uint32Array(NELSON_RULES.length);
  for (let index = 0; index < signals.length; index += 1) {
    let bits = signals[index] ?? 0;
    for (let rule = 0; bits > 0; rule += 1, bits >>= 1) counts[rule] = (counts[rule] ?? 0) + (bits & 1);
  }
  return Object.fromEntries(NELSON_RULES.map((rule, index) => [rule, counts[index] ?? 0])) as Record<
    RunRule,
    number
  >;
}

/**
 * Scans one characteristic from its single readings: summary, moving ranges, natural limits, eight run rules, indices.
 *
 * x̄ and s (divisor n − 1, two passes, corrected); MR̄ mean of |x(i) − x(i−1)|; within σ = MR̄/d2(2) = MR̄·√π/2; natural
 * limits x̄ ± 3σ, upper limit of the ranges (1 + 3·d3/d2)·MR̄; Nelson's tests 1 to 8 against x̄ and σ with the
 * conventions of `applyRunRules`; Cp = T/6σ, Cpk = min side/3σ, Pp and Ppk the same with s. It is the lean form for
 * whole packages (linear, a few allocations); `capabilityStudy` and the charts give the full answers for one row.
 * In control: no test signals, no range is beyond its limit, at least 20 readings. Source: Nelson 1984; NIST/SEMATECH
 * e-Handbook 6.3.2.2. @param values readings in production order @param limits tolerance limits, null for an open side
 * (pass null for a natural bound). Undetermined: fewer than two readings, one not finite, none differing, no limit,
 * crossed limits.
 */
export function scanProcess(values: ArrayLike<number>, limits: NumericLimits): ProcessScan | Undetermined {
  const { lower, upper } = limits;
  if (lower === null && upper === null)
    return undetermined('no-limits', 'There is no tolerance limit: enter at least one');
  if (!Number.isFinite((lower ?? 0) + (upper ?? 0)))
    return undetermined('not-finite', 'A tolerance limit is not a finite number: correct it');
  if (lower !== null && upper !== null && lower > upper)
    return undetermined(
      'limits-crossed',
      'The lower limit is above the upper limit: exchange or correct them',
    );
  const sums = sumsOf(values);
  if ('undetermined' in sums) return sums;
  const { mean, deviation, minimum, maximum, movingRange } = sums;
  if (movingRange === 0)
    return undetermined(
      'no-variation',
      'All readings are equal: the resolution may be too coarse for a study',
    );
  const withinSigma = movingRange / D2_OF_TWO;
  const movingRangeUpper = UPPER_RANGE_FACTOR * movingRange;
  const signals = signalBytes(values, mean, withinSigma);
  const signalCounts = countSignals(signals);
  const movingRangesBeyond = rangesBeyond(values, movingRangeUpper);
  const clean = movingRangesBeyond === 0 && NELSON_RULES.every((rule) => signalCounts[rule] === 0);
  const control = !clean
    ? 'not-in-control'
    : values.length < POINTS_TO_SHOW_CONTROL
      ? 'too-few'
      : 'in-control';
  return {
    method: 'individuals and moving ranges of two, Nelson tests 1 to 8',
    n: values.length,
    mean,
    standardDeviation: deviation,
    minimum,
    maximum,
    meanMovingRange: movingRange,
    withinSigma,
    naturalLimits: { lower: mean - 3 * withinSigma, upper: mean + 3 * withinSigma },
    movingRangeUpper,
    signals,
    signalCounts,
    movingRangesBeyond,
    control,
    indices: indicesOf(mean, withinSigma, deviation, limits),
    indicesAreCapability: control === 'in-control',
  };
}
