/**
 * Root of a rising function: brackets it from `start` by doubling steps, then closes in with the method of Brent
 * (inverse quadratic, secant or bisection, whichever is safe) to the last digits of a double.
 */
export function findRoot(f: (x: number) => number, start: number, firstStep: number): number {
  let a = start;
  let fa = f(a);
  if (fa === 0) return a;
  let step = fa < 0 ? firstStep : -firstStep;
  let b = a + step;
  let fb = f(b);
  for (let round = 0; round < 200 && fa * fb > 0; round += 1) {
    step *= 2;
    a = b;
    fa = fb;
    b = a + step;
    fb = f(b);
  }
  return closeIn(f, a, fa, b, fb);
}

/** The part of Brent's method between two points of opposite sign; values may be infinite at an end. */
function closeIn(f: (x: number) => number, x0: number, f0: number, x1: number, f1: number): number {
  let [a, fa, b, fb] = Math.abs(f0) < Math.abs(f1) ? [x1, f1, x0, f0] : [x0, f0, x1, f1];
  let [c, fc] = [a, fa];
  let d = b - a;
  let e = d;
  for (let round = 0; round < 300 && fb !== 0; round += 1) {
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      d = b - a;
      e = d;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const tolerance = 1.2e-16 * Math.abs(b) + 1e-300;
    const half = (c - b) / 2;
    if (Math.abs(half) <= tolerance) break;
    let next = NaN;
    if (Math.abs(e) > tolerance && Math.abs(fa) > Math.abs(fb)) {
      const s = fb / fa;
      const q = fa / fc;
      const r = fb / fc;
      const secant = a === c;
      const numerator = secant ? 2 * half * s : s * (2 * half * q * (q - r) - (b - a) * (r - 1));
      const denominator = secant ? 1 - s : (q - 1) * (r - 1) * (s - 1);
      next = -numerator / denominator;
      if (!(2 * Math.abs(next) < Math.min(3 * Math.abs(half) - tolerance, Math.abs(e))) || next * half < 0)
        next = NaN;
    }
    e = Number.isFinite(next) ? d : half;
    d = Number.isFinite(next) ? next : half;
    a = b;
    fa = fb;
    b += Math.abs(d) > tolerance ? d : Math.sign(half) * tolerance;
    fb = f(b);
  }
  return b;
}
