import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { RULE_WINDOW } from './rules.ts';
import type { RunRule } from './rules.ts';

/** One signal: the rule, the point that completes its pattern, and the points that make it up. Points count from 1. */
export interface Signal {
  readonly rule: RunRule;
  readonly point: number;
  /** The side of the centre line of a one-sided pattern, the direction of a trend; null for the other rules. */
  readonly side: 'above' | 'below' | null;
  readonly pattern: readonly number[];
}

/** A point as the rules see it. */
interface Zone {
  /** −3 … 3: beyond that many sigma; 0 within one sigma or exactly on a line. */
  readonly beyond: number;
  /** −1 below the centre line, 1 above, 0 on it. */
  readonly side: number;
  /** Strictly inside one sigma. */
  readonly within: boolean;
  /** Against the point before: 1 above, −1 below, 0 equal or first. */
  readonly step: number;
}

/**
 * Room for the last digits of a double, so that a reading written exactly on a line is not taken as beyond it:
 * 10.3 is on the line 10 + 3·0.1, although the double 10.3 − 10 is more than 0.3.
 */
export function lineSlack(centre: number, sigma: number): number {
  return 8 * Number.EPSILON * (Math.abs(centre) + 3 * sigma);
}

function zoneOf(value: number, previous: number | undefined, centre: number, sigma: number): Zone {
  const distance = Math.abs(value - centre);
  const slack = lineSlack(centre, sigma);
  const side = distance <= slack ? 0 : value > centre ? 1 : -1;
  const steps =
    distance > 3 * sigma + slack ? 3 : distance > 2 * sigma + slack ? 2 : distance > sigma + slack ? 1 : 0;
  return {
    beyond: steps * side,
    side,
    within: distance < sigma - slack,
    step: previous === undefined || value === previous ? 0 : value > previous ? 1 : -1,
  };
}

/** Indices from `from` to `to`, both included, for which `keep` holds, as points counted from 1. */
function points(from: number, to: number, keep: (index: number) => boolean = () => true): number[] {
  const kept: number[] = [];
  for (let index = Math.max(0, from); index <= to; index += 1) if (keep(index)) kept.push(index + 1);
  return kept;
}

type Finder = (zones: readonly Zone[], index: number) => { side: number; pattern: number[] } | null;

/** All of the last `length` points satisfy `keep`; an incomplete window never does. */
const inARow =
  (length: number, keep: (zone: Zone) => boolean): Finder =>
  (zones, index) =>
    index + 1 >= length && zones.slice(index + 1 - length, index + 1).every(keep)
      ? { side: 0, pattern: points(index + 1 - length, index) }
      : null;

const onOneSide =
  (length: number): Finder =>
  (zones, index) => {
    const side = zones[index]?.side ?? 0;
    const found = side === 0 ? null : inARow(length, (zone) => zone.side === side)(zones, index);
    return found === null ? null : { ...found, side };
  };

/** The newest point and enough of the others beyond the zone on its side; the window may be incomplete. */
const someBeyond =
  (needed: number, length: number, sigmas: number): Finder =>
  (zones, index) => {
    const side = Math.sign(zones[index]?.beyond ?? 0);
    const inZone = (i: number) => (zones[i]?.beyond ?? 0) * side >= sigmas;
    if (side === 0 || !inZone(index)) return null;
    const pattern = points(index + 1 - length, index, inZone);
    return pattern.length >= needed ? { side, pattern } : null;
  };

const trend: Finder = (zones, index) => {
  const side = zones[index]?.step ?? 0;
  if (side === 0 || index < 5) return null;
  for (let i = index - 4; i < index; i += 1) if (zones[i]?.step !== side) return null;
  return { side, pattern: points(index - 5, index) };
};

const alternating: Finder = (zones, index) => {
  if (index < 13) return null;
  for (let i = index - 12; i <= index; i += 1) {
    const step = zones[i]?.step ?? 0;
    if (step === 0 || (i > index - 12 && step === zones[i - 1]?.step)) return null;
  }
  return { side: 0, pattern: points(index - 13, index) };
};

const mixture: Finder = (zones, index) => {
  const found = inARow(8, (zone) => zone.beyond !== 0)(zones, index);
  if (found === null) return null;
  const sides = new Set(zones.slice(index - 7, index + 1).map((zone) => zone.side));
  return sides.size === 2 ? found : null;
};

const FINDERS: Readonly<Record<RunRule, Finder>> = {
  'beyond-three-sigma': someBeyond(1, 1, 3),
  'nine-on-one-side': onOneSide(RULE_WINDOW['nine-on-one-side']),
  'eight-on-one-side': onOneSide(RULE_WINDOW['eight-on-one-side']),
  'six-in-trend': trend,
  'fourteen-alternating': alternating,
  'two-of-three-beyond-two-sigma': someBeyond(2, 3, 2),
  'four-of-five-beyond-one-sigma': someBeyond(4, 5, 1),
  'fifteen-within-one-sigma': inARow(15, (zone) => zone.within),
  'eight-outside-one-sigma': mixture,
};

/** Centre line and sigma of the plotted statistic, one for all points or one a point. */
export interface RuleLines {
  readonly centre: number | readonly number[];
  readonly sigma: number | readonly number[];
}

/**
 * Applies run rules to plotted points and names each signal.
 *
 * Conventions: a signal stands at the point that completes the pattern and at each later point that completes it again.
 * A 2-of-3 or 4-of-5 pattern signals only at a point that is itself in the zone, and may do so in an incomplete first
 * window (the second point of a chart can be the second of two beyond 2 sigma). A point on a line is not beyond it: on
 * the centre line it is on no side, on the 1 sigma line neither outside nor within. Equal neighbours break a trend and an
 * alternation. Six in a trend are six points, five steps. Eight outside one sigma need points on both sides.
 * Lines are compared with room for the rounding of a double (see `lineSlack`).
 * @param values finite numbers in time order
 * @param lines centre line and sigma (above 0) of the plotted statistic, not of the readings
 * @param rules the rules to apply, each at most once
 * @returns the signals in order of point, then of `rules`; undetermined when a value is not finite or sigma is not above 0
 */
export function applyRunRules(
  values: readonly number[],
  lines: RuleLines,
  rules: readonly RunRule[],
): readonly Signal[] | Undetermined {
  const at = (line: number | readonly number[], index: number) =>
    typeof line === 'number' ? line : (line[index] ?? NaN);
  const zones: Zone[] = [];
  for (let index = 0; index < values.length; index += 1) {
    const value = values[index] as number;
    const centre = at(lines.centre, index);
    const sigma = at(lines.sigma, index);
    if (!Number.isFinite(value) || !Number.isFinite(centre))
      return undetermined('not-finite', `Point ${index + 1} has no finite value`);
    if (!(sigma > 0 && sigma < Infinity))
      return undetermined(
        'no-variation',
        `Sigma at point ${index + 1} is not above 0: run rules need some variation`,
      );
    zones.push(zoneOf(value, values[index - 1], centre, sigma));
  }
  const signals: Signal[] = [];
  for (let index = 0; index < zones.length; index += 1)
    for (const rule of rules) {
      const found = FINDERS[rule](zones, index);
      if (found === null) continue;
      const side = found.side === 0 ? null : found.side > 0 ? 'above' : 'below';
      signals.push({ rule, point: index + 1, side, pattern: found.pattern });
    }
  return signals;
}
