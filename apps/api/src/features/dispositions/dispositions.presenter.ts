import { In, type EntityManager } from 'typeorm';
import type { DispositionResponse } from '@trammel/shared/dispositions';
import { Characteristic } from '../../database/entities/characteristic.entity.ts';
import type { Disposition } from '../../database/entities/disposition.entity.ts';
import { InterimCondition } from '../../database/entities/interim-condition.entity.ts';
import { Signature } from '../../database/entities/signature.entity.ts';
import { SubmissionElement } from '../../database/entities/submission-element.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { presentSignature } from '../../evidence/signature-presenter.ts';

export async function presentDisposition(
  manager: EntityManager,
  submission: Pick<Submission, 'id'>,
  disposition: Disposition,
  today: string,
): Promise<DispositionResponse> {
  const ids = <Key extends 'characteristicId' | 'elementId'>(key: Key) =>
    disposition.reasons.map((reason) => reason[key]).filter((value): value is string => value !== null);
  const characteristics = await manager.findBy(Characteristic, { id: In(ids('characteristicId')) });
  const elements = await manager.findBy(SubmissionElement, { id: In(ids('elementId')) });
  const conditions = await manager.find(InterimCondition, {
    where: { dispositionId: disposition.id },
    order: { dueOn: 'ASC', id: 'ASC' },
  });
  const signature = await manager.findOneByOrFail(Signature, {
    submissionId: submission.id,
    stage: 'disposition',
  });
  return {
    id: disposition.id,
    submissionId: submission.id,
    outcome: disposition.outcome,
    reasons: disposition.reasons.map((reason) => ({
      code: reason.code as DispositionResponse['reasons'][number]['code'],
      characteristicId: reason.characteristicId,
      balloon: characteristics.find((facts) => facts.id === reason.characteristicId)?.balloon ?? null,
      elementId: reason.elementId,
      element: elements.find((element) => element.id === reason.elementId)?.label ?? null,
      text: reason.text,
    })),
    conditions: conditions.map((condition) => ({
      id: condition.id,
      text: condition.text,
      owner: condition.owner,
      dueOn: condition.dueOn,
      state: condition.state,
      overdue: condition.state !== 'verified' && condition.dueOn < today,
      evidence: condition.evidence,
      closedBy: condition.closedByName,
      closedAt: condition.closedAt,
      version: condition.version,
    })),
    endOn: disposition.endOn,
    pieceLimit: disposition.pieceLimit,
    containment: disposition.containment,
    resubmitBy: disposition.resubmitBy,
    comment: disposition.comment,
    streamsCovered: disposition.streamsCovered,
    signature: presentSignature(signature),
  };
}
