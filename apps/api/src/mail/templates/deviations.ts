import { composeMail, type MailContent } from './layout.ts';
import type { RequestFacts } from './requests.ts';

const scope = (facts: RequestFacts): [string, string][] => [
  ['Part', `${facts.partNumber} ${facts.partName}`],
  ['Revision', facts.revision],
];

export function deviationAskedMail(
  to: string,
  facts: RequestFacts,
  number: number,
  balloon: string,
): MailContent {
  return composeMail({
    subject: `Deviation asked for on ${facts.partNumber} rev ${facts.revision}`,
    to,
    paragraphs: [
      `${facts.supplierName} asks for a deviation on balloon ${balloon}. Range, cause and containment are in the portal.`,
      'It needs a decision before the row can be accepted.',
    ],
    facts: [...scope(facts), ['Deviation', String(number)]],
    link: { label: 'Open the deviation requests', url: facts.url },
  });
}

export function deviationDecidedMail(
  to: string,
  facts: RequestFacts,
  number: number,
  decision: 'granted' | 'refused',
): MailContent {
  return composeMail({
    subject: `Deviation ${number} on ${facts.partNumber} rev ${facts.revision} ${decision}`,
    to,
    paragraphs: [
      `${facts.customerName} has ${decision} deviation request ${number}. The reason is in the portal.`,
    ],
    facts: scope(facts),
    link: { label: 'Open the deviation requests', url: facts.url },
  });
}
