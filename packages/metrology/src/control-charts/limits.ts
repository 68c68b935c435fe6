/**
 * Control limits: where the plotted statistic of a process in control lies, computed from the process itself.
 * They are never tolerance limits, which a drawing states for single pieces; the `kind` keeps the two apart in types.
 */
export interface ControlLimits {
  readonly kind: 'control-limits';
  readonly lower: number;
  readonly centre: number;
  readonly upper: number;
  /** Standard deviation of the plotted statistic, from which the zones of the run rules are drawn. */
  readonly sigma: number;
}

/** A plotted point with the limits that hold for it. Points count from 1. */
export interface ChartPoint {
  readonly point: number;
  readonly value: number;
  /** Readings, pieces or units behind the point. */
  readonly size: number;
  readonly limits: ControlLimits;
}

/** Ends a statistic cannot pass, whatever three sigma say: ranges and counts 0, fractions 0 and 1. */
export interface NaturalEnds {
  readonly lowest?: number;
  readonly highest?: number;
}

/** centre ± 3·sigma, cut at the ends of the statistic. */
export function controlLimits(centre: number, sigma: number, ends: NaturalEnds = {}): ControlLimits {
  const { lowest = -Infinity, highest = Infinity } = ends;
  return {
    kind: 'control-limits',
    lower: Math.max(lowest, centre - 3 * sigma),
    centre,
    upper: Math.min(highest, centre + 3 * sigma),
    sigma,
  };
}
