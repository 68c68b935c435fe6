import type { CaughtMail, MailPage } from './mailbox.ts';

const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
export const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (sign) => entities[sign] ?? sign);

/** Web addresses become links; everything else stays the text it was. */
export function linkify(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"']+[^\s<>"'.,;:)\]])/)
    .map((piece, index) => {
      const safe = escapeHtml(piece);
      return index % 2 ? `<a href="${safe}" rel="noreferrer">${safe}</a>` : safe;
    })
    .join('');
}

const clock = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'long' });
const time = (at: Date) => `<time datetime="${at.toISOString()}">${escapeHtml(clock.format(at))}</time>`;

function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>${escapeHtml(title)}</title>
<link rel="stylesheet" href="/style.css">
</head>
<body>
<header><a href="/">Caught mail</a><span>Trammel, trial installation</span></header>
<main>
${body}
</main>
</body>
</html>
`;
}

export function listView({ mails, olderThan }: MailPage, to: string): string {
  const rows = mails.map(
    (mail) =>
      `<tr><td>${time(mail.caughtAt)}</td><td>${escapeHtml(mail.to)}</td>` +
      `<td><a href="/mail/${mail.id}">${escapeHtml(mail.subject)}</a></td></tr>`,
  );
  const table = `<table>
<caption>Newest first</caption>
<thead><tr><th scope="col">Caught</th><th scope="col">To</th><th scope="col">Subject</th></tr></thead>
<tbody>
${rows.join('\n')}
</tbody>
</table>`;
  const nothing = to
    ? `<p>No mail to “${escapeHtml(to)}” has been caught. <a href="/">Show all mail</a></p>`
    : '<p>No mail has been caught yet. One appears here when somebody is invited, asked, answered or reminded.</p>';
  const older = olderThan
    ? `<p><a href="/?${escapeHtml(new URLSearchParams({ to, before: olderThan }).toString())}">Older mail</a></p>`
    : '';
  return page(
    'Caught mail',
    `<h1>Caught mail</h1>
<p>Mail of this trial installation ends here and reaches nobody. Reload the page to see new mail.</p>
<form method="get" action="/" role="search">
<label for="to">Recipient</label>
<input id="to" name="to" type="search" value="${escapeHtml(to)}">
<button type="submit">Filter</button>
</form>
${mails.length ? table : nothing}
${older}`,
  );
}

export function mailView(mail: CaughtMail): string {
  const attachments = mail.attachments.map(
    (file) => `<li>${escapeHtml(file.name)} (${file.bytes} bytes)</li>`,
  );
  return page(
    mail.subject,
    `<nav><a href="/">All caught mail</a></nav>
<h1>${escapeHtml(mail.subject)}</h1>
<dl>
<div><dt>From</dt><dd>${escapeHtml(mail.from)}</dd></div>
<div><dt>To</dt><dd>${escapeHtml(mail.to)}</dd></div>
<div><dt>Caught</dt><dd>${time(mail.caughtAt)}</dd></div>
</dl>
<article>${linkify(mail.text)}</article>
${attachments.length ? `<h2>Attachments</h2>\n<ul>${attachments.join('')}</ul>` : ''}
<p><a href="/mail/${mail.id}/source">Source of this mail</a></p>`,
  );
}

export function missingView(): string {
  return page('No such mail', '<h1>No such mail</h1>\n<p><a href="/">All caught mail</a></p>');
}
