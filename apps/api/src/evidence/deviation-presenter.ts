import type { DeviationResponse } from '@trammel/shared/deviations';
import { openForReview, openForSupplier } from '@trammel/shared/status';
import type { Deviation } from '../database/entities/deviation.entity.ts';
import type { Submission } from '../database/entities/submission.entity.ts';
import type { CharacteristicFacts } from './characteristic-facts.ts';
import { deviationCovers, outReadings } from './deviation-cover.ts';
import type { Characteristics } from './package-context.ts';
import { decodeReadings } from './readings-text.ts';
import type { StoredRow } from './stored-row.ts';
import type { Actor } from '../http/actor.ts';

export interface DeviationScene {
  readonly submission: Submission;
  readonly side: 'customer' | 'supplier';
  readonly characteristics: Characteristics;
  readonly rows: readonly StoredRow[];
}

export function presentDeviation(
  deviation: Deviation,
  scene: DeviationScene,
  actor: Actor,
): DeviationResponse {
  const facts = scene.characteristics.byId.get(deviation.characteristicId);
  const { submission, side } = scene;
  const mine =
    side === 'supplier' &&
    openForSupplier.includes(submission.state) &&
    actor.permissions.has('deviation:ask');
  const pending = deviation.state === 'draft' || deviation.state === 'sent';
  const decidable = openForReview.includes(submission.state) || submission.state === 'in-preparation';
  return {
    id: deviation.id,
    number: deviation.number,
    submissionId: deviation.submissionId,
    characteristicId: deviation.characteristicId,
    balloon: facts?.balloon ?? '',
    description: facts?.description ?? '',
    unit: facts?.unit ?? '',
    lowerLimit: facts?.lowerLimit ?? null,
    upperLimit: facts?.upperLimit ?? null,
    streamIds: deviation.streamIds,
    rangeLower: deviation.rangeLower,
    rangeUpper: deviation.rangeUpper,
    cause: deviation.cause,
    risk: deviation.risk,
    containment: deviation.containment,
    correctiveAction: deviation.correctiveAction,
    quantity: deviation.quantity,
    untilOn: deviation.untilOn,
    state: deviation.state,
    coversReadings: facts !== undefined && coversRow(deviation, facts, scene.rows),
    askedBy: deviation.askedByName,
    askedAt: deviation.askedAt,
    decidedBy: deviation.decidedByName,
    decidedAt: deviation.decidedAt,
    decisionNote: deviation.decisionNote,
    abilities: {
      edit: mine && pending,
      withdraw: mine && pending,
      decide:
        side === 'customer' &&
        actor.permissions.has('deviation:decide') &&
        deviation.state === 'sent' &&
        decidable,
    },
    version: deviation.version,
  };
}

function coversRow(deviation: Deviation, facts: CharacteristicFacts, rows: readonly StoredRow[]): boolean {
  return rows
    .filter((row) => row.characteristicId === facts.id)
    .filter((row) => deviation.streamIds.length === 0 || deviation.streamIds.includes(row.streamId))
    .every((row) =>
      deviationCovers(
        deviation,
        facts,
        outReadings({ facts, texts: decodeReadings(row.readings), marks: row.marks }),
      ),
    );
}
