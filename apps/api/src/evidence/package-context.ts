import type { CompiledLimits } from '@trammel/metrology/conformance';
import type { Undetermined } from '@trammel/metrology';
import type { DecisionRule } from '@trammel/shared/requests';
import { characteristicColumns, factsOfRow, type CharacteristicFacts } from './characteristic-facts.ts';
import { compileFor } from './decision-rules.ts';

/** Runs a prepared statement: `writeStatement` inside a transaction, `readStatement` for screens. */
export type Prepare = (sql: string) => {
  all(...values: unknown[]): unknown[];
  get(...values: unknown[]): unknown;
};

export interface Characteristics {
  readonly list: readonly CharacteristicFacts[];
  readonly byId: ReadonlyMap<string, CharacteristicFacts>;
  readonly byBalloon: ReadonlyMap<string, CharacteristicFacts>;
  /** Characteristics whose bonus comes from this one's size, by its id. */
  readonly dependents: ReadonlyMap<string, readonly CharacteristicFacts[]>;
}

/** How the rows of a package are judged. */
export interface JudgingRules {
  readonly decisionRule: DecisionRule;
  readonly roundingRule: 'absolute' | 'astm-e29';
  readonly piecesPerStream: number;
}

export interface Stream {
  readonly id: string;
  readonly name: string;
  readonly sequence: number;
  readonly blocked: boolean;
  readonly blockedReason: string;
  readonly version: number;
}

export interface Piece {
  readonly id: string;
  readonly streamId: string;
  readonly slot: number;
  readonly label: string;
  readonly madeOn: string | null;
  readonly lot: string;
  readonly version: number;
}

const kept = 64;
const released = new Map<string, Characteristics>();

/** Characteristics of a revision. A released revision never changes, so what was read once is kept. */
export function characteristicsOf(prepare: Prepare, revisionId: string): Characteristics {
  const known = released.get(revisionId);
  if (known) return known;
  const rows = prepare(
    `SELECT ${characteristicColumns} FROM characteristics WHERE revision_id = ? ORDER BY sequence`,
  ).all(revisionId);
  const list = rows.map(factsOfRow);
  const byBalloon = new Map(list.map((facts) => [facts.balloon, facts]));
  const dependents = new Map<string, CharacteristicFacts[]>();
  for (const facts of list) {
    const geometric = facts.geometric;
    if (geometric === null || geometric.modifier === 'RFS' || geometric.sizeBalloon === null) continue;
    const size = byBalloon.get(geometric.sizeBalloon);
    if (size) dependents.set(size.id, [...(dependents.get(size.id) ?? []), facts]);
  }
  const found: Characteristics = {
    list,
    byId: new Map(list.map((facts) => [facts.id, facts])),
    byBalloon,
    dependents,
  };
  const revision = prepare('SELECT state FROM part_revisions WHERE id = ?').get(revisionId) as
    { state: string } | undefined;
  if (revision && revision.state !== 'draft') {
    if (released.size >= kept) released.delete(released.keys().next().value ?? '');
    released.set(revisionId, found);
  }
  return found;
}

export function judgingRules(prepare: Prepare, requestId: string): JudgingRules {
  const row = prepare(
    `SELECT r.decision_rule AS rule, r.pieces_per_stream AS pieces, v.rounding_rule AS rounding
     FROM requests r JOIN part_revisions v ON v.id = r.revision_id WHERE r.id = ?`,
  ).get(requestId) as { rule: string; pieces: number; rounding: 'absolute' | 'astm-e29' };
  return {
    decisionRule: JSON.parse(row.rule) as DecisionRule,
    roundingRule: row.rounding,
    piecesPerStream: row.pieces,
  };
}

export function streamsOf(prepare: Prepare, submissionId: string): Stream[] {
  const rows = prepare(
    'SELECT id, name, sequence, blocked, blocked_reason AS blockedReason, version FROM submission_streams WHERE submission_id = ? ORDER BY sequence',
  ).all(submissionId) as (Omit<Stream, 'blocked'> & { blocked: number })[];
  return rows.map((row) => ({ ...row, blocked: row.blocked === 1 }));
}

export function piecesOf(prepare: Prepare, submissionId: string): Piece[] {
  return prepare(
    `SELECT p.id, p.stream_id AS streamId, p.slot, p.label, p.made_on AS madeOn, p.lot, p.version
     FROM sample_pieces p JOIN submission_streams s ON s.id = p.stream_id
     WHERE p.submission_id = ? ORDER BY s.sequence, p.slot`,
  ).all(submissionId) as Piece[];
}

/** Pieces asked for on a row in each stream. */
export function requiredPieces(facts: CharacteristicFacts, rules: JudgingRules): number {
  return facts.pieces ?? rules.piecesPerStream;
}

/** Limits made ready once for each characteristic of a run over many rows. */
export function limitCompiler(
  rules: JudgingRules,
): (facts: CharacteristicFacts) => CompiledLimits | Undetermined {
  const made = new Map<string, CompiledLimits | Undetermined>();
  return (facts) => {
    let compiled = made.get(facts.id);
    if (compiled === undefined)
      made.set(facts.id, (compiled = compileFor(facts, rules.decisionRule, rules.roundingRule)));
    return compiled;
  };
}
