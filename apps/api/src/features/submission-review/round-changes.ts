import { Submission } from '../../database/entities/submission.entity.ts';
import type { EntityManager } from 'typeorm';
import type { CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import { characteristicsOf, type Prepare } from '../../evidence/package-context.ts';
import { storedRowColumns, type StoredRow } from '../../evidence/stored-row.ts';

export type RowChange = 'new' | 'readings' | 'limits' | 'same';

/** How each row differs from the round before; null in the first round. Streams are matched by name, rows by balloon. */
export async function changesSince(
  manager: EntityManager,
  prepare: Prepare,
  submission: Submission,
): Promise<Map<string, RowChange> | null> {
  if (submission.round === 1) return null;
  const before = await manager.findOneBy(Submission, {
    requestId: submission.requestId,
    round: submission.round - 1,
  });
  if (!before) return null;
  const old = characteristicsOf(prepare, before.revisionId);
  const [oldTexts, newTexts] = [textsByRow(prepare, before), textsByRow(prepare, submission)];
  const changes = new Map<string, RowChange>();
  for (const facts of characteristicsOf(prepare, submission.revisionId).list) {
    const counterpart = old.byBalloon.get(facts.balloon);
    const change: RowChange = !counterpart
      ? 'new'
      : limitsDiffer(counterpart, facts)
        ? 'limits'
        : oldTexts.get(counterpart.id) === newTexts.get(facts.id)
          ? 'same'
          : 'readings';
    changes.set(facts.id, change);
  }
  return changes;
}

function limitsDiffer(a: CharacteristicFacts, b: CharacteristicFacts): boolean {
  return (
    a.lowerLimit !== b.lowerLimit ||
    a.upperLimit !== b.upperLimit ||
    a.unit !== b.unit ||
    a.naturalLower !== b.naturalLower
  );
}

function textsByRow(prepare: Prepare, submission: Submission): Map<string, string> {
  const rows = prepare(
    `SELECT ${storedRowColumns}, (SELECT name FROM submission_streams s WHERE s.id = characteristic_results.stream_id) AS stream
     FROM characteristic_results WHERE submission_id = ? ORDER BY stream`,
  ).all(submission.id) as (StoredRow & { stream: string })[];
  const texts = new Map<string, string>();
  for (const row of rows) {
    const one = `${row.stream}:${row.readings}:${row.attributeChecked ?? ''}/${row.attributeFailed ?? ''};`;
    texts.set(row.characteristicId, (texts.get(row.characteristicId) ?? '') + one);
  }
  return texts;
}
