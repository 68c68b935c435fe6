import { normalUpperTail } from '../distributions/normal.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { simulatedRunLength } from '../tables/false-alarm-simulation.ts';
import type { RunRule } from './rules.ts';

/** How often a set of rules signals on a process that is in control (independent, normal, limits known). */
export interface FalseAlarmRate {
  readonly method: 'Markov chain over the zones of the last points' | 'simulation, committed with its seed';
  readonly rules: readonly RunRule[];
  /** Mean number of points up to the first false signal. */
  readonly averageRunLength: number;
  /** 1 / average run length. */
  readonly perPoint: number;
  /** Standard error of the average run length; 0 for the exact method. */
  readonly standardError: number;
}

/** Probabilities of the bands beyond 3, between 2 and 3, between 1 and 2, and within 1 sigma, on one side. */
const BANDS = [
  0.5 - normalUpperTail(1),
  normalUpperTail(1) - normalUpperTail(2),
  normalUpperTail(2) - normalUpperTail(3),
  normalUpperTail(3),
] as const;

/**
 * Chance that one complete window signals when the process is in control, per rule, in closed form. For a 2-of-3 or
 * 4-of-5 window it counts windows whatever their newest point; the rules here signal only where the newest point is in
 * the zone, which makes false signals a little rarer than these.
 */
export const WINDOW_PROBABILITY: Readonly<Record<RunRule, number>> = {
  'beyond-three-sigma': 2 * normalUpperTail(3),
  'nine-on-one-side': 2 * 0.5 ** 9,
  'eight-on-one-side': 2 * 0.5 ** 8,
  // Two of the 6! orders are monotone.
  'six-in-trend': 2 / 720,
  // 2·E(14)/14! with the zigzag number E(14) = 199360981.
  'fourteen-alternating': (2 * 199360981) / 87178291200,
  'two-of-three-beyond-two-sigma': 2 * atLeast(3, 2, normalUpperTail(2)),
  'four-of-five-beyond-one-sigma': 2 * atLeast(5, 4, normalUpperTail(1)),
  'fifteen-within-one-sigma': (1 - 2 * normalUpperTail(1)) ** 15,
  'eight-outside-one-sigma': (2 * normalUpperTail(1)) ** 8 - 2 * normalUpperTail(1) ** 8,
};

/** P(at least all but one, or all, of n): n·p^(n−1)(1 − p) + p^n with needed = n − 1. */
function atLeast(n: number, needed: number, p: number): number {
  return n * p ** needed * (1 - p) + p ** n;
}

/** What the zone rules must remember of the past: marks of the last four points, and three run lengths. */
interface Memory {
  /** Newest first: −3 … 3, signed band of the point beyond that many sigma (capped at 2), 0 within one sigma. */
  readonly last: readonly number[];
  readonly side: number;
  readonly run: number;
  readonly within: number;
  readonly outside: number;
}

const START: Memory = { last: [], side: 0, run: 0, within: 0, outside: 0 };

/** The memory after a point in `band` (0 within one sigma … 3 beyond three) on `side`, or null when a rule signals. */
function advance(memory: Memory, band: number, side: number, rules: ReadonlySet<RunRule>): Memory | null {
  const mark = band * side;
  const run = memory.side === side ? memory.run + 1 : 1;
  const within = band === 0 ? memory.within + 1 : 0;
  const outside = band === 0 ? 0 : memory.outside + 1;
  const count = (of: readonly number[], sigmas: number) =>
    of.filter((value) => value * side >= sigmas).length;
  if (rules.has('beyond-three-sigma') && band === 3) return null;
  if (rules.has('nine-on-one-side') && run >= 9) return null;
  if (rules.has('eight-on-one-side') && run >= 8) return null;
  if (rules.has('two-of-three-beyond-two-sigma') && band >= 2 && count(memory.last.slice(0, 2), 2) >= 1)
    return null;
  if (rules.has('four-of-five-beyond-one-sigma') && band >= 1 && count(memory.last, 1) >= 3) return null;
  if (rules.has('fifteen-within-one-sigma') && within >= 15) return null;
  if (rules.has('eight-outside-one-sigma') && outside >= 8 && run < 8) return null;
  const four = rules.has('four-of-five-beyond-one-sigma');
  const two = rules.has('two-of-three-beyond-two-sigma');
  const kept = [mark, ...memory.last].slice(0, four ? 4 : two ? 2 : 0).map((value, age) => {
    const cap = two && age < 2 ? 2 : 1;
    const sign = Math.sign(value);
    return four || Math.abs(value) >= 2 ? sign * Math.min(Math.abs(value), cap) : 0;
  });
  const sided =
    rules.has('nine-on-one-side') || rules.has('eight-on-one-side') || rules.has('eight-outside-one-sigma');
  return {
    last: kept,
    side: sided ? side : 0,
    run: sided ? Math.min(run, 8) : 0,
    within: rules.has('fifteen-within-one-sigma') ? within : 0,
    outside: rules.has('eight-outside-one-sigma') ? Math.min(outside, 8) : 0,
  };
}

