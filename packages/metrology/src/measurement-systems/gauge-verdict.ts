/** The trade's answer to a gauge study. Conditional: usable when the customer accepts it, with importance, cost and repair in view. */
export type GaugeVerdictWord = 'acceptable' | 'conditional' | 'not-acceptable';

export interface GaugeBands {
  /** Below this share of the variation (per cent) the gauge is acceptable. */
  readonly acceptableBelow: number;
  /** Above this share (per cent) it is not acceptable. */
  readonly refusedAbove: number;
  readonly smallestCategories: number;
}

/** Common practice (AIAG, Measurement Systems Analysis, 4th ed. 2010, general guidelines; from memory): 10 %, 30 %, five categories. */
export const TRADE_BANDS: GaugeBands = { acceptableBelow: 10, refusedAbove: 30, smallestCategories: 5 };

export interface GaugeVerdict {
  readonly verdict: GaugeVerdictWord;
  readonly reasons: readonly string[];
  readonly percentGauge: number;
  readonly distinctCategories: number;
  readonly bands: GaugeBands;
}

/**
 * Verdict on a gauge from its share of the variation and the number of distinct categories it tells apart.
 * Under 10 % acceptable; 10 to 30 %, both ends included, conditional; above 30 % not acceptable; fewer than five categories not acceptable
 * whatever the share. The manual leaves the two boundaries open; here both belong to the middle band.
 * @param percentGauge gauge R&R in per cent of the study variation or of the tolerance, at least 0
 * @param distinctCategories truncated number of distinct categories; `Infinity` when the gauge showed no variation of its own
 * Tested against the reference case grr-acceptance-rules.
 */
export function gaugeVerdict(
  percentGauge: number,
  distinctCategories: number,
  bands: GaugeBands = TRADE_BANDS,
): GaugeVerdict {
  const reasons: string[] = [];
  let verdict: GaugeVerdictWord = 'acceptable';
  if (percentGauge >= bands.acceptableBelow) {
    verdict = 'conditional';
    reasons.push(`Gauge share is ${bands.acceptableBelow} % or more`);
  }
  if (percentGauge > bands.refusedAbove) {
    verdict = 'not-acceptable';
    reasons.push(`Gauge share is above ${bands.refusedAbove} %`);
  }
  if (distinctCategories < bands.smallestCategories) {
    verdict = 'not-acceptable';
    reasons.push(`Fewer than ${bands.smallestCategories} distinct categories`);
  }
  return { verdict, reasons, percentGauge, distinctCategories, bands };
}
