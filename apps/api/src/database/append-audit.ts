import type { EntityManager } from 'typeorm';
import { canonicalJson, sha256Hex } from './canonical-json.ts';
import { writeStatement } from './raw.ts';

/** Who acts: a person, or the server itself on behalf of an organisation. */
export interface AuditAuthor {
  readonly now: string;
  readonly actor: {
    readonly userId: string;
    readonly name: string;
    readonly organisationId: string;
    readonly organisationName: string;
  } | null;
  /** For acts of the server: in whose trail they are shown. */
  readonly organisation?: { readonly id: string; readonly name: string };
}

export interface AuditEntry {
  /** Object and deed, such as `request.issued`. */
  readonly action: string;
  readonly objectType: string;
  readonly objectId: string;
  /** One sentence a person can read. Never a secret, never a measured value of another organisation. */
  readonly summary: string;
  readonly before?: unknown;
  readonly after?: unknown;
}

/** The columns that the chain covers, in the form in which they are hashed. */
export interface AuditRow {
  sequence: number;
  organisationSequence: number;
  at: string;
  actorId: string | null;
  actorName: string;
  organisationId: string | null;
  organisationName: string;
  action: string;
  objectType: string;
  objectId: string;
  summary: string;
  before: string | null;
  after: string | null;
  previousHash: string;
}

export const firstHash = '0'.repeat(64);

export function hashOfRow(row: AuditRow): string {
  return sha256Hex(canonicalJson(row));
}

/**
 * Appends to the trail inside the transaction of what it records: no record, no effect. Answers the new head of the
 * chain, which a signature or a mail may carry outside.
 */
export function appendAudit(manager: EntityManager, author: AuditAuthor, entry: AuditEntry): string {
  const head = writeStatement(
    manager,
    'SELECT sequence, hash FROM audit_events ORDER BY sequence DESC LIMIT 1',
  ).get() as { sequence: number; hash: string } | undefined;
  const organisationId = author.actor?.organisationId ?? author.organisation?.id ?? null;
  const own = writeStatement(
    manager,
    'SELECT MAX(organisation_sequence) AS last FROM audit_events WHERE organisation_id IS ?',
  ).get(organisationId) as { last: number | null };
  const row: AuditRow = {
    sequence: (head?.sequence ?? 0) + 1,
    organisationSequence: (own.last ?? 0) + 1,
    at: author.now,
    actorId: author.actor?.userId ?? null,
    actorName: author.actor?.name ?? 'Trammel',
    organisationId,
    organisationName: author.actor?.organisationName ?? author.organisation?.name ?? '',
    action: entry.action,
    objectType: entry.objectType,
    objectId: entry.objectId,
    summary: entry.summary,
    before: asText(entry.before),
    after: asText(entry.after),
    previousHash: head?.hash ?? firstHash,
  };
  const hash = hashOfRow(row);
  writeStatement(
    manager,
    `INSERT INTO audit_events (sequence, organisation_sequence, at, actor_id, actor_name, organisation_id,
       organisation_name, action, object_type, object_id, summary, before, after, previous_hash, hash)
     VALUES (@sequence, @organisationSequence, @at, @actorId, @actorName, @organisationId, @organisationName, @action,
       @objectType, @objectId, @summary, @before, @after, @previousHash, @hash)`,
  ).run({ ...row, hash });
  return hash;
}

function asText(value: unknown): string | null {
  return value === undefined || value === null ? null : canonicalJson(value);
}
