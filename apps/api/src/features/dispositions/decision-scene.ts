import type { EntityManager } from 'typeorm';
import { canonicalJson, sha256Hex } from '../../database/canonical-json.ts';
import { CharacteristicDecision } from '../../database/entities/characteristic-decision.entity.ts';
import { Deviation } from '../../database/entities/deviation.entity.ts';
import { ElementDecision } from '../../database/entities/element-decision.entity.ts';
import { SealedPackage } from '../../database/entities/sealed-package.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import { SubmissionElement } from '../../database/entities/submission-element.entity.ts';
import { worstVerdict } from '@trammel/metrology/conformance';
import type { Verdict } from '@trammel/shared/status';
import { characteristicsOf, streamsOf, type Prepare } from '../../evidence/package-context.ts';
import { Conflict } from '../../http/problems.ts';
import { findOfficialCheck } from '../checks/checks.queries.ts';
import type { DecisionState } from './dispositions.rules.ts';

export interface DecisionScene {
  readonly state: DecisionState;
  /** The customer's marks as they stand, with the digest of the package they speak of. */
  readonly content: Record<string, unknown>;
  readonly digest: string;
}

/** Everything a disposition rests on: the sealed package by digest, and every mark and deviation. */
export async function loadDecisionScene(
  manager: EntityManager,
  prepare: Prepare,
  submission: Submission,
): Promise<DecisionScene> {
  const check = await findOfficialCheck(manager, submission);
  const sealed = await manager.findOneBy(SealedPackage, { submissionId: submission.id, stage: 'warrant' });
  if (!check || !sealed)
    throw new Conflict('This round has not been submitted, so there is nothing to decide yet.');
  const streams = streamsOf(prepare, submission.id);
  const blocked = new Set(streams.filter((stream) => stream.blocked).map((stream) => stream.id));
  const verdicts = new Map<string, Verdict[]>();
  for (const row of check.rows) {
    if (blocked.has(row.streamId)) continue;
    verdicts.set(row.characteristicId, [...(verdicts.get(row.characteristicId) ?? []), row.verdict]);
  }
  const decisions = await manager.find(CharacteristicDecision, {
    where: { submissionId: submission.id },
    order: { characteristicId: 'ASC' },
  });
  const marks = new Map(decisions.map((decision) => [decision.characteristicId, decision]));
  const elementDecisions = await manager.find(ElementDecision, {
    where: { submissionId: submission.id },
    order: { elementId: 'ASC' },
  });
  const elementMarks = new Map(elementDecisions.map((decision) => [decision.elementId, decision]));
  const elements = await manager.find(SubmissionElement, {
    where: { submissionId: submission.id },
    order: { sequence: 'ASC' },
  });
  const deviations = await manager.find(Deviation, {
    where: { submissionId: submission.id },
    order: { number: 'ASC' },
  });
  const state: DecisionState = {
    rows: characteristicsOf(prepare, submission.revisionId).list.map((facts) => {
      const judged = (verdicts.get(facts.id) ?? []).filter((verdict) => verdict !== 'no-verdict');
      return {
        id: facts.id,
        balloon: facts.balloon,
        class: facts.class,
        verdict: judged.length === 0 ? 'no-verdict' : worstVerdict(judged),
        mark: marks.get(facts.id)?.mark ?? null,
      };
    }),
    elements: elements.map((element) => ({
      id: element.id,
      label: element.label,
      demand: element.demand,
      mark: elementMarks.get(element.id)?.mark ?? null,
    })),
    deviationsOpen: deviations.filter((deviation) => deviation.state === 'sent').length,
    streamsCovered: streams.filter((stream) => !stream.blocked).map((stream) => stream.name),
    streamsBlocked: streams.filter((stream) => stream.blocked).map((stream) => stream.name),
  };
  const content = {
    package: sealed.digest,
    check: { method: check.method, inputsDigest: check.inputsDigest, verdict: check.verdict },
    marks: decisions.map(({ characteristicId, mark, remark, internalRemark, deviationId, decidedById }) => ({
      characteristicId,
      mark,
      remark,
      internalRemark,
      deviationId,
      decidedById,
    })),
    elements: elementDecisions.map(({ elementId, mark, remark, internalRemark, decidedById }) => ({
      elementId,
      mark,
      remark,
      internalRemark,
      decidedById,
    })),
    deviations: deviations.map(
      ({ id, number, state: decided, decidedById, rangeLower, rangeUpper, quantity, untilOn }) => ({
        id,
        number,
        state: decided,
        decidedById,
        rangeLower,
        rangeUpper,
        quantity,
        untilOn,
      }),
    ),
  };
  return { state, content, digest: sha256Hex(canonicalJson(content)) };
}
