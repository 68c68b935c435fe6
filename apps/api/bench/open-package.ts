import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Database } from '../src/database/data-source.ts';
import { writeStatement } from '../src/database/raw.ts';
import type { WritingScope } from '../src/evidence/row-work.ts';

export interface BenchPackage {
  readonly scope: WritingScope;
  readonly streamId: string;
  readonly characteristicIds: string[];
  readonly pieceIds: string[];
}

const now = '2026-06-01T08:00:00.000Z';

/** The rows that a package in preparation stands on, written straight into a fresh database. */
export function openPackage(db: Database, characteristics: number, pieces: number): Promise<BenchPackage> {
  return db.writeTransaction((manager) => {
    const insert = inserter(manager);
    const [customer, supplier, site, user, part, revision, request, submission, stream] = Array.from(
      { length: 9 },
      () => randomUUID(),
    );
    insert('organisations', { id: customer, name: 'Customer', created_at: now, version: 1 });
    insert('organisations', { id: supplier, name: 'Supplier', created_at: now, version: 1 });
    insert('sites', { id: site, organisation_id: supplier, name: 'Works', address: '' });
    insert('users', {
      id: user,
      organisation_id: supplier,
      email: 'a@works.example',
      name: 'A',
      title: '',
      roles: '[]',
      created_at: now,
      version: 1,
    });
    insert('parts', {
      id: part,
      organisation_id: customer,
      number: 'TD-1',
      name: 'Part',
      unit_system: 'metric',
      created_at: now,
      created_by_id: user,
      version: 1,
    });
    insert('part_revisions', {
      id: revision,
      part_id: part,
      organisation_id: customer,
      code: 'A',
      sequence: 1,
      state: 'draft',
      tolerancing_standard: 'iso',
      rounding_rule: 'absolute',
      created_at: now,
      version: 1,
    });
    const characteristicIds = Array.from({ length: characteristics }, (_, index) => {
      const id = randomUUID();
      insert('characteristics', {
        id,
        revision_id: revision,
        lineage_id: id,
        sequence: index + 1,
        balloon: String(index + 1),
        description: 'Feature',
        kind: 'size',
        tolerance: '{"form":"none","nominal":null}',
        unit: 'mm',
        decimals: 3,
        class: 'none',
        controlled_by: '[]',
        lower_limit: '24.950',
        upper_limit: '25.050',
        version: 1,
      });
      return id;
    });
    writeStatement(manager, "UPDATE part_revisions SET state = 'released' WHERE id = ?").run(revision);
    insert('requests', {
      id: request,
      number: 1,
      customer_id: customer,
      supplier_id: supplier,
      site_id: site,
      part_id: part,
      revision_id: revision,
      state: 'issued',
      reason: 'initial',
      level: 3,
      elements: '[]',
      stream_kind: 'line',
      streams: '["line 1"]',
      pieces_per_stream: pieces,
      decision_rule: '{"kind":"simple"}',
      due_on: '2026-07-01',
      created_at: now,
      created_by_id: user,
      version: 1,
    });
    insert('submissions', {
      id: submission,
      request_id: request,
      round: 1,
      customer_id: customer,
      supplier_id: supplier,
      part_id: part,
      revision_id: revision,
      part_number: 'TD-1',
      part_name: 'Part',
      revision_code: 'A',
      state: 'in-preparation',
      desk: 'supplier',
      is_open: 1,
      due_on: '2026-07-01',
      created_at: now,
      updated_at: now,
      warrant: '{}',
      version: 1,
    });
    insert('submission_streams', {
      id: stream,
      submission_id: submission,
      name: 'line 1',
      sequence: 1,
      version: 1,
    });
    const pieceIds = Array.from({ length: pieces }, (_, slot) => {
      const id = randomUUID();
      insert('sample_pieces', {
        id,
        submission_id: submission,
        stream_id: stream,
        slot,
        label: String(slot + 1),
        version: 1,
      });
      return id;
    });
    const scope = {
      submissionId: submission ?? '',
      requestId: request ?? '',
      revisionId: revision ?? '',
      userId: user ?? '',
      now,
    };
    return Promise.resolve({ scope, streamId: stream ?? '', characteristicIds, pieceIds });
  });
}

export function inserter(manager: EntityManager) {
  return (table: string, row: Record<string, unknown>): void => {
    const columns = Object.keys(row);
    const statement = writeStatement(
      manager,
      `INSERT INTO ${table} (${columns.join(', ')}) VALUES (${columns.map(() => '?').join(', ')})`,
    );
    statement.run(...Object.values(row));
  };
}
