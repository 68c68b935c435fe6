import { composeMail, type MailContent } from './layout.ts';
import type { RequestFacts } from './requests.ts';

const scope = (facts: RequestFacts): [string, string][] => [
  ['Part', `${facts.partNumber} ${facts.partName}`],
  ['Revision', facts.revision],
  ['Supplier', facts.supplierName],
];

const name = (facts: RequestFacts) => `${facts.partNumber} rev ${facts.revision}`;

export function packageSubmittedMail(to: string, facts: RequestFacts, round: number): MailContent {
  return composeMail({
    subject: `${name(facts)} from ${facts.supplierName} waits for review`,
    to,
    paragraphs: [
      `${facts.supplierName} signed the warrant and submitted the package${round > 1 ? `, round ${round}` : ''}.`,
    ],
    facts: scope(facts),
    link: { label: 'Open the review', url: facts.url },
  });
}

export function packageReceiptMail(
  to: string,
  facts: RequestFacts,
  signed: { round: number; digest: string; at: string },
): MailContent {
  return composeMail({
    subject: `Receipt: ${name(facts)} submitted`,
    to,
    paragraphs: [
      'You signed the warrant and submitted the package. It is frozen from now on; the customer has been told.',
    ],
    facts: [
      ...scope(facts),
      ['Round', String(signed.round)],
      ['Signed at', signed.at],
      ['Digest', signed.digest],
    ],
    link: { label: 'Open the package', url: facts.url.replace(/\/review$/, '') },
  });
}

export interface DecisionFacts {
  readonly outcome: 'approved' | 'interim-approval' | 'rejected' | 'sent-back';
  readonly endOn: string | null;
  readonly pieceLimit: number | null;
  readonly decidedBy: string;
}

const outcomeWords = {
  approved: 'approved',
  'interim-approval': 'interim approval',
  rejected: 'rejected',
  'sent-back': 'sent back as incomplete',
} as const;

export function packageDecidedMail(to: string, facts: RequestFacts, decision: DecisionFacts): MailContent {
  const next = {
    approved: 'The part may be delivered against orders for this revision.',
    'interim-approval': 'Deliveries are allowed within the limits below; the conditions are in the portal.',
    rejected: 'The reasons are in the portal, row by row. A new round can be started there.',
    'sent-back':
      'What is missing is listed in the portal. Complete it and submit again; this is not a judgement on the parts.',
  }[decision.outcome];
  return composeMail({
    subject: `${name(facts)}: ${outcomeWords[decision.outcome]}`,
    to,
    paragraphs: [
      `${decision.decidedBy} of ${facts.customerName} signed the disposition: ${outcomeWords[decision.outcome]}.`,
      next,
    ],
    facts: [
      ...scope(facts),
      ...(decision.endOn ? [['Until', decision.endOn] as [string, string]] : []),
      ...(decision.pieceLimit ? [['Pieces', String(decision.pieceLimit)] as [string, string]] : []),
    ],
    link: { label: 'Open the package', url: facts.url },
  });
}

/** For purchasing: status only. */
export function buyingChangedMail(to: string, facts: RequestFacts, decision: DecisionFacts): MailContent {
  const verdict = {
    approved: 'may buy',
    'interim-approval': 'may buy within limits',
    rejected: 'hold',
    'sent-back': 'hold',
  }[decision.outcome];
  return composeMail({
    subject: `${name(facts)} from ${facts.supplierName}: ${verdict}`,
    to,
    paragraphs: [
      `The buying status of this part from ${facts.supplierName} was set by a signed disposition.`,
    ],
    facts: [
      ...scope(facts),
      ...(decision.endOn ? [['Until', decision.endOn] as [string, string]] : []),
      ...(decision.pieceLimit ? [['Pieces', String(decision.pieceLimit)] as [string, string]] : []),
    ],
    link: { label: 'Open buying status', url: facts.url },
  });
}

export function interimEndingMail(
  to: string,
  facts: RequestFacts,
  daysLeft: number,
  endOn: string,
): MailContent {
  const days = daysLeft === 1 ? '1 day' : `${daysLeft} days`;
  return composeMail({
    subject: `${name(facts)}: interim approval ends in ${days}`,
    to,
    paragraphs: [
      `The interim approval of this part from ${facts.supplierName} ends on ${endOn}. Without a new decision it turns to hold by itself.`,
    ],
    facts: [...scope(facts), ['Until', endOn]],
    link: { label: 'See what is open', url: facts.url },
  });
}

export function interimStoppedMail(to: string, facts: RequestFacts, cause: 'date' | 'pieces'): MailContent {
  return composeMail({
    subject: `${name(facts)} from ${facts.supplierName}: hold`,
    to,
    paragraphs: [
      cause === 'date'
        ? 'The interim approval has run out. No further pieces may be bought or delivered until a new decision.'
        : 'The pieces of the interim approval are used up. No further pieces may be bought or delivered until a new decision.',
    ],
    facts: scope(facts),
    link: { label: 'See what is open', url: facts.url },
  });
}
