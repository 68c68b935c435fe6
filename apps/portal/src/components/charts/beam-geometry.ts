import type { Verdict } from '@trammel/shared/status';

export interface BeamLimits {
  lower: number | null;
  upper: number | null;
  /** The lower limit is a bound of nature, such as 0 for a runout: the scale starts there and no point stands on it. */
  naturalLower?: boolean | number;
}

export interface BeamPoint {
  /** Null where nothing was measured. */
  value: number | null;
  verdict: Verdict;
  /** The piece. */
  label: string;
}

export interface BeamData {
  limits: BeamLimits;
  nominal?: number | null;
  points: readonly BeamPoint[];
  /** Natural process spread, mean ± 3 s. */
  spread?: { lower: number; upper: number } | null;
  /** Width of the guard band inside each limit. */
  guard?: number;
}

/** In units of the drawing: every beam shares it, so limits always stand at the same two places. */
export const frame = {
  width: 240,
  height: 28,
  left: 52,
  right: 188,
  /** Points further out are held here and get an arrow. */
  edge: 9,
  line: 11,
  dot: 3,
  /** An out-of-tolerance point is drawn at least this far past its limit, so that one last digit can be seen. */
  past: 6,
} as const;

export interface Beam {
  /** The beam's own stretch. */
  from: number;
  to: number;
  lowerPoint: number | null;
  upperPoint: number | null;
  nominal: number | null;
  guards: readonly { from: number; to: number }[];
  inside: readonly number[];
  outside: readonly { x: number; beyond: 'left' | 'right' | null }[];
  undecided: readonly number[];
  unjudged: readonly number[];
  unmeasured: number;
  bracket: { from: number; to: number; openLeft: boolean; openRight: boolean } | null;
}

export type Scale = (value: number) => number;

/** Where a value stands when the two ends of the beam are `low` and `high`. */
function linear(low: number, high: number): Scale {
  const span = high - low;
  if (!(span > 0))
    return (value) => (value === low ? (frame.left + frame.right) / 2 : value < low ? -Infinity : Infinity);
  return (value) => frame.left + ((value - low) / span) * (frame.right - frame.left);
}

/** Two limits fix the scale. With one, the other end is nature's bound or the farthest value, never a point. */
export function scaleOf(data: BeamData): Scale {
  const { lower, upper, naturalLower } = data.limits;
  const bound = typeof naturalLower === 'number' ? naturalLower : lower;
  if (bound !== null && upper !== null) return linear(bound, upper);
  const values = data.points.flatMap((point) => (point.value === null ? [] : [point.value]));
  if (data.nominal !== null && data.nominal !== undefined) values.push(data.nominal);
  if (data.spread) values.push(data.spread.lower, data.spread.upper);
  const least = values.reduce((a, b) => Math.min(a, b), Infinity);
  const most = values.reduce((a, b) => Math.max(a, b), -Infinity);
  if (upper !== null) {
    const start = upper > 0 && least >= 0 ? 0 : Math.min(least, upper - (Math.abs(upper) || 1) / 2);
    return linear(Number.isFinite(start) ? start : upper - 1, upper);
  }
  if (bound !== null) {
    const inside = Math.max(most - bound, (Math.abs(bound) || 1) / 10);
    // Room to show how far below a piece is, unless that would crowd the good ones into the limit.
    const below = Number.isFinite(least) ? Math.max(0, bound - least) * 3.4 : 0;
    return linear(bound, bound + Math.max(inside, Math.min(below, inside * 4)));
  }
  return Number.isFinite(least) && most > least ? linear(least, most) : () => (frame.left + frame.right) / 2;
}

const clamp = (x: number) => Math.max(frame.edge, Math.min(frame.width - frame.edge, x));
const rounded = (x: number) => Math.round(x * 10) / 10;
const once = (xs: number[]) => [...new Set(xs.map(rounded))];

export function layOutBeam(data: BeamData): Beam {
  const { lower, upper, naturalLower } = data.limits;
  const x = scaleOf(data);
  const hasLowerPoint = lower !== null && naturalLower !== true;
  const open = { left: lower === null && upper === null, right: upper === null };
  const at = (verdict: Verdict) =>
    data.points.flatMap((point) => (point.verdict === verdict && point.value !== null ? [point.value] : []));
  const place = (values: number[]) => once(values.map((value) => clamp(x(value))));

  return {
    from: open.left ? frame.edge : frame.left,
    to: open.right ? frame.width - frame.edge : frame.right,
    lowerPoint: hasLowerPoint ? rounded(x(lower)) : null,
    upperPoint: upper === null ? null : frame.right,
    nominal: data.nominal === null || data.nominal === undefined ? null : rounded(clamp(x(data.nominal))),
    guards: guardsOf(data, x, hasLowerPoint),
    inside: place(at('in-tolerance')),
    outside: outsideOf(at('out-of-tolerance'), data.limits, x),
    undecided: place(at('undecided')),
    unjudged: place(at('no-verdict')),
    unmeasured: data.points.filter((point) => point.value === null || point.verdict === 'not-measured')
      .length,
    bracket: bracketOf(data.spread ?? null, x),
  };
}

function guardsOf(data: BeamData, x: Scale, hasLowerPoint: boolean): { from: number; to: number }[] {
  const { lower, upper } = data.limits;
  const guard = data.guard ?? 0;
  if (!(guard > 0)) return [];
  const bands: { from: number; to: number }[] = [];
  if (lower !== null && hasLowerPoint) {
    bands.push({ from: x(lower), to: Math.min(x(lower + guard), frame.right) });
  }
  if (upper !== null) bands.push({ from: Math.max(x(upper - guard), frame.left), to: x(upper) });
  return bands.map((band) => ({ from: rounded(band.from), to: rounded(band.to) }));
}

function outsideOf(values: number[], limits: BeamLimits, x: Scale): Beam['outside'] {
  const seen = new Map<string, Beam['outside'][number]>();
  for (const value of values) {
    let wanted = x(value);
    if (limits.upper !== null && value > limits.upper) wanted = Math.max(wanted, frame.right + frame.past);
    if (limits.lower !== null && value < limits.lower) wanted = Math.min(wanted, frame.left - frame.past);
    const held = rounded(clamp(wanted));
    const beyond = wanted < frame.edge ? 'left' : wanted > frame.width - frame.edge ? 'right' : null;
    seen.set(`${held}${beyond}`, { x: held, beyond });
  }
  return [...seen.values()];
}

function bracketOf(spread: { lower: number; upper: number } | null, x: Scale): Beam['bracket'] {
  if (spread === null || !Number.isFinite(spread.lower) || !Number.isFinite(spread.upper)) return null;
  const from = x(spread.lower);
  const to = x(spread.upper);
  return {
    from: rounded(clamp(from)),
    to: rounded(clamp(to)),
    openLeft: from < frame.edge,
    openRight: to > frame.width - frame.edge,
  };
}
