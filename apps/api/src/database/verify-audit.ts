import type { DataSource } from 'typeorm';
import { firstHash, hashOfRow, type AuditRow } from './append-audit.ts';
import { readStatement } from './raw.ts';

export interface AuditVerification {
  readonly rows: number;
  readonly sound: boolean;
  readonly firstBroken: number | null;
  readonly reason: string | null;
}

/** A head of the chain noted outside the database. */
export interface Anchor {
  readonly sequence: number;
  readonly hash: string;
}

type StoredRow = AuditRow & { hash: string };

const pageSize = 2000;

const columns = `sequence, organisation_sequence AS organisationSequence, at, actor_id AS actorId, actor_name AS actorName,
  organisation_id AS organisationId, organisation_name AS organisationName, action, object_type AS objectType,
  object_id AS objectId, summary, before, after, previous_hash AS previousHash, hash`;

/**
 * Reads the chain from `from` on and compares it with the anchors. The chain alone finds a changed, inserted, removed or
 * swapped row; the anchors also find removed newest rows and a tail that was worked out anew. Pages leave the event loop
 * free in between.
 */
export async function verifyAuditTrail(
  reader: DataSource,
  anchors: readonly Anchor[],
  from = 1,
): Promise<AuditVerification> {
  const expected = new Map(anchors.map((anchor) => [anchor.sequence, anchor.hash]));
  let previous = from === 1 ? firstHash : hashAt(reader, from - 1);
  let next = from;
  for (;;) {
    const rows = readStatement(
      reader,
      `SELECT ${columns} FROM audit_events WHERE sequence >= ? ORDER BY sequence LIMIT ${pageSize}`,
    ).all(next) as StoredRow[];
    for (const stored of rows) {
      const fault = faultOf(stored, next, previous, expected);
      if (fault) return { rows: next - 1, sound: false, firstBroken: next, reason: fault };
      previous = stored.hash;
      next += 1;
    }
    if (rows.length < pageSize) break;
    await new Promise((resolve) => setImmediate(resolve));
  }
  const lost = anchors.find((anchor) => anchor.sequence >= next);
  if (lost) {
    const reason = `The newest rows are missing: row ${lost.sequence} was noted outside the database`;
    return { rows: next - 1, sound: false, firstBroken: next, reason };
  }
  return { rows: next - 1, sound: true, firstBroken: null, reason: null };
}

function faultOf(
  { hash, ...row }: StoredRow,
  sequence: number,
  previous: string | undefined,
  anchors: ReadonlyMap<number, string>,
): string | null {
  if (row.sequence !== sequence) return `Row ${sequence} is missing`;
  if (row.previousHash !== previous) return 'The row does not follow the one before it';
  if (hashOfRow(row) !== hash) return 'The content of the row was changed';
  const anchor = anchors.get(sequence);
  return anchor !== undefined && anchor !== hash
    ? 'The row differs from what was noted outside the database'
    : null;
}

function hashAt(reader: DataSource, sequence: number): string | undefined {
  const row = readStatement(reader, 'SELECT hash FROM audit_events WHERE sequence = ?').get(sequence);
  return (row as { hash: string } | undefined)?.hash;
}

export function auditHead(reader: DataSource): Anchor | null {
  const row = readStatement(
    reader,
    'SELECT sequence, hash FROM audit_events ORDER BY sequence DESC LIMIT 1',
  ).get();
  return (row as Anchor | undefined) ?? null;
}
