export interface MailContent {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface MailParts {
  readonly subject: string;
  /** Name of the person written to. */
  readonly to: string;
  /** Sentences of the message, a paragraph each. No measured value, no drawing data, no other organisation's name. */
  readonly paragraphs: readonly string[];
  /** Facts under the message, such as part and due date. */
  readonly facts?: readonly (readonly [label: string, value: string])[];
  readonly link?: { readonly label: string; readonly url: string };
}

/** Every mail of the product: short, plain, one link that leads to the state as it is, never to an action. */
export function composeMail(parts: MailParts): MailContent {
  const facts = parts.facts ?? [];
  const text = [
    `${oneLine(parts.to)},`,
    ...parts.paragraphs,
    facts.map(([label, value]) => `${label}: ${value}`).join('\n'),
    parts.link ? `${parts.link.label}:\n${parts.link.url}` : '',
    'Sent by Trammel. Times are UTC. Answers to this address are not read.',
  ]
    .filter((block) => block !== '')
    .join('\n\n');
  const html = [
    '<!doctype html><html lang="en"><body>',
    `<p>${escape(oneLine(parts.to))},</p>`,
    ...parts.paragraphs.map((paragraph) => `<p>${escape(paragraph)}</p>`),
    facts.length > 0
      ? `<table>${facts.map(([label, value]) => `<tr><th align="left">${escape(label)}</th><td>${escape(value)}</td></tr>`).join('')}</table>`
      : '',
    parts.link ? `<p><a href="${escape(parts.link.url)}">${escape(parts.link.label)}</a></p>` : '',
    '<p>Sent by Trammel. Times are UTC. Answers to this address are not read.</p>',
    '</body></html>',
  ].join('');
  return { subject: oneLine(parts.subject).slice(0, 200), text, html };
}

/** A line break in a name must never become a header. */
function oneLine(text: string): string {
  return text.replace(/\p{Cc}+/gu, ' ').trim();
}

function escape(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');
}