const keyOf = (memory: Memory) =>
  `${memory.last.join(',')}|${memory.side}|${memory.run}|${memory.within}|${memory.outside}`;

/** States reachable without a signal, each with its eight moves as flat lists of target and probability. */
function buildChain(rules: ReadonlySet<RunRule>): { targets: number[][]; chances: number[][] } {
  const numbers = new Map([[keyOf(START), 0]]);
  const memories = [START];
  const targets: number[][] = [];
  const chances: number[][] = [];
  for (let state = 0; state < memories.length; state += 1) {
    const to = new Map<number, number>();
    for (let band = 0; band < 4; band += 1)
      for (const side of [-1, 1]) {
        const next = advance(memories[state] as Memory, band, side, rules);
        if (next === null) continue;
        const key = keyOf(next);
        let number = numbers.get(key);
        if (number === undefined) {
          number = memories.length;
          numbers.set(key, number);
          memories.push(next);
        }
        to.set(number, (to.get(number) ?? 0) + (BANDS[band] as number));
      }
    targets.push([...to.keys()]);
    chances.push([...to.values()]);
  }
  return { targets, chances };
}

/** Sum over t ≥ 0 of P(no signal up to point t); the tail becomes geometric and is closed by its ratio. */
function averageRunLength(rules: ReadonlySet<RunRule>): number {
  const { targets, chances } = buildChain(rules);
  let mass = new Float64Array(targets.length);
  mass[0] = 1;
  let total = 1;
  let alive = 1;
  let ratio = 0;
  for (let point = 1; point < 100_000; point += 1) {
    const next = new Float64Array(targets.length);
    for (let state = 0; state < targets.length; state += 1) {
      const share = mass[state] as number;
      if (share === 0) continue;
      const to = targets[state] as number[];
      const chance = chances[state] as number[];
      for (let move = 0; move < to.length; move += 1) {
        const target = to[move] as number;
        next[target] = (next[target] as number) + share * (chance[move] as number);
      }
    }
    const left = next.reduce((a, b) => a + b, 0);
    const newRatio = left / alive;
    total += left;
    if (point > 30 && Math.abs(newRatio - ratio) < 1e-15 && newRatio < 1)
      return total + (left * newRatio) / (1 - newRatio);
    ratio = newRatio;
    alive = left;
    mass = next;
  }
  return total;
}

function simulated(chosen: ReadonlySet<RunRule>): FalseAlarmRate | Undetermined {
  const found = simulatedRunLength(chosen);
  if (found === null)
    return undetermined(
      'outside-table',
      'The false-alarm rate of this set of rules is not known: a trend or alternation rule is combined with others',
    );
  return {
    method: 'simulation, committed with its seed',
    rules: [...chosen],
    averageRunLength: found.averageRunLength,
    perPoint: 1 / found.averageRunLength,
    standardError: found.standardError,
  };
}

const kept = new Map<string, number>();

/**
 * In-control average run length of a set of zone rules, exactly, after C. W. Champ and W. H. Woodall, Technometrics 29
 * (1987) 393-399: the zones of the last points form a Markov chain. A process in control, signals by chance alone: rules
 * 1, 2-of-3, 4-of-5 and eight on one side together signal falsely every 92 points, rule 1 alone every 370.
 *
 * The trend and alternation rules depend on the values themselves, which no finite chain holds; the set of Nelson's eight
 * is answered from a simulation (tables/false-alarm-simulation.ts), other sets with those rules are undetermined and their
 * `WINDOW_PROBABILITY` may be shown.
 */
export function falseAlarmRate(rules: readonly RunRule[]): FalseAlarmRate | Undetermined {
  const chosen = new Set(rules);
  if (chosen.size === 0) return undetermined('no-rules', 'No rule is chosen, so nothing can signal');
  if (chosen.has('six-in-trend') || chosen.has('fourteen-alternating')) return simulated(chosen);
  const key = [...chosen].sort().join();
  let length = kept.get(key);
  if (length === undefined) {
    length = averageRunLength(chosen);
    kept.set(key, length);
  }
  return {
    method: 'Markov chain over the zones of the last points',
    rules: [...chosen],
    averageRunLength: length,
    perPoint: 1 / length,
    standardError: 0,
  };
}
