import type { EntityManager } from 'typeorm';
import type { CheckedRow, Finding } from '@trammel/shared/checks';
import type { Verdict } from '@trammel/shared/status';
import { CharacteristicDecision } from '../../database/entities/characteristic-decision.entity.ts';
import { Deviation } from '../../database/entities/deviation.entity.ts';
import type { StoredCheck } from '../../database/entities/check.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import type { CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import {
  characteristicsOf,
  judgingRules,
  piecesOf,
  streamsOf,
  type Characteristics,
  type JudgingRules,
  type Piece,
  type Prepare,
  type Stream,
} from '../../evidence/package-context.ts';
import { storedRowColumns, type StoredRow } from '../../evidence/stored-row.ts';
import { Conflict } from '../../http/problems.ts';
import { findOfficialCheck } from '../checks/checks.queries.ts';
import { isClean, overallVerdict } from './submission-review.rules.ts';

/** One characteristic over all its streams, before it is presented. */
export interface SceneRow {
  readonly facts: CharacteristicFacts;
  readonly verdict: Verdict;
  readonly checked: CheckedRow[];
  readonly results: StoredRow[];
  readonly findings: Finding[];
  readonly deviations: Deviation[];
  readonly decision: CharacteristicDecision | null;
  readonly clean: boolean;
}

export interface ReviewScene {
  readonly submission: Submission;
  readonly rules: JudgingRules;
  readonly characteristics: Characteristics;
  readonly streams: Stream[];
  readonly pieces: Piece[];
  readonly check: StoredCheck;
  readonly deviations: Deviation[];
  readonly rows: SceneRow[];
}

/** A submitted package as the official check left it, with what has been decided since. One statement a table. */
export async function loadScene(
  manager: EntityManager,
  prepare: Prepare,
  submission: Submission,
): Promise<ReviewScene> {
  const check = await findOfficialCheck(manager, submission);
  if (!check) throw new Conflict('This round has not been submitted, so there is nothing to review yet.');
  const characteristics = characteristicsOf(prepare, submission.revisionId);
  const streams = streamsOf(prepare, submission.id);
  const open = new Set(streams.filter((stream) => !stream.blocked).map((stream) => stream.id));
  const stored = prepare(
    `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ?`,
  ).all(submission.id) as StoredRow[];
  const deviations = await manager.find(Deviation, {
    where: { submissionId: submission.id },
    order: { number: 'ASC' },
  });
  const decisions = await manager.findBy(CharacteristicDecision, { submissionId: submission.id });
  const decided = new Map(decisions.map((decision) => [decision.characteristicId, decision]));
  const byCharacteristic = {
    checked: group(check.rows, (row) => row.characteristicId),
    results: group(stored, (row) => row.characteristicId),
    findings: group(check.findings, (finding) => finding.place.characteristicId ?? ''),
    deviations: group(deviations, (deviation) => deviation.characteristicId),
  };
  const rows = characteristics.list.map((facts): SceneRow => {
    const checked = byCharacteristic.checked.get(facts.id) ?? [];
    const findings = byCharacteristic.findings.get(facts.id) ?? [];
    const verdict = overallVerdict(checked.filter((row) => open.has(row.streamId)).map((row) => row.verdict));
    return {
      facts,
      verdict,
      checked,
      findings,
      results: byCharacteristic.results.get(facts.id) ?? [],
      deviations: byCharacteristic.deviations.get(facts.id) ?? [],
      decision: decided.get(facts.id) ?? null,
      clean: isClean(facts, verdict, findings),
    };
  });
  const rules = judgingRules(prepare, submission.requestId);
  return {
    submission,
    rules,
    characteristics,
    streams,
    pieces: piecesOf(prepare, submission.id),
    check,
    deviations,
    rows,
  };
}

function group<Item>(items: readonly Item[], keyOf: (item: Item) => string): Map<string, Item[]> {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const list = groups.get(keyOf(item));
    if (list) list.push(item);
    else groups.set(keyOf(item), [item]);
  }
  return groups;
}
