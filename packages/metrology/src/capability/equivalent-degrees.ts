import { c4 } from '../control-charts/constants.ts';

/**
 * Degrees of freedom of the standard deviation that would scatter as much as a given estimate of spread: Patnaik's matching of the
 * coefficient of variation (Biometrika 37, 1950). A standard deviation on v degrees of freedom, made unbiased, has the squared coefficient of
 * variation 1/c4(v+1)^2 - 1; this solves that equation for v, v real.
 *
 * Mean range of k subgroups of n: pass d3(n)^2 / (k d2(n)^2). Mean standard deviation: (1 - c4(n)^2) / (k c4(n)^2).
 * @param squaredVariation squared coefficient of variation of the estimate, above 0; values that correspond to less than half a degree give 0.5
 */
export function equivalentDegreesOfFreedom(squaredVariation: number): number {
  let low = 0.5;
  let high = 1 / squaredVariation + 2;
  const variationAt = (degrees: number): number => 1 / c4(degrees + 1) ** 2 - 1;
  for (let step = 0; step < 200 && high - low > 1e-13 * high; step += 1) {
    const middle = (low + high) / 2;
    if (variationAt(middle) > squaredVariation) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
