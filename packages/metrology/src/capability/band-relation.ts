import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { limitsFault, oneSided } from './capability-limits.ts';
import type { CapabilityLimits } from './capability-limits.ts';

/** Where a process naturally runs: 99.73 % of it lies between `low` and `high`. */
export interface NaturalSpread {
  readonly low: number;
  /** mean, or median of a fitted distribution */
  readonly centre: number;
  readonly high: number;
}

/**
 * How the natural spread lies in the tolerance band.
 * - `inside-with-room`: the smaller index reaches the room asked for
 * - `inside-off-centre`: inside, the room is not reached, but it would be at the middle of the band
 * - `at-the-edge`: inside, the room is not reached and would not be at the middle either
 * - `beyond-one-side`: past one limit, narrower than the band
 * - `beyond-both`: past both limits
 * - `wider-than-the-band`: past one limit and wider than the band, so that moving it would only change which limit is passed
 */
export type BandWord =
  | 'inside-with-room'
  | 'inside-off-centre'
  | 'at-the-edge'
  | 'beyond-one-side'
  | 'beyond-both'
  | 'wider-than-the-band';

export interface BandRelation {
  readonly method: string;
  readonly word: BandWord;
  readonly inputs: {
    readonly spread: NaturalSpread;
    readonly limits: CapabilityLimits;
    readonly wantedIndex: number;
  };
  /** distance from each end of the spread to its limit, negative beyond it; undetermined without that limit */
  readonly lowerRoom: number | Undetermined;
  readonly upperRoom: number | Undetermined;
  /** spread / band; undetermined with one limit */
  readonly spreadShare: number | Undetermined;
  readonly mend: {
    /** signed move of the process that makes both rooms alike (two limits) or reaches the wanted index (one limit); 0 when none is needed */
    readonly recentreBy: number;
    /** the smaller index after that move, the spread unchanged */
    readonly indexAfterRecentring: number;
    /** part by which the spread must shrink to reach the wanted index where the process stands now; undetermined when the centre is outside */
    readonly reduceSpreadBy: number | Undetermined;
    /** the same after recentring; 0 when recentring is enough */
    readonly reduceSpreadAfterRecentringBy: number;
    readonly advice: 'nothing' | 'recentre' | 'reduce-spread' | 'recentre-and-reduce-spread';
  };
}

/**
 * One verdict that relates the two pairs of limits, the natural ones of the process and the tolerance limits of the drawing, with what would mend
 * it. Index of a side = (limit - centre)/(end of the spread - centre); the wanted index (default 1.33) is the room asked for.
 * Touching a limit counts as inside. With one limit the words for the other side and for the width do not occur, and a move away from the limit
 * always helps; the move named is the one that reaches the wanted index, kept on this side of a natural bound.
 * Undetermined: no limits, or a spread that is not low < centre < high.
 */
export function relateSpreadToBand(
  spread: NaturalSpread,
  limits: CapabilityLimits,
  wantedIndex = 1.33,
): BandRelation | Undetermined {
  const fault = limitsFault(limits);
  if (fault) return fault;
  const { low, centre, high } = spread;
  if (!(low < centre && centre < high && Number.isFinite(high - low))) {
    return undetermined(
      'no-variation',
      'The natural spread must have a lower end, a centre and an upper end in rising order',
    );
  }
  if (!(wantedIndex > 0)) return undetermined('wanted-index', 'The wanted index must be greater than 0');
  const { lower, upper } = limits;
  const down = centre - low;
  const up = high - centre;
  const lowerIndex = lower === undefined ? Infinity : (centre - lower) / down;
  const upperIndex = upper === undefined ? Infinity : (upper - centre) / up;
  const index = Math.min(lowerIndex, upperIndex);

  // Both indices are alike when the band is shared out in the proportion of the two half spreads.
  const balanced = lower === undefined || upper === undefined ? undefined : (upper - lower) / (high - low);
  const move =
    balanced !== undefined && lower !== undefined
      ? lower + balanced * down - centre
      : oneSidedMove(spread, limits, index, wantedIndex);
  const after =
    balanced ??
    Math.min((centre + move - (lower ?? -Infinity)) / down, ((upper ?? Infinity) - centre - move) / up);
  const shrink = (present: number): number => Math.max(0, 1 - present / wantedIndex);
  const recentred = shrink(after);
  const enough = index >= wantedIndex;
  return {
    method: 'natural spread (99.73 %) against the tolerance band',
    word: wordFor({ low, high, lower, upper, index, after: balanced, wantedIndex }),
    inputs: { spread, limits, wantedIndex },
    lowerRoom: lower === undefined ? noLimit('lower') : low - lower,
    upperRoom: upper === undefined ? noLimit('upper') : upper - high,
    spreadShare: lower === undefined || upper === undefined ? oneSided() : (high - low) / (upper - lower),
    mend: {
      recentreBy: enough ? 0 : move,
      indexAfterRecentring: enough ? index : after,
      reduceSpreadBy:
        index > 0
          ? shrink(index)
          : undetermined(
              'centre-outside',
              'The centre lies outside the band, so no smaller spread is enough',
            ),
      reduceSpreadAfterRecentringBy: enough ? 0 : recentred,
      advice: adviceFor(enough, recentred, move, down + up),
    },
  };
}

function wordFor(place: {
  low: number;
  high: number;
  lower: number | undefined;
  upper: number | undefined;
  index: number;
  after: number | undefined;
  wantedIndex: number;
}): BandWord {
  const { low, high, lower = -Infinity, upper = Infinity, index, after, wantedIndex } = place;
  if (low < lower && high > upper) return 'beyond-both';
  if (low < lower || high > upper)
    return after !== undefined && after < 1 ? 'wider-than-the-band' : 'beyond-one-side';
  if (index >= wantedIndex) return 'inside-with-room';
  return after !== undefined && after >= wantedIndex ? 'inside-off-centre' : 'at-the-edge';
}

/** The move away from the only limit that reaches the wanted index, without pushing the spread past a natural bound. */
function oneSidedMove(
  spread: NaturalSpread,
  limits: CapabilityLimits,
  index: number,
  wantedIndex: number,
): number {
  if (index >= wantedIndex) return 0;
  const { low, centre, high } = spread;
  if (limits.upper !== undefined) {
    const wanted = limits.upper - wantedIndex * (high - centre) - centre;
    return limits.naturalLower === undefined
      ? wanted
      : Math.min(0, Math.max(wanted, limits.naturalLower - low));
  }
  const wanted = (limits.lower ?? centre) + wantedIndex * (centre - low) - centre;
  return limits.naturalUpper === undefined
    ? wanted
    : Math.max(0, Math.min(wanted, limits.naturalUpper - high));
}

function adviceFor(
  enough: boolean,
  recentred: number,
  move: number,
  width: number,
): BandRelation['mend']['advice'] {
  if (enough) return 'nothing';
  const moves = Math.abs(move) > 1e-9 * width;
  if (!moves) return 'reduce-spread';
  return recentred > 1e-9 ? 'recentre-and-reduce-spread' : 'recentre';
}

function noLimit(side: string): Undetermined {
  return undetermined('no-limit', `There is no ${side} tolerance limit`);
}

/** Natural spread of a normal process: mean -/+ 3 standard deviations. */
export function normalSpread(mean: number, sigma: number): NaturalSpread {
  return { low: mean - 3 * sigma, centre: mean, high: mean + 3 * sigma };
}
