import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';

/** Which points the limits are computed from; points count from 1. */
export interface Phase {
  /** First point; 1 unless told. */
  readonly from?: number;
  /** Last point; the last of the chart unless told. */
  readonly to?: number;
  /** Points left out because their cause was found and removed. They stay on the chart. */
  readonly exclude?: readonly number[];
}

/** Says in words where the limits come from. */
export function describePhase(phase: Phase | undefined, count: number): string {
  const { from = 1, to = count, exclude = [] } = phase ?? {};
  const range = from === 1 && to >= count ? 'all points' : `points ${from} to ${Math.min(to, count)}`;
  return exclude.length === 0 ? range : `${range} without ${[...exclude].sort((a, b) => a - b).join(', ')}`;
}

/** Indices (from 0) of the points that make the limits. */
export function pointsOfPhase(phase: Phase | undefined, count: number): number[] | Undetermined {
  if (count === 0) return undetermined('too-few', 'There are no points');
  const { from = 1, to = count, exclude = [] } = phase ?? {};
  if (!Number.isInteger(from) || !Number.isInteger(to) || from < 1 || to < from)
    return undetermined('outside-domain', 'A phase runs from a point, counted from 1, to a later point');
  const left = new Set(exclude);
  const chosen: number[] = [];
  for (let point = from; point <= Math.min(to, count); point += 1)
    if (!left.has(point)) chosen.push(point - 1);
  if (chosen.length === 0) return undetermined('too-few', 'The phase chosen for the limits holds no point');
  return chosen;
}
