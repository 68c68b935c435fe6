import type { DispositionDraftResponse, Outcome, signDispositionRequest } from '@trammel/shared/dispositions';
import type { z } from 'zod';
import type { FieldError } from '../../http/problems.ts';
import type { Verdict } from '@trammel/shared/status';

export type Asked = Omit<z.output<typeof signDispositionRequest>, 'password' | 'digest'>;

export interface DecidedRow {
  readonly id: string;
  readonly balloon: string;
  readonly class: string;
  readonly verdict: Verdict;
  readonly mark: 'accepted' | 'refused' | 'questioned' | null;
}

export interface DecidedElement {
  readonly id: string;
  readonly label: string;
  readonly demand: string;
  readonly mark: 'accepted' | 'refused' | 'questioned' | null;
}

export interface DecisionState {
  readonly rows: readonly DecidedRow[];
  readonly elements: readonly DecidedElement[];
  readonly deviationsOpen: number;
  readonly streamsCovered: readonly string[];
  readonly streamsBlocked: readonly string[];
}

const list = (names: readonly string[]) =>
  names.length > 6 ? `${names.slice(0, 6).join(', ')} and ${names.length - 6} more` : names.join(', ');

/** What stands in the way of each outcome, from what has been marked so far (R46, R47). */
export function outcomeBlockers(state: DecisionState): DispositionDraftResponse['blockers'] {
  const balloons = (test: (row: DecidedRow) => boolean) => state.rows.filter(test).map((row) => row.balloon);
  const elements = (test: (element: DecidedElement) => boolean) =>
    state.elements.filter(test).map((element) => element.label);
  const unmarked = balloons((row) => row.mark === null);
  const refused = balloons((row) => row.mark === 'refused');
  const questioned = balloons((row) => row.mark === 'questioned');
  const openElements = elements((element) => element.demand !== 'not-required' && element.mark === null);
  const refusedElements = elements((element) => element.mark === 'refused' || element.mark === 'questioned');
  const safety = balloons((row) => row.class === 'safety-regulatory' && row.mark !== 'accepted');
  const approved: string[] = [];
  if (unmarked.length > 0) approved.push(`Not marked yet: balloon ${list(unmarked)}.`);
  if (refused.length > 0) approved.push(`Refused: balloon ${list(refused)}.`);
  if (questioned.length > 0) approved.push(`Questioned: balloon ${list(questioned)}.`);
  if (openElements.length > 0) approved.push(`Elements not marked yet: ${list(openElements)}.`);
  if (refusedElements.length > 0) approved.push(`Elements refused or questioned: ${list(refusedElements)}.`);
  if (state.deviationsOpen > 0)
    approved.push(
      `${state.deviationsOpen} deviation ${state.deviationsOpen === 1 ? 'request is' : 'requests are'} not decided.`,
    );
  if (state.streamsBlocked.length > 0)
    approved.push(
      `Blocked: ${list(state.streamsBlocked)}. Full approval covers every stream; an interim approval can leave one out.`,
    );
  const interim: string[] = [];
  if (unmarked.length > 0) interim.push(`Not marked yet: balloon ${list(unmarked)}.`);
  if (safety.length > 0)
    interim.push(
      `Safety or regulatory characteristics must be accepted one by one: balloon ${list(safety)}.`,
    );
  if (state.deviationsOpen > 0)
    interim.push(
      `${state.deviationsOpen} deviation ${state.deviationsOpen === 1 ? 'request is' : 'requests are'} not decided.`,
    );
  return { approved, 'interim-approval': interim, rejected: [], 'sent-back': [] };
}

