/** No instrument reads beyond; the fourth power of anything larger would leave the range of a double. */
const LARGEST = 1e50;

/** True for a number a study can calculate with: finite and not beyond 1e50. */
export function isUsableReading(value: number): boolean {
  return Math.abs(value) < LARGEST;
}
