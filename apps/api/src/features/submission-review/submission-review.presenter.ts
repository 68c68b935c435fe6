import type {
  CharacteristicDecision as DecisionResponse,
  ReviewRow,
} from '@trammel/shared/submission-review';
import type { CharacteristicDecision } from '../../database/entities/characteristic-decision.entity.ts';
import { presentCharacteristic, presentRow } from '../../evidence/row-presenter.ts';
import type { Actor } from '../../http/actor.ts';
import { presentDeviation } from '../../evidence/deviation-presenter.ts';
import type { ReviewScene, SceneRow } from './review-scene.ts';
import type { RowChange } from './round-changes.ts';

const undecided: DecisionResponse = {
  mark: null,
  remark: '',
  deviationId: null,
  by: null,
  at: null,
  version: 0,
};

/** What is said to the supplier leaves; the internal remark stays with the customer's side. */
export function presentDecision(
  decision: CharacteristicDecision | null,
  side: 'customer' | 'supplier',
): DecisionResponse {
  if (decision === null) return side === 'customer' ? { ...undecided, internalRemark: '' } : undecided;
  const shown: DecisionResponse = {
    mark: decision.mark,
    remark: decision.remark,
    deviationId: decision.deviationId,
    by: decision.decidedByName,
    at: decision.decidedAt,
    version: decision.version,
  };
  return side === 'customer' ? { ...shown, internalRemark: decision.internalRemark } : shown;
}

export interface RowView {
  readonly scene: ReviewScene;
  readonly side: 'customer' | 'supplier';
  readonly actor: Actor;
  readonly slots: ReadonlyMap<string, readonly number[]>;
  readonly changes: ReadonlyMap<string, RowChange> | null;
}

export function presentReviewRow(row: SceneRow, view: RowView): ReviewRow {
  const { scene, side, actor, slots, changes } = view;
  const deviationScene = {
    submission: scene.submission,
    side,
    characteristics: scene.characteristics,
    rows: row.results,
  };
  return {
    characteristic: presentCharacteristic(row.facts, scene.rules),
    verdict: row.verdict,
    checked: row.checked,
    results: row.results.map((result) => presentRow(result, slots)),
    findings: row.findings,
    deviations: row.deviations.map((deviation) => presentDeviation(deviation, deviationScene, actor)),
    decision: presentDecision(row.decision, side),
    clean: row.clean,
    change: changes?.get(row.facts.id) ?? null,
  };
}
