import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Written once, never changed: whatever code or person tries. */
const appendOnly = ['audit_events', 'signatures', 'sealed_packages', 'checks', 'dispositions'];

/** Evidence of a submitted package, by the column that names its submission. */
const sealedEvidence = [
  'characteristic_results',
  'sample_pieces',
  'submission_streams',
  'submission_elements',
  'element_files',
];

/** The reviewer's marks, closed by the disposition. */
const decidedMarks = ['characteristic_decisions', 'element_decisions'];

function refuse(name: string, event: string, table: string, when: string, message: string): string {
  return `CREATE TRIGGER "${name}" BEFORE ${event} ON "${table}" ${when} BEGIN SELECT RAISE(ABORT, '${message}'); END`;
}

function closedBy(column: 'sealed_at' | 'decided_at', row: 'NEW' | 'OLD'): string {
  return `EXISTS (SELECT 1 FROM submissions s WHERE s.id = ${row}.submission_id AND s.${column} IS NOT NULL)`;
}

function closedTable(table: string, column: 'sealed_at' | 'decided_at', message: string): string[] {
  return [
    refuse(`${table}_closed_insert`, 'INSERT', table, `WHEN ${closedBy(column, 'NEW')}`, message),
    refuse(`${table}_closed_delete`, 'DELETE', table, `WHEN ${closedBy(column, 'OLD')}`, message),
    refuse(
      `${table}_closed_update`,
      'UPDATE',
      table,
      `WHEN ${closedBy(column, 'OLD')} OR ${closedBy(column, 'NEW')}`,
      message,
    ),
  ];
}

const frozenRevision = (row: 'NEW' | 'OLD') =>
  `WHEN EXISTS (SELECT 1 FROM part_revisions r WHERE r.id = ${row}.revision_id AND r.state <> 'draft')`;

const statements = [
  ...appendOnly.flatMap((table) => [
    refuse(`${table}_no_update`, 'UPDATE', table, '', `${table} is append-only`),
    refuse(`${table}_no_delete`, 'DELETE', table, '', `${table} is append-only`),
  ]),
  ...sealedEvidence.flatMap((table) =>
    closedTable(table, 'sealed_at', 'the package is submitted and sealed'),
  ),
  ...decidedMarks.flatMap((table) => closedTable(table, 'decided_at', 'the disposition is signed')),
  refuse(
    'submissions_seal_stays',
    'UPDATE',
    'submissions',
    `WHEN OLD.sealed_at IS NOT NULL AND (NEW.sealed_at IS NOT OLD.sealed_at OR NEW.request_id <> OLD.request_id
      OR NEW.round <> OLD.round OR NEW.revision_id <> OLD.revision_id OR NEW.part_number <> OLD.part_number
      OR NEW.part_name <> OLD.part_name OR NEW.revision_code <> OLD.revision_code OR NEW.warrant <> OLD.warrant
      OR NEW.submitted_at IS NOT OLD.submitted_at OR NEW.submitted_by_id IS NOT OLD.submitted_by_id
      OR NEW.official_check_id IS NOT OLD.official_check_id)`,
    'the package is submitted and sealed',
  ),
  refuse(
    'submissions_stay',
    'DELETE',
    'submissions',
    'WHEN OLD.sealed_at IS NOT NULL',
    'the package is submitted and sealed',
  ),
  refuse(
    'characteristics_frozen_insert',
    'INSERT',
    'characteristics',
    frozenRevision('NEW'),
    'the revision is released',
  ),
  refuse(
    'characteristics_frozen_update',
    'UPDATE',
    'characteristics',
    frozenRevision('OLD'),
    'the revision is released',
  ),
  refuse(
    'characteristics_frozen_delete',
    'DELETE',
    'characteristics',
    frozenRevision('OLD'),
    'the revision is released',
  ),
  refuse(
    'stored_files_stay',
    'UPDATE',
    'stored_files',
    `WHEN OLD.state = 'stored' AND (NEW.sha256 <> OLD.sha256 OR NEW.size <> OLD.size OR NEW.object_key <> OLD.object_key
      OR NEW.organisation_id <> OLD.organisation_id)`,
    'a stored file is never replaced',
  ),
];

/** What has been signed, sealed, released or recorded is kept by the database itself, not by the good will of code. */
export class RecordsThatStay1764576000002 implements MigrationInterface {
  readonly name = 'RecordsThatStay1764576000002';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of statements) await runner.query(statement);
  }

  async down(): Promise<void> {
    throw new Error('Migrations go forward only; restore a backup instead.');
  }
}
