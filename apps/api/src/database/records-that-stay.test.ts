import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bore, bossPosition, marking, PackageStory, wall } from '../testing/package-story.ts';

let story: PackageStory;

beforeAll(async () => {
  story = await PackageStory.begin({ closes: 'caller' });
  await story.releasePart([bore, bossPosition, wall, marking]);
  await story.issue();
  await story.acknowledge();
  await story.submitClean();
  await story.acceptAll();
});
afterAll(() => story.app.close());

const attempt = (sql: string) => story.app.db.writeTransaction((manager) => manager.query(sql));
const count = async (table: string) => {
  const [row] = await story.app.db.reader.query<{ n: number }[]>(`SELECT COUNT(*) AS n FROM ${table}`);
  return row?.n ?? 0;
};

/** Statements that each would change a record which must stay, and must meet at least one row to do it. */
const forbidden: [table: string, sql: string, words: string][] = [
  ['signatures', `UPDATE signatures SET name = 'Somebody'`, 'append-only'],
  ['signatures', `DELETE FROM signatures`, 'append-only'],
  ['sealed_packages', `UPDATE sealed_packages SET canonical = '{}'`, 'append-only'],
  ['sealed_packages', `DELETE FROM sealed_packages`, 'append-only'],
  ['checks', `UPDATE checks SET verdict = 'in-tolerance'`, 'append-only'],
  ['characteristic_results', `UPDATE characteristic_results SET readings = '1'`, 'sealed'],
  ['characteristic_results', `DELETE FROM characteristic_results`, 'sealed'],
  [
    'characteristic_results',
    `INSERT INTO characteristic_results SELECT 'new', submission_id, characteristic_id, 'other', readings, marks,
       attribute_checked, attribute_failed, gauge_id, measured_on, note, n, minimum, maximum, mean, standard_deviation,
       out_count, undecided_count, verdict, entered_by_id, updated_at, version FROM characteristic_results LIMIT 1`,
    'sealed',
  ],
  ['sample_pieces', `UPDATE sample_pieces SET label = 'x' || id`, 'sealed'],
  ['submission_streams', `UPDATE submission_streams SET blocked = 1`, 'sealed'],
  ['submission_elements', `UPDATE submission_elements SET state = 'open'`, 'sealed'],
  ['element_files', `DELETE FROM element_files`, 'sealed'],
  ['submissions', `UPDATE submissions SET sealed_at = NULL`, 'sealed'],
  ['submissions', `UPDATE submissions SET warrant = '{}'`, 'sealed'],
  ['submissions', `UPDATE submissions SET part_number = 'other'`, 'sealed'],
  ['submissions', `DELETE FROM submissions`, 'sealed'],
  ['characteristics', `UPDATE characteristics SET upper_limit = '99'`, 'released'],
  ['characteristics', `DELETE FROM characteristics`, 'released'],
  ['stored_files', `UPDATE stored_files SET sha256 = 'x'`, 'never replaced'],
  ['audit_events', `UPDATE audit_events SET actor_name = 'Nobody'`, 'append-only'],
];

describe('what was signed, sealed, released or recorded', () => {
  it.each(forbidden)('stays in %s: %s', async (table, sql, words) => {
    expect(await count(table)).toBeGreaterThan(0);
    await expect(attempt(sql)).rejects.toThrow(words);
  });

  it('leaves the reviewer free to mark until the disposition is signed, and not afterwards', async () => {
    const remark = `UPDATE characteristic_decisions SET remark = 'seen'`;
    await attempt(remark);
    await story.dispose({ outcome: 'approved' });
    await expect(attempt(remark)).rejects.toThrow('the disposition is signed');
    await expect(attempt(`DELETE FROM characteristic_decisions`)).rejects.toThrow(
      'the disposition is signed',
    );
    await expect(attempt(`DELETE FROM dispositions`)).rejects.toThrow('append-only');
  });
});
