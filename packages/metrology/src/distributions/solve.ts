/**
 * Root of ln F(x) = ln target in ln x: nearly straight for the tails of the distributions here, so Newton's method
 * takes few steps; a bracket found by doubling keeps it safe, and bisection replaces a step that leaves it.
 */
function solve(
  value: (x: number) => number,
  density: (x: number) => number,
  target: number,
  start: number,
  sign: 1 | -1,
): number {
  const goal = Math.log(target);
  let low = -Infinity;
  let high = Infinity;
  let reach = 2;
  let u = Math.log(start);
  for (let step = 0; step < 300; step += 1) {
    const x = Math.exp(u);
    const current = value(x);
    const gap = current > 0 ? Math.log(current) - goal : -Infinity;
    if (gap === 0) return x;
    const below = gap * sign < 0;
    if (below) low = u;
    else high = u;
    let next = u - (gap * current) / (density(x) * x * sign);
    if (Math.abs(next - u) <= 3e-16 * Math.max(1, Math.abs(u))) return Math.exp(next);
    if (!(Math.abs(next - u) < reach)) {
      next = below ? u + reach : u - reach;
      reach *= 2;
    }
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (next === u) return x;
    u = next;
  }
  return Math.exp(u);
}

/** x > 0 with F(x) = target for F rising from 0; `density` is its derivative. */
export function solveIncreasing(
  value: (x: number) => number,
  density: (x: number) => number,
  target: number,
  start: number,
): number {
  return solve(value, density, target, start, 1);
}

/** x > 0 with F(x) = target for F falling to 0; `density` is minus its derivative. */
export function solveDecreasing(
  value: (x: number) => number,
  density: (x: number) => number,
  target: number,
  start: number,
): number {
  return solve(value, density, target, start, -1);
}
