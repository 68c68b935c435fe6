import { stations, type PackageState, type Station } from '@trammel/shared/status';
import type { RouteCardRound } from '@trammel/shared/submissions';

interface Stamp {
  readonly who: string | null;
  readonly at: string | null;
}

/** What is known of one round when its line on the card is drawn. */
export interface RoundFacts {
  readonly submissionId: string;
  readonly round: number;
  readonly state: PackageState;
  readonly customerName: string;
  readonly supplierName: string;
  readonly issued: Stamp;
  /** Acknowledged, or for a later round: started. */
  readonly started: Stamp | null;
  readonly measured: { readonly done: number; readonly of: number };
  readonly evidence: { readonly open: number };
  readonly checked: { readonly at: string | null; readonly stops: number };
  readonly warrant: Stamp | null;
  readonly review: { readonly startedAt: string | null };
  readonly decision: Stamp | null;
  /** Before submission the other side learns how far the work is, not what came out. */
  readonly resultsVisible: boolean;
}

type StationLine = RouteCardRound['stations'][number];

const outcomeWords: Partial<Record<PackageState, string>> = {
  'sent-back': 'Sent back',
  approved: 'Approved',
  'interim-approval': 'Interim approval',
  rejected: 'Rejected',
  lapsed: 'Lapsed',
  superseded: 'Superseded',
};

/** One line of the route card: finished stations bear who and when, the first unfinished one says whose hands. */
export function routeCardLine(facts: RoundFacts): RouteCardRound {
  const lines: StationLine[] = [];
  const ended = facts.state === 'withdrawn' || facts.state === 'superseded' || facts.state === 'lapsed';
  let reached = true;
  for (const station of stations) {
    const line = stationLine(station, facts);
    if (!reached && line.state !== 'skipped') {
      lines.push({ station, state: ended ? 'skipped' : 'ahead', who: null, at: null, note: null });
      continue;
    }
    if (line.state === 'in-hand') reached = false;
    lines.push(ended && line.state === 'in-hand' ? { ...line, state: 'skipped', who: null } : line);
  }
  return { submissionId: facts.submissionId, round: facts.round, state: facts.state, stations: lines };
}

function stationLine(station: Station, facts: RoundFacts): StationLine {
  const done = (stamp: Stamp, note: string | null = null): StationLine => ({
    station,
    state: 'done',
    who: stamp.who,
    at: stamp.at,
    note,
  });
  const inHand = (who: string, note: string | null): StationLine => ({
    station,
    state: 'in-hand',
    who,
    at: null,
    note,
  });
  const submitted = facts.warrant !== null;
  /** The supplier's own work bears its name, and the moment at which it was handed in. */
  const handedIn: Stamp = { who: facts.supplierName, at: facts.warrant?.at ?? null };

  switch (station) {
    case 'request':
      return facts.started
        ? done(facts.started, facts.round === 1 ? issuedNote(facts.issued) : null)
        : inHand(facts.supplierName, 'To acknowledge');
    case 'measurements': {
      const { done: rows, of } = facts.measured;
      const note = `${rows} of ${of} rows`;
      return submitted || rows >= of ? done(handedIn, note) : inHand(facts.supplierName, note);
    }
    case 'evidence': {
      const { open } = facts.evidence;
      const note = `${open} ${open === 1 ? 'element' : 'elements'} open`;
      return submitted || open === 0 ? done(handedIn) : inHand(facts.supplierName, note);
    }
    case 'check': {
      const { stops } = facts.checked;
      if (submitted) return done({ who: 'Trammel', at: facts.checked.at });
      if (!facts.resultsVisible) return inHand(facts.supplierName, null);
      const note = `${stops} ${stops === 1 ? 'finding stops' : 'findings stop'} submission`;
      return stops === 0 ? done({ who: 'Trammel', at: null }) : inHand(facts.supplierName, note);
    }
    case 'warrant':
      return facts.warrant ? done(facts.warrant) : inHand(facts.supplierName, 'To sign');
    case 'review':
      return facts.decision
        ? done(facts.decision)
        : inHand(facts.customerName, facts.review.startedAt ? 'Begun' : 'Waiting');
    case 'disposition':
      return facts.decision
        ? done(facts.decision, outcomeWords[facts.state] ?? null)
        : inHand(facts.customerName, null);
  }
}

function issuedNote(issued: Stamp): string | null {
  return issued.who === null ? null : `Issued by ${issued.who}`;
}