/** Faults of the facts themselves: what an outcome must say (R44, R48). */
export function factFaults(asked: Asked, state: DecisionState, today: string): FieldError[] {
  const faults: FieldError[] = [];
  const say = (pointer: string, detail: string) => faults.push({ pointer, detail });
  const rowIds = new Set(state.rows.map((row) => row.id));
  const elementIds = new Set(state.elements.map((element) => element.id));
  asked.reasons.forEach((reason, index) => {
    if (reason.characteristicId !== null && !rowIds.has(reason.characteristicId))
      say(`/reasons/${index}/characteristicId`, 'There is no such characteristic in this package.');
    if (reason.elementId !== null && !elementIds.has(reason.elementId))
      say(`/reasons/${index}/elementId`, 'There is no such element in this package.');
  });
  if (
    asked.outcome === 'rejected' &&
    !asked.reasons.some((reason) => reason.characteristicId !== null || reason.elementId !== null)
  ) {
    say('/reasons', 'A rejection names at least one reason tied to a characteristic or an element.');
  }
  if (asked.outcome === 'sent-back' && asked.reasons.length === 0 && asked.comment === '') {
    say('/comment', 'Say what is missing, so that the supplier can complete it.');
  }
  if (asked.outcome === 'interim-approval') faults.push(...interimFaults(asked, today));
  if (asked.outcome !== 'interim-approval') {
    if (asked.endOn !== null) say('/endOn', 'An end date belongs to an interim approval only.');
    if (asked.pieceLimit !== null)
      say('/pieceLimit', 'A number of pieces belongs to an interim approval only.');
    if (asked.conditions.length > 0) say('/conditions', 'Conditions belong to an interim approval only.');
  }
  return faults;
}

function interimFaults(asked: Asked, today: string): FieldError[] {
  const faults: FieldError[] = [];
  const say = (pointer: string, detail: string) => faults.push({ pointer, detail });
  if (asked.endOn === null && asked.pieceLimit === null)
    say('/endOn', 'Give an end date, a number of pieces, or both.');
  if (asked.endOn !== null && asked.endOn <= today) say('/endOn', 'The end date must lie after today.');
  if (asked.conditions.length === 0)
    say('/conditions', 'An interim approval has at least one condition with owner and due date.');
  if (asked.containment === '')
    say(
      '/containment',
      'Say how the parts are kept safe until the conditions are met, such as a 100 % check.',
    );
  asked.conditions.forEach((condition, index) => {
    if (condition.dueOn < today) say(`/conditions/${index}/dueOn`, 'The due date lies in the past.');
    if (asked.endOn !== null && condition.dueOn > asked.endOn)
      say(`/conditions/${index}/dueOn`, `The condition must be due by the end date ${asked.endOn}.`);
  });
  if (asked.resubmitBy !== null && asked.endOn !== null && asked.resubmitBy >= asked.endOn) {
    say('/resubmitBy', 'The resubmission must come before the interim approval ends.');
  }
  return faults;
}

/** What the signature says, in words, for each outcome. */
export function statements(
  part: string,
  streams: readonly string[],
  safety: boolean,
): DispositionDraftResponse['statement'] {
  const covered = streams.length === 0 ? '' : ` It covers ${streams.join(', ')}.`;
  const caution = safety
    ? ' Acceptance of safety or regulatory characteristics records my decision as an authorised person; it does not replace the design authority, the law or the customer’s own requirements.'
    : '';
  return {
    approved: `I have reviewed the evidence and approve ${part} for production.${covered}${caution}`,
    'interim-approval': `I have reviewed the evidence and allow ${part} within the limits and under the conditions stated.${covered}${caution}`,
    rejected: `I have reviewed the evidence and reject ${part} for the reasons stated.`,
    'sent-back': `The package for ${part} is incomplete and is sent back without a judgement on the parts.`,
  };
}

export function countMarks(state: DecisionState): DispositionDraftResponse['counts'] {
  const marked = (mark: DecidedRow['mark']) => state.rows.filter((row) => row.mark === mark).length;
  return {
    rows: state.rows.length,
    accepted: marked('accepted'),
    refused: marked('refused'),
    questioned: marked('questioned'),
    unmarked: marked(null),
    safety: state.rows.filter((row) => row.class === 'safety-regulatory').length,
  };
}

export function outcomeBlocked(
  blockers: DispositionDraftResponse['blockers'],
  outcome: Outcome,
): string | null {
  const reasons = blockers[outcome];
  return reasons.length === 0 ? null : reasons.join(' ');
}
