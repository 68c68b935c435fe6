import type { BuyingVerdict } from '@trammel/shared/status';

export interface DecisionInForce {
  readonly outcome: 'approved' | 'interim-approval' | 'rejected' | 'sent-back' | null;
  readonly endOn: string | null;
  readonly pieceLimit: number | null;
  readonly piecesUsed: number;
}

/**
 * May it be bought today? Follows from the signed decision, the calendar and the pieces counted; nobody types it. The
 * end date is the last day on which may be bought (R49).
 */
export function buyingVerdictOf(decision: DecisionInForce, today: string): BuyingVerdict {
  const { outcome, endOn, pieceLimit, piecesUsed } = decision;
  if (outcome !== 'approved' && outcome !== 'interim-approval') return 'hold';
  if (endOn !== null && endOn < today) return 'hold';
  if (pieceLimit !== null && piecesUsed >= pieceLimit) return 'hold';
  return endOn === null && pieceLimit === null && outcome === 'approved'
    ? 'may-buy'
    : 'may-buy-within-limits';
}

/** The same rule for the database, so that a list can be filtered by it. Takes the day as its one parameter. */
export const buyingVerdictSql = `CASE
  WHEN l.outcome IS NULL OR l.outcome NOT IN ('approved', 'interim-approval') THEN 'hold'
  WHEN l.end_on IS NOT NULL AND l.end_on < ? THEN 'hold'
  WHEN l.piece_limit IS NOT NULL AND l.pieces_used >= l.piece_limit THEN 'hold'
  WHEN l.outcome = 'approved' AND l.end_on IS NULL AND l.piece_limit IS NULL THEN 'may-buy'
  ELSE 'may-buy-within-limits' END`;

export interface BlockerFacts extends DecisionInForce {
  readonly verdict: BuyingVerdict;
  readonly approvedRevision: string | null;
  readonly currentRevision: string | null;
  readonly openState: string | null;
}

const stateWords: Record<string, string> = {
  requested: 'approval asked for, not acknowledged yet',
  'in-preparation': 'the supplier is preparing the package',
  submitted: 'the package waits for review',
  'in-review': 'the package is in review',
  'sent-back': 'the package was sent back as incomplete',
  rejected: 'the package was rejected',
};

/** What stands in the way or limits, as one sentence for a buyer. */
export function blockerOf(facts: BlockerFacts, today: string): string | null {
  const parts: string[] = [];
  if (facts.verdict === 'hold') {
    if (facts.outcome === null) parts.push('Not approved yet');
    else if (facts.endOn !== null && facts.endOn < today)
      parts.push(`Interim approval ended on ${facts.endOn}`);
    else if (facts.pieceLimit !== null && facts.piecesUsed >= facts.pieceLimit)
      parts.push('The pieces of the interim approval are used up');
  }
  if (facts.verdict === 'may-buy-within-limits') {
    parts.push(
      facts.outcome === 'interim-approval'
        ? 'Interim approval: conditions are open'
        : 'Approved under a deviation with limits',
    );
  }
  if (
    facts.approvedRevision !== null &&
    facts.currentRevision !== null &&
    facts.approvedRevision !== facts.currentRevision
  ) {
    parts.push(
      `Revision ${facts.currentRevision} is not approved; the verdict speaks of revision ${facts.approvedRevision}`,
    );
  }
  const words = facts.openState === null ? undefined : stateWords[facts.openState];
  if (words !== undefined)
    parts.push(parts.length === 0 ? words.charAt(0).toUpperCase() + words.slice(1) : words);
  return parts.length === 0 ? null : `${parts.join('; ')}.`;
}
