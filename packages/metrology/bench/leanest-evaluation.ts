/** Check sums of one evaluation of all characteristics, to see that every way of computing does the same work. */
export interface CheckSums {
  rules: number[];
  cpk: number;
  ppk: number;
  cp: number;
  ends: number;
  beyond: number;
}

const ONES = Uint8Array.from(
  { length: 32 },
  (_, bits) => [...bits.toString(2)].filter((bit) => bit === '1').length,
);
const PAIR = 2 / Math.sqrt(Math.PI);
const RANGE_FACTOR = 1 + (3 * Math.sqrt(2 - 4 / Math.PI)) / PAIR;

/**
 * The leanest loop that does the whole evaluation: one block of numbers, no results but sums, nothing checked.
 * Summary, moving ranges, natural limits, Nelson's eight tests by shift registers, four indices.
 */
export function leanestEvaluation(
  block: Float64Array,
  characteristics: number,
  readings: number,
  lower: number,
  upper: number,
): CheckSums {
  const counts = new Float64Array(8);
  let [cpk, ppk, cp, ends, beyond] = [0, 0, 0, 0, 0];
  for (let row = 0; row < characteristics; row += 1) {
    const from = row * readings;
    const to = from + readings;
    let sum = 0;
    let ranges = 0;
    let low = Infinity;
    let high = -Infinity;
    let before = block[from] as number;
    for (let at = from; at < to; at += 1) {
      const value = block[at] as number;
      sum += value;
      ranges += Math.abs(value - before);
      before = value;
      if (value < low) low = value;
      if (value > high) high = value;
    }
    const mean = sum / readings;
    let squares = 0;
    for (let at = from; at < to; at += 1) {
      const deviation = (block[at] as number) - mean;
      squares += deviation * deviation;
    }
    const s = Math.sqrt(squares / (readings - 1));
    const range = ranges / (readings - 1);
    const sigma = range / PAIR;
    const rangeLimit = RANGE_FACTOR * range;
    let [side, sideRun, step, trend, alternation, h2, l2, h1, l1, within, outside, sides] = [
      0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0,
    ];
    before = block[from] as number;
    for (let at = from; at < to; at += 1) {
      const value = block[at] as number;
      const move = value - before;
      before = value;
      if (Math.abs(move) > rangeLimit) beyond += 1;
      const deviation = value - mean;
      const distance = Math.abs(deviation);
      const newSide = deviation > 0 ? 1 : deviation < 0 ? -1 : 0;
      const newStep = move > 0 ? 1 : move < 0 ? -1 : 0;
      sideRun = newSide === 0 ? 0 : newSide === side ? sideRun + 1 : 1;
      side = newSide;
      trend = newStep === 0 ? 0 : newStep === step ? trend + 1 : 1;
      alternation = newStep === 0 ? 0 : newStep === -step ? alternation + 1 : 1;
      step = newStep;
      const one = distance > sigma ? 1 : 0;
      const two = distance > 2 * sigma ? 1 : 0;
      const up = deviation > 0 ? 1 : 0;
      h2 = ((h2 << 1) | (two & up)) & 7;
      l2 = ((l2 << 1) | (two & (1 - up))) & 7;
      h1 = ((h1 << 1) | (one & up)) & 31;
      l1 = ((l1 << 1) | (one & (1 - up))) & 31;
      sides = ((sides << 1) | up) & 255;
      within = distance < sigma ? within + 1 : 0;
      outside = one ? outside + 1 : 0;
      if (distance > 3 * sigma) counts[0] = (counts[0] as number) + 1;
      if (sideRun >= 9) counts[1] = (counts[1] as number) + 1;
      if (trend >= 5) counts[2] = (counts[2] as number) + 1;
      if (alternation >= 13) counts[3] = (counts[3] as number) + 1;
      if (two && (ONES[up ? h2 : l2] as number) >= 2) counts[4] = (counts[4] as number) + 1;
      if (one && (ONES[up ? h1 : l1] as number) >= 4) counts[5] = (counts[5] as number) + 1;
      if (within >= 15) counts[6] = (counts[6] as number) + 1;
      if (outside >= 8 && sides !== 0 && sides !== 255) counts[7] = (counts[7] as number) + 1;
    }
    const room = Math.min(upper - mean, mean - lower);
    cpk += room / (3 * sigma);
    ppk += room / (3 * s);
    cp += (upper - lower) / (6 * sigma);
    ends += high - low;
  }
  return { rules: [...counts], cpk, ppk, cp, ends, beyond };
}
