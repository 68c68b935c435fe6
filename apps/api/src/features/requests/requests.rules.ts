import type { saveRequestRequest } from '@trammel/shared/requests';
import type { z } from 'zod';
import type { PackageState, RequestState } from '@trammel/shared/status';
import type { FieldError } from '../../http/problems.ts';
import { openForResubmission, type Side } from '../submissions/submissions.queries.ts';

type Saved = z.infer<typeof saveRequestRequest>;

export interface LastRound {
  readonly state: PackageState;
  readonly isOpen: boolean;
}

/** Rounds the customer may still call off: none that was approved, not even for a time. */
const withdrawable: readonly PackageState[] = [
  'requested',
  'in-preparation',
  'submitted',
  'in-review',
  'sent-back',
  'rejected',
];

export function mayWithdraw(state: RequestState, last: LastRound | null): boolean {
  return state === 'draft' || (state === 'issued' && last !== null && withdrawable.includes(last.state));
}

export function mayResubmit(state: RequestState, last: LastRound | null): boolean {
  return state === 'issued' && last !== null && last.isOpen && openForResubmission.includes(last.state);
}

export interface RequestAbilities {
  readonly edit: boolean;
  readonly issue: boolean;
  readonly withdraw: boolean;
  readonly acknowledge: boolean;
  readonly write: boolean;
  readonly resubmit: boolean;
}

export function requestAbilities(side: Side, state: RequestState, last: LastRound | null): RequestAbilities {
  const customer = side === 'customer';
  return {
    edit: customer && state === 'draft',
    issue: customer && state === 'draft',
    withdraw: customer && mayWithdraw(state, last),
    acknowledge: !customer && state === 'issued' && last?.state === 'requested',
    write: state === 'issued',
    resubmit: !customer && mayResubmit(state, last),
  };
}

/** Faults that the message alone shows; what it names is looked up elsewhere. */
export function faultsOfRequest(body: Saved): FieldError[] {
  const faults: FieldError[] = [];
  const twice = (values: readonly string[], pointer: (index: number) => string, detail: string) => {
    const seen = new Set<string>();
    values.forEach((value, index) => {
      const key = value.toLowerCase();
      if (seen.has(key)) faults.push({ pointer: pointer(index), detail });
      seen.add(key);
    });
  };
  twice(body.streams, (index) => `/streams/${index}`, 'A stream of this name is already listed.');
  twice(
    body.elements.map((element) => element.code),
    (index) => `/elements/${index}/code`,
    'This element is already listed.',
  );
  twice(body.reviewerIds, (index) => `/reviewerIds/${index}`, 'This reviewer is already named.');
  if (body.reason === 'other' && body.reasonNote === '') {
    faults.push({ pointer: '/reasonNote', detail: 'Say what the reason is.' });
  }
  if (body.decisionRule.kind === 'guard-band') {
    const percent = Number(body.decisionRule.uncertaintyPercentOfTolerance.replace('−', '-'));
    if (!(percent > 0 && percent < 50)) {
      faults.push({
        pointer: '/decisionRule/uncertaintyPercentOfTolerance',
        detail: 'The expanded uncertainty must be more than 0 and less than 50 % of the tolerance.',
      });
    }
  }
  return faults;
}

export interface IssueFacts {
  readonly revisionCode: string;
  readonly revisionState: 'draft' | 'released' | 'superseded';
  readonly dueOn: string;
  readonly today: string;
  /** Number of the request whose package is in work for the same revision, supplier and site. */
  readonly inWorkNumber: number | null;
}

/** Why a draft cannot be issued yet; empty when it can. */
export function issueBlockers(facts: IssueFacts): string[] {
  const blockers: string[] = [];
  if (facts.revisionState === 'draft') blockers.push(`Release revision ${facts.revisionCode} first.`);
  if (facts.revisionState === 'superseded') {
    blockers.push(`Revision ${facts.revisionCode} is superseded; choose the released one.`);
  }
  if (facts.dueOn < facts.today) blockers.push(`The due date ${facts.dueOn} lies in the past.`);
  if (facts.inWorkNumber !== null) {
    blockers.push(
      `Request ${facts.inWorkNumber} for this revision, supplier and site is still in work; withdraw it or wait for its decision.`,
    );
  }
  return blockers;
}

export interface MessageFacts {
  readonly side: Side;
  readonly kind: 'question' | 'answer' | 'note';
  readonly questionOpen: boolean;
  /** Who asked the last question. */
  readonly askedBy: Side | null;
}

/** Whether a question is open after this message, or why it cannot be written. */
export function afterMessage(facts: MessageFacts): { questionOpen: boolean } | { refused: string } {
  if (facts.kind === 'question') return { questionOpen: true };
  if (facts.kind === 'note') return { questionOpen: facts.questionOpen };
  if (!facts.questionOpen) return { refused: 'There is no open question. Write a note instead.' };
  if (facts.askedBy === facts.side) {
    return { refused: 'The open question is your own; the other side answers it. Write a note instead.' };
  }
  return { questionOpen: false };
}
