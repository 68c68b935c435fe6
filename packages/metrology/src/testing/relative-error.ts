/** |actual − expected| relative to the expected value (absolute where that is 0); used by tests only. */
export function relativeError(actual: number, expected: number): number {
  const error = Math.abs(actual - expected);
  return expected === 0 ? error : error / Math.abs(expected);
}
