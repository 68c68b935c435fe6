import type { ExactReadings } from './readings.ts';

/** Exact sums of the deviations d from the origin: Σd, Σd², Σd³, Σd⁴ and Σ d(i)·d(i+1). */
export interface PowerSums {
  readonly n: bigint;
  readonly s1: bigint;
  readonly s2: bigint;
  readonly s3: bigint;
  readonly s4: bigint;
  readonly neighbours: bigint;
}

/** Sums in doubles where every partial sum is a whole number below 2^53, which makes them exact as well. */
function smallSums(deviations: readonly bigint[]): PowerSums {
  let [s1, s2, s3, s4, neighbours, previous] = [0, 0, 0, 0, 0, 0];
  for (const deviation of deviations) {
    const d = Number(deviation);
    const square = d * d;
    s1 += d;
    s2 += square;
    s3 += square * d;
    s4 += square * square;
    neighbours += d * previous;
    previous = d;
  }
  return {
    n: BigInt(deviations.length),
    s1: BigInt(s1),
    s2: BigInt(s2),
    s3: BigInt(s3),
    s4: BigInt(s4),
    neighbours: BigInt(neighbours),
  };
}

function largeSums(deviations: readonly bigint[]): PowerSums {
  let [s1, s2, s3, s4, neighbours, previous] = [0n, 0n, 0n, 0n, 0n, 0n];
  for (const d of deviations) {
    const square = d * d;
    s1 += d;
    s2 += square;
    s3 += square * d;
    s4 += square * square;
    neighbours += d * previous;
    previous = d;
  }
  return { n: BigInt(deviations.length), s1, s2, s3, s4, neighbours };
}

/** Exact power sums; cost linear in the number of readings. */
export function powerSums(readings: ExactReadings): PowerSums {
  const { deviations, largest } = readings;
  return deviations.length * largest ** 4 < 2 ** 53 ? smallSums(deviations) : largeSums(deviations);
}
