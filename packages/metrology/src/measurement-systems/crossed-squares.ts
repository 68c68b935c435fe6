import type { CrossedReadings, StudySize } from './crossed-readings.ts';

export interface CrossedSquares {
  readonly mean: number;
  readonly appraiser: number;
  readonly part: number;
  readonly interaction: number;
  readonly error: number;
  readonly total: number;
}

/**
 * Sums of squares of a balanced two-way layout, each taken from deviations and never as a difference of large sums, so that readings far from
 * zero keep their digits: part = o r sum(dev of part mean)^2, and so on down to the deviations inside each cell.
 */
export function crossedSquares(readings: CrossedReadings, size: StudySize): CrossedSquares {
  const { parts, appraisers, trials } = size;
  const origin = readings[0]?.[0]?.[0] ?? 0;
  const cells = new Float64Array(parts * appraisers);
  const byPart = new Float64Array(parts);
  const byAppraiser = new Float64Array(appraisers);
  let sum = 0;
  for (let p = 0; p < parts; p += 1) {
    for (let o = 0; o < appraisers; o += 1) {
      let cell = 0;
      for (const value of readings[p]?.[o] ?? []) cell += value - origin;
      cells[p * appraisers + o] = cell / trials;
      byPart[p] = (byPart[p] ?? 0) + cell / (trials * appraisers);
      byAppraiser[o] = (byAppraiser[o] ?? 0) + cell / (trials * parts);
      sum += cell;
    }
  }
  const mean = sum / size.n;
  let interaction = 0;
  let error = 0;
  let total = 0;
  for (let p = 0; p < parts; p += 1) {
    for (let o = 0; o < appraisers; o += 1) {
      const cell = cells[p * appraisers + o] ?? 0;
      interaction += trials * (cell - (byPart[p] ?? 0) - (byAppraiser[o] ?? 0) + mean) ** 2;
      for (const value of readings[p]?.[o] ?? []) {
        error += (value - origin - cell) ** 2;
        total += (value - origin - mean) ** 2;
      }
    }
  }
  const squaresAround = (means: Float64Array, weight: number): number =>
    means.reduce((squares, value) => squares + weight * (value - mean) ** 2, 0);
  return {
    mean: origin + mean,
    part: squaresAround(byPart, appraisers * trials),
    appraiser: squaresAround(byAppraiser, parts * trials),
    interaction,
    error,
    total,
  };
}
