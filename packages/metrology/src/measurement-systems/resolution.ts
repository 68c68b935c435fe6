import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

export interface ResolutionCheck {
  readonly method: string;
  readonly inputs: {
    readonly resolution: number;
    readonly against: number;
    readonly basis: 'tolerance' | 'process-spread';
    readonly largestShare: number;
  };
  /** resolution / tolerance (or / six standard deviations) */
  readonly share: number;
  /** readable steps within the tolerance or spread */
  readonly steps: number;
  readonly verdict: 'fine-enough' | 'too-coarse';
  /** the coarsest resolution that would do */
  readonly wanted: number;
}

/**
 * Resolution of a gauge against the tolerance it checks, or against six standard deviations of the process where the study is about the process.
 * Fine enough when resolution <= largestShare x tolerance; a tenth is common practice (AIAG, Measurement Systems Analysis; from memory).
 * Equality counts as fine enough, within the last bits of the division.
 */
export function resolutionCheck(
  resolution: number,
  against: number,
  options: { readonly basis?: 'tolerance' | 'process-spread'; readonly largestShare?: number } = {},
): ResolutionCheck | Undetermined {
  const basis = options.basis ?? 'tolerance';
  const largestShare = options.largestShare ?? 0.1;
  if (!(resolution > 0 && Number.isFinite(resolution)))
    return undetermined('resolution', 'The resolution must be greater than 0');
  if (!(against > 0 && Number.isFinite(against)))
    return undetermined('no-tolerance', 'The tolerance or spread must be greater than 0');
  const share = resolution / against;
  return {
    method: 'resolution against tolerance, rule of ten',
    inputs: { resolution, against, basis, largestShare },
    share,
    steps: against / resolution,
    verdict: share <= largestShare * (1 + 1e-12) ? 'fine-enough' : 'too-coarse',
    wanted: largestShare * against,
  };
}

/**
 * The step in which readings were written down: their largest common step, found among differences of sorted distinct readings. A gauge study
 * whose readings show few steps hides its repeatability. Readings closer than a millionth of their range count as one.
 * Undetermined with fewer than two distinct readings.
 */
export function observedStep(values: readonly number[]): number | Undetermined {
  if (!values.every(Number.isFinite)) return undetermined('not-finite', 'A reading is not a number');
  const sorted = [...values].sort((a, b) => a - b);
  const range = (sorted.at(-1) ?? 0) - (sorted[0] ?? 0);
  if (!(range > 0)) return undetermined('no-variation', 'All readings are alike, so no step shows');
  const same = range * 1e-6;
  let step = 0;
  for (const [place, value] of sorted.entries()) {
    const difference = value - (sorted[place - 1] ?? value);
    if (difference > same) step = step === 0 ? difference : commonStep(step, difference, same);
  }
  return step;
}

function commonStep(a: number, b: number, same: number): number {
  let large = Math.max(a, b);
  let small = Math.min(a, b);
  while (small > same) {
    const rest = large - small * Math.round(large / small);
    large = small;
    small = Math.abs(rest);
  }
  return large;
}
