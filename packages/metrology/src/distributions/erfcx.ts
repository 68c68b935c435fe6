/**
 * Chebyshev coefficients of (1 + 2x)·exp(x²)·erfc(x) for x ≥ 0 in t = (x − 3.75)/(x + 3.75), computed with
 * 50 digits by testing/fixtures/generate-erfcx.py.
 */
const COEFFICIENTS = [
  1.1775789345674017, -0.004590054580646478, -0.08424913336651792, 0.05920993999819189, -0.026658668435305753,
  0.009074997670705265, -0.002413163540417608, 0.0004907758365258086, -0.00006916973302501207,
  0.00000413902798607301, 7.74038306619849e-7, -2.1886401049234397e-7, 1.076499946567091e-8,
  4.521959811218287e-9, -7.754400208831351e-10, -6.318088340886684e-11, 2.86879501093067e-11,
  1.9455868545777347e-13, -9.65469674843344e-13, 3.25254814814874e-14, 3.3478119482868056e-14,
  -1.864562880419313e-15, -1.2507950530688648e-15, 7.418235256624044e-17, 5.068148904796111e-17,
];

/**
 * Scaled complementary error function exp(x²)·erfc(x) for x ≥ 0, relative error below 1e-15.
 * It falls like 1/(x√π), so a normal tail written with it keeps all digits however deep it is.
 */
export function erfcx(x: number): number {
  const t = (x - 3.75) / (x + 3.75);
  const twice = 2 * t;
  let b1 = 0;
  let b2 = 0;
  for (let index = COEFFICIENTS.length - 1; index > 0; index -= 1) {
    const next = twice * b1 - b2 + (COEFFICIENTS[index] as number);
    b2 = b1;
    b1 = next;
  }
  return (t * b1 - b2 + (COEFFICIENTS[0] as number)) / (1 + 2 * x);
}
