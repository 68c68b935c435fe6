import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { compare } from '../../../.ci/bench-harness.mjs';
import { openDatabase } from '../src/database/data-source.ts';
import { readStatement } from '../src/database/raw.ts';
import { findReviewDesk } from '../src/features/submissions/review-desk.queries.ts';
import { findWorklist } from '../src/features/submissions/worklist.queries.ts';
import { inserter, openPackage } from './open-package.ts';

const count = 100_000;
const folder = mkdtempSync(join(tmpdir(), 'trammel-bench-'));
const db = await openDatabase(join(folder, 'bench.sqlite'));
await openPackage(db, 1, 1);
const [base]: Record<string, unknown>[] = await db.reader.query('SELECT * FROM submissions');
const [request]: Record<string, unknown>[] = await db.reader.query('SELECT * FROM requests');
if (!base || !request) throw new Error('The scene is empty.');
await db.writeTransaction((manager) => {
  const insert = inserter(manager);
  for (let index = 0; index < count; index += 1) {
    const day = String((index % 28) + 1).padStart(2, '0');
    const month = String((Math.floor(index / 28) % 12) + 1).padStart(2, '0');
    const submitted = index % 3 === 0;
    const requestId = randomUUID();
    insert('requests', { ...request, id: requestId, number: index + 2 });
    insert('submissions', {
      ...base,
      id: randomUUID(),
      request_id: requestId,
      part_number: `TD-${10_000 + (index % 20_000)}`,
      due_on: `2026-${month}-${day}`,
      is_open: index % 5 === 0 ? 1 : 0,
      state: submitted ? 'submitted' : 'approved',
      desk: submitted ? 'customer' : 'closed',
      submitted_at: `2026-${month}-${day}T08:00:00.000Z`,
    });
  }
  return Promise.resolve();
});
const supplier = { id: String(base.supplier_id), name: 'Supplier' };
const customer = { id: String(base.customer_id), name: 'Customer' };

const page = { show: 'open' as const, sort: 'dueOn' as const, limit: 50 };
await compare('first page of the worklist of 100,000 against the bare statement', {
  product: () => findWorklist(db.reader, supplier, page).items.length,
  limit: () =>
    readStatement(
      db.reader,
      `SELECT s.id, s.request_id, r.number, s.round, s.state, s.desk, s.is_open, c.name, s.part_number, s.part_name, s.revision_code, s.due_on, s.stops, s.decides,
         s.informs, s.measured_rows, s.total_rows, r.question_open, s.updated_at
       FROM submissions s LEFT JOIN requests r ON r.id = s.request_id LEFT JOIN organisations c ON c.id = s.customer_id
       WHERE s.supplier_id = ? AND s.is_open = 1 ORDER BY s.due_on, s.id LIMIT 51`,
    ).all(supplier.id).length,
  goal: 1.7,
  repeat: 50,
});
await compare('first page of the review desk of 100,000 against the bare statement', {
  product: () =>
    findReviewDesk(
      db.reader,
      customer.id,
      { show: 'waiting', sort: 'submittedAt', limit: 50 },
      '2026-12-31T00:00:00.000Z',
    ).items.length,
  limit: () =>
    readStatement(
      db.reader,
      `SELECT s.id, s.request_id, r.number, s.round, s.state, o.name, s.part_number, s.part_name, s.revision_code, s.due_on, s.submitted_at, s.out_count,
         s.undecided_count, s.special_count, s.deviations_open, r.question_open,
         (SELECT json_group_array(u.name) FROM request_reviewers v JOIN users u ON u.id = v.user_id WHERE v.request_id = s.request_id) AS reviewers
       FROM submissions s LEFT JOIN requests r ON r.id = s.request_id LEFT JOIN organisations o ON o.id = s.supplier_id
       WHERE s.customer_id = ? AND s.desk = 'customer' ORDER BY s.submitted_at, s.id LIMIT 51`,
    ).all(customer.id).length,
  goal: 1.7,
  repeat: 50,
});
await db.close();
rmSync(folder, { recursive: true, force: true });
