import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { compare } from '../../../.ci/bench-harness.mjs';
import { writeStatement } from '../src/database/raw.ts';
import { openDatabase } from '../src/database/data-source.ts';
import { writeReadings, type ReadingChange } from '../src/evidence/write-readings.ts';
import { openPackage } from './open-package.ts';
import { rowsFor } from './readings.ts';

const folder = mkdtempSync(join(tmpdir(), 'trammel-bench-'));
const db = await openDatabase(join(folder, 'bench.sqlite'));
const scene = await openPackage(db, 2000, 300);
const texts = rowsFor(2000, 300).map((row) => row.split('\n'));
const changes: ReadingChange[] = scene.characteristicIds.flatMap((characteristicId, row) =>
  scene.pieceIds.map((pieceId, place) => ({ characteristicId, pieceId, text: texts[row]?.[place] ?? null })),
);
const insert = `INSERT INTO characteristic_results (id, submission_id, characteristic_id, stream_id, readings, marks, note, n, minimum,
  maximum, mean, standard_deviation, out_count, undecided_count, verdict, updated_at, version)
  VALUES (?,?,?,?,?,?,'',300,'24.960','25.040',25,0.02,0,0,'in-tolerance',?,1)`;
const empty = () =>
  db.writeTransaction((manager) =>
    Promise.resolve(void writeStatement(manager, 'DELETE FROM characteristic_results').run()),
  );

await compare('saving a package of 2,000 x 300 readings against the same rows raw', {
  before: empty,
  product: () =>
    db.writeTransaction((manager) =>
      Promise.resolve(writeReadings(manager, scene.scope, changes, true).rows.length),
    ),
  limit: () =>
    db.writeTransaction((manager) => {
      const statement = writeStatement(manager, insert);
      scene.characteristicIds.forEach((id, row) =>
        statement.run(
          `${id}-${scene.streamId}`,
          scene.scope.submissionId,
          id,
          scene.streamId,
          (texts[row] ?? []).join('\n'),
          'i'.repeat(300),
          scene.scope.now,
        ),
      );
      return Promise.resolve(null);
    }),
  goal: 3,
  rounds: 7,
});

await empty();
let turn = 0;
const [characteristicId = ''] = scene.characteristicIds;
const [pieceId = ''] = scene.pieceIds;
await compare('saving one reading against a bare transaction', {
  product: () => {
    turn += 1;
    const text = `25.0${10 + (turn % 40)}`;
    return db.writeTransaction((manager) =>
      Promise.resolve(
        writeReadings(manager, scene.scope, [{ characteristicId, pieceId, text }], true).rows.length,
      ),
    );
  },
  limit: () =>
    db.writeTransaction((manager) => {
      turn += 1;
      return Promise.resolve(
        writeStatement(
          manager,
          'UPDATE characteristic_results SET note = ? WHERE submission_id = ? AND characteristic_id = ?',
        ).run(String(turn), scene.scope.submissionId, characteristicId),
      );
    }),
  goal: 5,
  repeat: 20,
});
await db.close();
rmSync(folder, { recursive: true, force: true });
