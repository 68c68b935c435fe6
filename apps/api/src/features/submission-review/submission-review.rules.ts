import { worstVerdict } from '@trammel/metrology/conformance';
import type { Finding } from '@trammel/shared/checks';
import type { RowMark } from '@trammel/shared/submission-review';
import type { Verdict } from '@trammel/shared/status';
import { deviationCovers, outReadings } from '../../evidence/deviation-cover.ts';
import { isSpecial, type CharacteristicFacts } from '../../evidence/characteristic-facts.ts';

/** The part takes the worst verdict of its streams; rows without a verdict of their own keep that word. */
export function overallVerdict(verdicts: readonly Verdict[]): Verdict {
  const judged = verdicts.filter((verdict) => verdict !== 'no-verdict');
  return judged.length === 0 ? 'no-verdict' : worstVerdict(judged);
}

/** May be accepted together with others, without being looked at alone. */
export function isClean(facts: CharacteristicFacts, verdict: Verdict, findings: readonly Finding[]): boolean {
  return (
    (verdict === 'in-tolerance' || verdict === 'no-verdict') &&
    !isSpecial(facts) &&
    findings.every((finding) => finding.weight === 'for-information')
  );
}

const urgency: Record<Verdict, number> = {
  'out-of-tolerance': 0,
  undecided: 1,
  'not-measured': 2,
  'in-tolerance': 5,
  'no-verdict': 6,
};

/** What needs a person first: failing, undecided, unmeasured, then special, then what carries a finding, then the rest. */
export function attention(row: {
  facts: CharacteristicFacts;
  verdict: Verdict;
  findings: readonly Finding[];
}): number {
  const first = urgency[row.verdict];
  if (first <= 2) return first;
  if (isSpecial(row.facts)) return 3;
  return row.findings.some((finding) => finding.weight !== 'for-information') ? 4 : first;
}

export interface MarkedRow {
  readonly facts: CharacteristicFacts;
  readonly verdict: Verdict;
  readonly deviations: readonly {
    readonly id: string;
    readonly state: string;
    readonly streamIds: readonly string[];
    readonly rangeLower: string | null;
    readonly rangeUpper: string | null;
  }[];
  /** Readings of each stream that the warrant covers. */
  readonly streams: readonly {
    readonly id: string;
    readonly texts: readonly (string | null)[];
    readonly marks: string;
    readonly out: boolean;
  }[];
}

/** Why this mark cannot be given to this row; null when it can. R46: outside its limits nothing is accepted without a deviation. */
export function refusalOfMark(
  row: MarkedRow,
  asked: { mark: RowMark | null; deviationId: string | null; remark: string; internalRemark: string },
): { pointer: string; detail: string } | null {
  const { facts, verdict } = row;
  if (asked.deviationId !== null && !row.deviations.some((deviation) => deviation.id === asked.deviationId)) {
    return { pointer: '/deviationId', detail: `Balloon ${facts.balloon} has no such deviation request.` };
  }
  if (asked.mark !== 'accepted') return null;
  if (verdict === 'not-measured') {
    return {
      pointer: '/mark',
      detail: `Balloon ${facts.balloon} is not measured in full; there is nothing to accept. Refuse it or ask.`,
    };
  }
  if (verdict === 'undecided' && asked.remark === '' && asked.internalRemark === '') {
    return {
      pointer: '/remark',
      detail: `Balloon ${facts.balloon} is undecided: write why it is accepted all the same.`,
    };
  }
  if (verdict !== 'out-of-tolerance') return null;
  const granted = row.deviations.find(
    (deviation) => deviation.id === asked.deviationId && deviation.state === 'granted',
  );
  if (!granted) {
    return {
      pointer: '/deviationId',
      detail: `Balloon ${facts.balloon} is out of tolerance. It can be accepted only under a granted deviation; grant one first or refuse the row.`,
    };
  }
  const uncovered = row.streams.find(
    (stream) =>
      stream.out &&
      ((granted.streamIds.length > 0 && !granted.streamIds.includes(stream.id)) ||
        !deviationCovers(granted, facts, outReadings({ facts, texts: stream.texts, marks: stream.marks }))),
  );
  return uncovered
    ? {
        pointer: '/deviationId',
        detail: `The deviation does not cover every reading of balloon ${facts.balloon} that is out.`,
      }
    : null;
}
