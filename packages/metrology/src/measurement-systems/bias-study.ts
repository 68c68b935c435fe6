import { equivalentDegreesOfFreedom } from '../capability/equivalent-degrees.ts';
import { d2, d3 } from '../control-charts/constants.ts';
import { tUpperQuantile, tUpperTail } from '../distributions/student-t.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { isUsableReading } from './usable-reading.ts';
import { d2Star } from './average-range-study.ts';

export interface BiasOptions {
  /** Error of both sides together, default 0.05. */
  readonly alpha?: number;
  /** `deviation` (default): sample standard deviation, n - 1 degrees of freedom. `range`: range / d2*, as the manual's form does by hand. */
  readonly spread?: 'deviation' | 'range';
  /** Constants of a printed table for the range form, to follow a report that used them; computed from their definitions when missing. */
  readonly tableConstants?: {
    readonly d2: number;
    readonly d2Star: number;
    readonly degreesOfFreedom: number;
  };
  /** Known spread of the process or the tolerance / 6: the bias is also given in per cent of six times it. */
  readonly processDeviation?: number;
}

export interface BiasStudy {
  readonly method: string;
  readonly n: number;
  readonly inputs: { readonly reference: number; readonly alpha: number };
  readonly mean: number;
  readonly bias: number;
  readonly repeatability: number;
  /** repeatability / sqrt(n) */
  readonly standardError: number;
  readonly degreesOfFreedom: number;
  readonly t: number;
  readonly p: number;
  readonly tCritical: number;
  readonly lower: number;
  readonly upper: number;
  /** true when the interval holds 0: no bias was shown */
  readonly biasNotShown: boolean;
  readonly percentOfProcess: number | Undetermined;
}

/**
 * Bias of a gauge from repeated readings of one part of known size: bias = mean - reference, with a two-sided t interval
 * (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-B, independent-sample method).
 *
 * Spread `deviation`: s/sqrt(n), n - 1 degrees of freedom, half-width t s/sqrt(n). Spread `range`: s = R/d2*(n, 1), degrees of freedom by
 * Patnaik's matching (10.8 for 15 readings), half-width t (d2/d2*) s/sqrt(n) as the manual prints it. The manual's d2 of 15 readings, 3.47193, is
 * 1e-4 above the exact 3.47183; `tableConstants` follows a report that used it.
 * Undetermined: fewer than two readings (more than 25 for the range), no variation at all, values that are not finite.
 * Tested against the reference case msa-bias-independent-sample.
 */
export function biasStudy(
  values: readonly number[],
  reference: number,
  options: BiasOptions = {},
): BiasStudy | Undetermined {
  const n = values.length;
  if (n < 2) return undetermined('too-few', 'A bias study needs two or more readings');
  if (![...values, reference].every(isUsableReading))
    return undetermined('not-finite', 'A reading or the reference is not a number');
  const alpha = options.alpha ?? 0.05;
  if (!(alpha > 0 && alpha < 1)) return undetermined('alpha', 'Alpha must lie between 0 and 1');
  const bias = values.reduce((sum, value) => sum + (value - reference), 0) / n;
  const estimate =
    options.spread === 'range'
      ? byRange(values, options.tableConstants)
      : byDeviation(values, bias, reference);
  if ('undetermined' in estimate) return estimate;
  if (!(estimate.repeatability > 0)) {
    return undetermined(
      'no-variation',
      'All readings are alike: the resolution is too coarse to judge the bias',
    );
  }
  const { degreesOfFreedom } = estimate;
  const standardError = estimate.repeatability / Math.sqrt(n);
  const t = bias / standardError;
  const tCritical = tUpperQuantile(alpha / 2, degreesOfFreedom);
  const half = tCritical * standardError * estimate.widthFactor;
  const process = options.processDeviation;
  return {
    method: estimate.method,
    n,
    inputs: { reference, alpha },
    mean: reference + bias,
    bias,
    repeatability: estimate.repeatability,
    standardError,
    degreesOfFreedom,
    t,
    p: 2 * tUpperTail(Math.abs(t), degreesOfFreedom),
    tCritical,
    lower: bias - half,
    upper: bias + half,
    biasNotShown: Math.abs(bias) <= half,
    percentOfProcess:
      process !== undefined && process > 0
        ? (100 * Math.abs(bias)) / (6 * process)
        : undetermined('no-process', 'Give the spread of the process to compare the bias with'),
  };
}

interface SpreadEstimate {
  readonly method: string;
  readonly repeatability: number;
  readonly degreesOfFreedom: number;
  readonly widthFactor: number;
}

function byDeviation(values: readonly number[], bias: number, reference: number): SpreadEstimate {
  const squares = values.reduce((sum, value) => sum + (value - reference - bias) ** 2, 0);
  return {
    method: 'bias, independent readings, standard deviation',
    repeatability: Math.sqrt(squares / (values.length - 1)),
    degreesOfFreedom: values.length - 1,
    widthFactor: 1,
  };
}

function byRange(
  values: readonly number[],
  printed: BiasOptions['tableConstants'],
): SpreadEstimate | Undetermined {
  const n = values.length;
  if (n > 25)
    return undetermined('too-many', 'The range serves up to 25 readings; use the standard deviation');
  const constants = printed ?? {
    d2: d2(n),
    d2Star: d2Star(n, 1),
    degreesOfFreedom: equivalentDegreesOfFreedom((d3(n) / d2(n)) ** 2),
  };
  return {
    method: `bias, independent readings, range / d2*${printed ? ' of a printed table' : ''}`,
    repeatability: (Math.max(...values) - Math.min(...values)) / constants.d2Star,
    degreesOfFreedom: constants.degreesOfFreedom,
    widthFactor: constants.d2 / constants.d2Star,
  };
}
