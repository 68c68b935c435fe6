import type { DecisionRule } from '@trammel/shared/requests';
import type { reasonCodes } from '@trammel/shared/dispositions';
import type { Deviation } from '../../database/entities/deviation.entity.ts';
import type { Submission } from '../../database/entities/submission.entity.ts';
import type { CheckInputs } from '../../evidence/check-inputs.ts';
import type { HeadNames } from '../submissions/submission-head.queries.ts';
import type { FoundDisposition } from './reports.queries.ts';
import type { DeviationLine, DispositionFacts, TitleFacts } from './report-scene.ts';
import { decisionRuleWords, dispositionReasonWords, stateWords } from './report-words.ts';

export function presentTitle(submission: Submission, names: HeadNames): TitleFacts {
  return {
    partNumber: submission.partNumber,
    revision: submission.revisionCode,
    description: submission.partName,
    request: `${names.requestNumber}, round ${submission.round}`,
    round: submission.round,
    state: stateWords[submission.state],
    supplier: names.supplierName,
    site: names.siteName,
    customer: names.customerName,
    material: names.material,
    units: names.unitSystem,
    level: names.level,
    due: submission.dueOn,
  };
}

export function presentDecisionRule(names: HeadNames): string {
  return decisionRuleWords(JSON.parse(names.decisionRule) as DecisionRule, names.roundingRule);
}

export function presentDeviationLine(deviation: Deviation, inputs: CheckInputs): DeviationLine {
  const facts = inputs.characteristics.byId.get(deviation.characteristicId);
  const unit = facts === undefined || facts.unit === '1' ? '' : ` ${facts.unit}`;
  const lower = deviation.rangeLower ?? facts?.lowerLimit ?? 'no lower limit';
  const upper = deviation.rangeUpper ?? facts?.upperLimit ?? 'no upper limit';
  const streams = inputs.streams.filter((stream) => deviation.streamIds.includes(stream.id));
  const limits = [
    deviation.quantity === null ? null : `${deviation.quantity} pieces`,
    deviation.untilOn === null ? null : `until ${deviation.untilOn}`,
  ];
  return {
    number: deviation.number,
    balloon: facts?.balloon ?? '',
    range: `${lower} to ${upper}${unit}`,
    limits: limits.filter((limit) => limit !== null).join(', '),
    state: deviation.state === 'sent' ? 'asked for' : deviation.state,
    decided: deviation.decidedByName ?? '',
    cause: deviation.cause,
    containment: deviation.containment,
    streams: deviation.streamIds.length === 0 ? 'all' : streams.map((stream) => stream.name).join(', '),
  };
}

/** What both ends read of the decision; the customer's internal remarks are no part of it. */
export function presentDispositionFacts(found: FoundDisposition, inputs: CheckInputs): DispositionFacts {
  const { disposition, conditions } = found;
  const place = (reason: (typeof disposition.reasons)[number]) => {
    const facts =
      reason.characteristicId === null ? null : inputs.characteristics.byId.get(reason.characteristicId);
    const element = inputs.elements.find(({ id }) => id === reason.elementId);
    return facts ? `balloon ${facts.balloon}: ` : element ? `${element.label}: ` : '';
  };
  return {
    limits: [
      ...(disposition.endOn === null ? [] : [`May be bought until ${disposition.endOn}.`]),
      ...(disposition.pieceLimit === null ? [] : [`At most ${disposition.pieceLimit} pieces.`]),
      ...(disposition.streamsCovered.length === 0
        ? []
        : [`Covers: ${disposition.streamsCovered.join(', ')}.`]),
      ...(disposition.containment === '' ? [] : [`Containment: ${disposition.containment}`]),
      ...(disposition.resubmitBy === null ? [] : [`Resubmission by ${disposition.resubmitBy}.`]),
    ],
    conditions: conditions.map(({ text, owner, dueOn }) => `${text} (${owner}, due ${dueOn})`),
    reasons: disposition.reasons.map(
      (reason) =>
        `${dispositionReasonWords[reason.code as (typeof reasonCodes)[number]]}, ${place(reason)}${reason.text}`,
    ),
    comment: disposition.comment,
  };
}
