import { composeMail, type MailContent } from './layout.ts';

/** What every mail about a request may say: identity and dates, never a measured value. */
export interface RequestFacts {
  readonly requestNumber: number;
  readonly partNumber: string;
  readonly partName: string;
  readonly revision: string;
  readonly customerName: string;
  readonly supplierName: string;
  readonly siteName: string;
  readonly dueOn: string;
  readonly url: string;
}

const scope = (facts: RequestFacts): [string, string][] => [
  ['Part', `${facts.partNumber} ${facts.partName}`],
  ['Revision', facts.revision],
  ['Due', facts.dueOn],
];

const name = (facts: RequestFacts) => `${facts.partNumber} rev ${facts.revision}`;

export function requestIssuedMail(
  to: string,
  facts: RequestFacts,
  asked: { level: number; reason: string; streams: number; piecesPerStream: number },
): MailContent {
  return composeMail({
    subject: `${facts.customerName} asks for approval of ${name(facts)}`,
    to,
    paragraphs: [
      `${facts.customerName} asks ${facts.supplierName} for a part approval package.`,
      'Read the request, then acknowledge it or ask a question.',
    ],
    facts: [
      ...scope(facts),
      ['Site', facts.siteName],
      ['Reason', asked.reason],
      ['Submission level', String(asked.level)],
      ['Sample pieces', `${asked.piecesPerStream} from each of ${asked.streams}`],
    ],
    link: { label: 'Open the request', url: facts.url },
  });
}

export function requestAcknowledgedMail(to: string, facts: RequestFacts, by: string): MailContent {
  return composeMail({
    subject: `${facts.supplierName} acknowledged ${name(facts)}`,
    to,
    paragraphs: [`${by} of ${facts.supplierName} acknowledged request ${facts.requestNumber}.`],
    facts: scope(facts),
    link: { label: 'Open the request', url: facts.url },
  });
}

export function requestWithdrawnMail(to: string, facts: RequestFacts, reason: string): MailContent {
  return composeMail({
    subject: `${facts.customerName} withdrew the request for ${name(facts)}`,
    to,
    paragraphs: [
      `${facts.customerName} withdrew request ${facts.requestNumber}. Nothing more is owed on it; what was entered stays readable.`,
      `Reason: ${reason}`,
    ],
    facts: scope(facts),
    link: { label: 'Open the request', url: facts.url },
  });
}

const messageWords = {
  question: { subject: 'Question on', deed: 'asks' },
  answer: { subject: 'Answer on', deed: 'answers' },
  note: { subject: 'Note on', deed: 'writes' },
} as const;

const longestQuote = 600;

export function requestMessageMail(
  to: string,
  facts: RequestFacts,
  message: { kind: 'question' | 'answer' | 'note'; text: string; author: string; organisation: string },
): MailContent {
  const words = messageWords[message.kind];
  const quote =
    message.text.length > longestQuote ? `${message.text.slice(0, longestQuote)} …` : message.text;
  return composeMail({
    subject: `${words.subject} ${name(facts)}`,
    to,
    paragraphs: [`${message.author} of ${message.organisation} ${words.deed}:`, quote],
    facts: scope(facts),
    link: { label: 'Open the thread', url: facts.url },
  });
}

/** Counts of what is missing, so that the person knows what the remaining days are for. */
export interface MissingFacts {
  readonly rows: number;
  readonly elements: number;
}

export function dueMail(
  to: string,
  facts: RequestFacts,
  daysLeft: number,
  missing: MissingFacts,
): MailContent {
  const when = daysLeft === 0 ? 'today' : daysLeft === 1 ? 'in 1 day' : `in ${daysLeft} days`;
  return composeMail({
    subject: `${name(facts)} is due ${when}`,
    to,
    paragraphs: [`The package for ${facts.customerName} is due on ${facts.dueOn}, ${when}.`],
    facts: [...scope(facts), ...missingLines(missing)],
    link: { label: 'Open the package', url: facts.url },
  });
}

export function overdueMail(
  to: string,
  facts: RequestFacts,
  daysLate: number,
  missing: MissingFacts,
): MailContent {
  return composeMail({
    subject: `${name(facts)} is overdue`,
    to,
    paragraphs: [
      `The package of ${facts.supplierName} for ${facts.customerName} was due on ${facts.dueOn}, ${daysLate === 1 ? '1 day' : `${daysLate} days`} ago, and has not been submitted.`,
    ],
    facts: [...scope(facts), ...missingLines(missing)],
    link: { label: 'Open the package', url: facts.url },
  });
}

/** For purchasing, who sees status only. */
export function overdueForBuyerMail(to: string, facts: RequestFacts): MailContent {
  return composeMail({
    subject: `${name(facts)} from ${facts.supplierName} is overdue`,
    to,
    paragraphs: [
      `The approval package of ${facts.supplierName} was due on ${facts.dueOn} and has not been submitted. Buying status stays as it is until a decision.`,
    ],
    facts: scope(facts),
    link: { label: 'Open buying status', url: facts.url },
  });
}

export function notAcknowledgedMail(to: string, facts: RequestFacts, days: number): MailContent {
  return composeMail({
    subject: `${name(facts)} waits to be acknowledged`,
    to,
    paragraphs: [
      `${facts.customerName} sent request ${facts.requestNumber} ${days} days ago. Acknowledge it, or ask what is unclear.`,
    ],
    facts: scope(facts),
    link: { label: 'Open the request', url: facts.url },
  });
}

function missingLines(missing: MissingFacts): [string, string][] {
  return [
    ['Rows not measured', String(missing.rows)],
    ['Elements open', String(missing.elements)],
  ];
}
