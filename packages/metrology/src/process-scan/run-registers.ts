import { lineSlack } from '../control-charts/run-rules.ts';

const ONES = Uint8Array.from({ length: 32 }, (_, bits) => {
  let count = 0;
  for (let rest = bits; rest > 0; rest >>= 1) count += rest & 1;
  return count;
});

/**
 * Nelson's tests 1 to 8 on plotted points in one pass: one byte a point, bit k set when test k + 1 signals there.
 *
 * The conventions are those of `applyRunRules`, whose signals these are; instead of naming the points of a pattern,
 * short shift registers and run lengths are carried along, so the cost is a few operations a point.
 * @param values finite numbers in time order
 * @param centre centre line
 * @param sigma standard deviation of the plotted points, above 0
 */
export function signalBytes(values: ArrayLike<number>, centre: number, sigma: number): Uint8Array {
  const count = values.length;
  const signals = new Uint8Array(count);
  const slack = lineSlack(centre, sigma);
  const one = sigma + slack;
  const two = 2 * sigma + slack;
  const three = 3 * sigma + slack;
  const inner = sigma - slack;
  let previous = 0;
  let lastSide = 0;
  let sideRun = 0;
  let lastStep = 0;
  let trend = 0;
  let alternation = 0;
  let highTwo = 0;
  let lowTwo = 0;
  let highOne = 0;
  let lowOne = 0;
  let withinRun = 0;
  let outsideRun = 0;
  let sides = 0;

  for (let index = 0; index < count; index += 1) {
    const value = values[index] ?? 0;
    const deviation = value - centre;
    const distance = Math.abs(deviation);
    const side = distance <= slack ? 0 : deviation > 0 ? 1 : -1;
    const step = index === 0 || value === previous ? 0 : value > previous ? 1 : -1;
    previous = value;

    sideRun = side === 0 ? 0 : side === lastSide ? sideRun + 1 : 1;
    lastSide = side;
    trend = step === 0 ? 0 : step === lastStep ? trend + 1 : 1;
    alternation = step === 0 ? 0 : step === -lastStep ? alternation + 1 : 1;
    lastStep = step;

    const beyondOne = distance > one ? 1 : 0;
    const beyondTwo = distance > two ? 1 : 0;
    const up = deviation > 0 ? 1 : 0;
    const down = 1 - up;
    highOne = ((highOne << 1) | (beyondOne & up)) & 31;
    lowOne = ((lowOne << 1) | (beyondOne & down)) & 31;
    highTwo = ((highTwo << 1) | (beyondTwo & up)) & 7;
    lowTwo = ((lowTwo << 1) | (beyondTwo & down)) & 7;
    sides = ((sides << 1) | up) & 255;
    withinRun = distance < inner ? withinRun + 1 : 0;
    outsideRun = beyondOne ? outsideRun + 1 : 0;

    let bits = distance > three ? 1 : 0;
    if (sideRun >= 9) bits |= 2;
    if (trend >= 5) bits |= 4;
    if (alternation >= 13) bits |= 8;
    if (beyondTwo && (ONES[up ? highTwo : lowTwo] ?? 0) >= 2) bits |= 16;
    if (beyondOne && (ONES[up ? highOne : lowOne] ?? 0) >= 4) bits |= 32;
    if (withinRun >= 15) bits |= 64;
    if (outsideRun >= 8 && sides !== 0 && sides !== 255) bits |= 128;
    signals[index] = bits;
  }
  return signals;
}
