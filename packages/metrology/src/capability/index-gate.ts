/** What a customer asks of an index for a class of characteristic. */
export interface IndexRequirement {
  /** Above this the index is met (strictly). */
  readonly acceptAbove: number;
  /** Below this it is not met; from here to `acceptAbove`, both included, the reviewer decides. */
  readonly refuseBelow: number;
}

/** Common practice for an initial study (AIAG, Production Part Approval Process, 4th ed. 2006, 2.2.11.3). */
export const INITIAL_STUDY_REQUIREMENT: IndexRequirement = { acceptAbove: 1.67, refuseBelow: 1.33 };

export type GateWord = 'met' | 'reviewer-decides' | 'not-met';

/**
 * Band an index falls into: above 1.67 met, 1.33 to 1.67 the reviewer decides, below 1.33 not met (or the bounds given). The figure itself is
 * compared, not what a screen rounds it to: 1.6699 is not above 1.67, and 1.3299 is below 1.33.
 * Tested against capability-thresholds-ppap.
 */
export function indexGate(
  index: number,
  requirement: IndexRequirement = INITIAL_STUDY_REQUIREMENT,
): GateWord {
  if (index > requirement.acceptAbove) return 'met';
  return index >= requirement.refuseBelow ? 'reviewer-decides' : 'not-met';
}
