/** @param {string} text */
export const escape = (text) =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');

/** Docstring to paragraphs: blank lines part them, `code` is set as code. @param {string} text */
export function prose(text) {
  return text
    .split(/\n\s*\n/)
    .map((paragraph) => paragraph.replace(/^@\w+.*$/gm, '').trim())
    .filter(Boolean)
    .map((paragraph) => `<p>${escape(paragraph).replace(/`([^`]+)`/g, '<code>$1</code>')}</p>`)
    .join('\n');
}

const TITLES = {
  result: 'Results and refusals',
  conformance: 'Conformance: limits, decision rules, verdicts',
  decimal: 'Exact decimals',
  units: 'Units',
  statistics: 'Statistics',
  'control-charts': 'Control charts and run rules',
  capability: 'Capability',
  'measurement-systems': 'Gauge studies',
  'process-scan': 'Scan of a whole package',
  'tolerance-notation': 'Tolerances as people write them',
  sampling: 'Acceptance sampling',
  distributions: 'Distributions',
};

const KINDS = ['function', 'class', 'constant', 'interface', 'type'];
const titleOf = (room) => TITLES[room] ?? room;

function navigation(rooms, current) {
  const items = rooms.map(({ room }) => {
    const here = room === current ? ' aria-current="page"' : '';
    return `<li><a href="${room}.html"${here}>${escape(titleOf(room))}</a></li>`;
  });
  const start = current === 'index' ? ' aria-current="page"' : '';
  return `<nav aria-label="Rooms"><a class="mark" href="index.html"${start}>
<svg viewBox="0 0 64 16" width="64" height="16" aria-hidden="true"><path d="M2 8h60M10 8v7M54 8v7" fill="none" stroke="currentColor" stroke-width="1.5"/><circle cx="30" cy="8" r="3" fill="currentColor"/></svg>
Metrology reference</a><ul>${items.join('')}</ul></nav>`;
}

/** @param {string} title @param {string} body */
export function page(title, rooms, current, body) {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escape(title)} · Trammel metrology</title>
<link rel="stylesheet" href="reference.css">
</head>
<body>
${navigation(rooms, current)}
<main>
${body}
</main>
</body>
</html>
`;
}

function article({ name, kind, summary, signature, file }) {
  return `<article id="${escape(name)}">
<h3><a href="#${escape(name)}">${escape(name)}</a> <small>${kind}</small></h3>
${prose(summary)}
<pre><code>${escape(signature)}</code></pre>
<p class="source">${escape(file)}</p>
</article>`;
}

/** One room: its names as an index, then every function, constant and type with its docstring. */
export function roomPage(rooms, { room, path, entries }) {
  const sorted = [...entries].sort(
    (a, b) => KINDS.indexOf(a.kind) - KINDS.indexOf(b.kind) || a.name.localeCompare(b.name),
  );
  const groups = KINDS.map((kind) => sorted.filter((entry) => entry.kind === kind)).filter(
    (group) => group.length > 0,
  );
  const index = groups
    .map((group) => {
      const cells = group.map(({ name }) => `<a href="#${escape(name)}">${escape(name)}</a>`).join(' ');
      return `<tr><th scope="row">${group[0].kind}</th><td>${cells}</td></tr>`;
    })
    .join('\n');
  return page(
    titleOf(room),
    rooms,
    room,
    `<h1>${escape(titleOf(room))}</h1>
<p class="path"><code>import { … } from '${escape(path)}'</code></p>
<table class="names">${index}</table>
${sorted.map(article).join('\n')}`,
  );
}

/** The first page: the rooms with the number of their names and a way to find one. */
export function firstPage(rooms) {
  const rows = rooms.map(
    ({ room, path, entries }) =>
      `<tr><td><a href="${room}.html">${escape(titleOf(room))}</a></td><td><code>${escape(path)}</code></td>` +
      `<td class="number">${entries.filter(({ kind }) => kind === 'function').length}</td>` +
      `<td class="number">${entries.length}</td></tr>`,
  );
  const all = rooms
    .flatMap(({ room, entries }) => entries.map(({ name, kind }) => ({ room, name, kind })))
    .filter(({ kind }) => kind === 'function')
    .sort((a, b) => a.name.localeCompare(b.name))
    .map(({ room, name }) => `<a href="${room}.html#${escape(name)}">${escape(name)}</a>`);
  return page(
    'Reference',
    rooms,
    'index',
    `<h1>Metrology reference</h1>
<p>Limits, verdicts, control charts, capability, gauge studies and sampling. Every function returns a result or an
<code>Undetermined</code> with a code and a reason; readings and limits are decimal text and are compared exactly.</p>
<table><thead><tr><th>Room</th><th>Import</th><th class="number">Functions</th><th class="number">Names</th></tr></thead>
<tbody>${rows.join('\n')}</tbody></table>
<h2>All functions</h2>
<p class="all">${all.join(' ')}</p>`,
  );
}
