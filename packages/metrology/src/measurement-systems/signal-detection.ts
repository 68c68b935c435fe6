import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { gaugeVerdict } from './gauge-verdict.ts';
import type { Decision } from './attribute-agreement.ts';
import type { GaugeVerdict } from './gauge-verdict.ts';
import type { GaugeTolerance } from './variance-shares.ts';

/** A piece of an attribute study whose true size was measured, with every decision taken on it. */
export interface DetectedPiece {
  readonly value: number;
  readonly decisions: readonly Decision[];
}

/** The zone around one limit in which appraisers do not all agree. */
export interface GreyZone {
  readonly limit: number;
  /** nearest piece on the good side that all accepted */
  readonly lastAccepted: number;
  /** nearest piece on the bad side that all refused */
  readonly firstRejected: number;
  readonly width: number;
}

export interface SignalDetection {
  readonly method: string;
  readonly n: number;
  readonly zones: readonly GreyZone[];
  /** mean width of the zones: the estimate of the whole gauge spread (6 s) */
  readonly gaugeSpread: number;
  readonly percentTolerance: number | Undetermined;
  /** by the bands for the share of the tolerance; an attribute gauge has no categories to count */
  readonly verdict: GaugeVerdict | Undetermined;
}

/**
 * Signal detection: how wide the band is around each limit in which the decisions disagree, as an estimate of the spread of an attribute gauge
 * (AIAG, Measurement Systems Analysis, 4th ed. 2010, ch. III-C, from memory).
 *
 * At a limit, d is the distance from the nearest piece that every decision accepted to the nearest piece that every decision refused, with all
 * pieces in dispute between them. Gauge spread = mean of d over the limits; share of the tolerance = spread / (upper - lower).
 * Undetermined: no piece unanimously accepted inside, or none unanimously refused beyond a limit: the study did not reach far enough.
 */
export function signalDetection(
  pieces: readonly DetectedPiece[],
  tolerance: GaugeTolerance,
): SignalDetection | Undetermined {
  const { lower, upper } = tolerance;
  if (lower === undefined && upper === undefined)
    return undetermined('no-tolerance', 'Give the limit the gauge checks');
  if (!pieces.every((piece) => Number.isFinite(piece.value) && piece.decisions.length > 0)) {
    return undetermined('not-finite', 'Every piece needs a measured value and at least one decision');
  }
  const zones: GreyZone[] = [];
  for (const [limit, outward] of [
    [lower, -1],
    [upper, 1],
  ] as const) {
    if (limit === undefined) continue;
    const zone = greyZone(
      pieces,
      limit,
      outward,
      lower !== undefined && upper !== undefined ? (lower + upper) / 2 : undefined,
    );
    if ('undetermined' in zone) return zone;
    zones.push(zone);
  }
  const gaugeSpread = zones.reduce((sum, zone) => sum + zone.width, 0) / zones.length;
  const percentTolerance =
    lower !== undefined && upper !== undefined && upper > lower
      ? (100 * gaugeSpread) / (upper - lower)
      : undetermined('one-limit', 'The share of the tolerance needs both limits');
  return {
    method: 'signal detection, mean width of the zones in dispute',
    n: pieces.length,
    zones,
    gaugeSpread,
    percentTolerance,
    verdict:
      typeof percentTolerance === 'number' ? gaugeVerdict(percentTolerance, Infinity) : percentTolerance,
  };
}

function greyZone(
  pieces: readonly DetectedPiece[],
  limit: number,
  outward: 1 | -1,
  middle: number | undefined,
): GreyZone | Undetermined {
  // Only the half of the band next to this limit; pieces are looked at along the way out.
  const along = pieces
    .filter((piece) => middle === undefined || (piece.value - middle) * outward >= 0)
    .map((piece) => ({ way: piece.value * outward, decisions: piece.decisions }))
    .sort((a, b) => a.way - b.way);
  const unanimous = (word: Decision) => (piece: { decisions: readonly Decision[] }) =>
    piece.decisions.every((decision) => decision === word);
  const firstDispute = along.findIndex((piece) => !unanimous('accept')(piece));
  const lastDispute = along.findLastIndex((piece) => !unanimous('reject')(piece));
  const accepted = along[firstDispute - 1];
  const rejected = along[lastDispute + 1];
  if (firstDispute < 0 || !accepted || !rejected) {
    return undetermined(
      'study-too-narrow',
      `Around limit ${limit} the study has no piece that all accepted or none that all refused; add pieces further away`,
    );
  }
  return {
    limit,
    lastAccepted: accepted.way * outward,
    firstRejected: rejected.way * outward,
    width: rejected.way - accepted.way,
  };
}
