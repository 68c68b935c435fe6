import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Orders of a desk that shows everything; without them 100,000 packages are sorted for each page. */
const indexes = [
  ['customer_id', 'due_on'],
  ['customer_id', 'part_number'],
  ['supplier_id', 'due_on'],
  ['supplier_id', 'part_number'],
] as const;

export class WholeDesks1764576000003 implements MigrationInterface {
  readonly name = 'WholeDesks1764576000003';

  async up(runner: QueryRunner): Promise<void> {
    for (const [side, order] of indexes) {
      await runner.query(
        `CREATE INDEX "ix_submissions_${side}_${order}_id" ON "submissions" ("${side}", "${order}", "id") `,
      );
    }
  }

  async down(): Promise<void> {
    throw new Error('Migrations go forward only; restore a backup instead.');
  }
}
