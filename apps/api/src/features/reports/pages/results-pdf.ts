import { sizeBalloonOf } from '../../../evidence/characteristic-facts.ts';
import type { Faces } from '../faces/build-faces.ts';
import { reportRows, rowCounts, type ReportReading, type ReportRow } from '../report-rows.ts';
import type { ReportScene } from '../report-scene.ts';
import { classWords, verdictWords } from '../report-words.ts';
import { Flow } from './flow.ts';
import { PageWriter, type TextStyle } from './page-writer.ts';
import { drawSignaturePair } from './signature-pair.ts';
import { drawVerdict, verdictColours } from './verdict-shape.ts';

const name = 'Dimensional results';
const caption: TextStyle = { face: 'text', size: 6.5, colour: 'pencil' };
const words: TextStyle = { face: 'text', size: 8 };
const figures: TextStyle = { face: 'figures', size: 7.5 };
const lineHeight = 9.8;

interface Column {
  readonly title: string;
  readonly width: number;
  readonly style: TextStyle;
  readonly right?: boolean;
  readonly value: (row: ReportRow) => string;
}

const computed = (value: number | null, decimals: number) => (value === null ? '–' : value.toFixed(decimals));

const columns: readonly Column[] = [
  {
    title: 'Balloon',
    width: 38,
    style: { face: 'strong-figures', size: 8 },
    value: ({ facts }) => facts.balloon,
  },
  { title: 'Description', width: 145, style: words, value: ({ facts }) => facts.description },
  {
    title: 'Stream',
    width: 62,
    style: words,
    value: ({ stream }) => (stream.blocked ? `${stream.name} (not covered)` : stream.name),
  },
  {
    title: 'Lower limit',
    width: 58,
    style: figures,
    right: true,
    value: ({ facts }) => facts.lowerLimit ?? '–',
  },
  { title: 'Upper limit', width: 66, style: figures, right: true, value: upperLimit },
  { title: 'Unit', width: 28, style: figures, value: ({ facts }) => (facts.unit === '1' ? '–' : facts.unit) },
  { title: 'Class', width: 52, style: words, value: ({ facts }) => classWords[facts.class] },
  {
    title: 'n',
    width: 45,
    style: figures,
    right: true,
    value: ({ checked }) =>
      checked.n < checked.required ? `${checked.n} of ${checked.required}` : String(checked.n),
  },
  {
    title: 'Minimum',
    width: 54,
    style: figures,
    right: true,
    value: ({ checked }) => checked.minimum ?? '–',
  },
  {
    title: 'Maximum',
    width: 54,
    style: figures,
    right: true,
    value: ({ checked }) => checked.maximum ?? '–',
  },
  {
    title: 'Mean',
    width: 54,
    style: figures,
    right: true,
    value: ({ checked, facts }) => computed(checked.mean, facts.decimals + 1),
  },
  {
    title: 's',
    width: 44,
    style: figures,
    right: true,
    value: ({ checked, facts }) => computed(checked.standardDeviation, facts.decimals + 2),
  },
  { title: 'Verdict', width: 73, style: words, value: ({ checked }) => verdictWords[checked.verdict] },
];
const gap = 6;

/** A limit that a piece's own size widens is not the whole limit. */
function upperLimit({ facts }: ReportRow): string {
  if (facts.upperLimit === null) return '–';
  return sizeBalloonOf(facts) === null ? facts.upperLimit : `${facts.upperLimit} + bonus`;
}

/** Every row of every stream with all its readings: what is out first, then the rest in drawing order. */
export function resultsPdf(scene: ReportScene, faces: Faces): Promise<Uint8Array> {
  const { title } = scene;
  const pages = new PageWriter(faces, { title: `${name} ${title.partNumber}`, layout: 'landscape' });
  const flow = new Flow(pages, name, title, drawHeader);
  const rows = reportRows(scene);
  const out = rows.filter((row) => row.checked.verdict === 'out-of-tolerance');
  const rest = rows.filter((row) => row.checked.verdict !== 'out-of-tolerance');
  const counts = rowCounts(rows);
  flow.paragraph(
    `${rows.length} rows, each one characteristic in one stream; streams are judged on their own. In streams covered: ${counts.inTolerance} in tolerance, ${counts.out} out of tolerance, ${counts.undecided} undecided, ${counts.notMeasured} not measured. ${scene.decisionRule}.`,
    { ...words, colour: 'pencil' },
  );
  if (scene.caution !== null) flow.notice(scene.caution, 'brass');
  if (out.length > 0) section(flow, 'Out of tolerance', out);
  if (rest.length > 0)
    section(flow, out.length > 0 ? 'All other rows, in drawing order' : 'All rows, in drawing order', rest);
  flow.endTable();
  flow.y += 8;
  drawSignaturePair(flow, scene.warrant, scene.disposition);
  return flow.finish(scene.madeAt);
}

function section(flow: Flow, title: string, rows: readonly ReportRow[]): void {
  flow.heading(title, 60);
  drawHeader(flow);
  for (const row of rows) drawRow(flow, row);
}

function drawHeader(flow: Flow): void {
  let x = flow.left;
  const y = flow.y + 9;
  for (const { title, width, right } of columns) {
    if (right === true) flow.pages.textRight(x + width - gap, y, title, caption);
    else flow.pages.text(x, y, title, caption);
    x += width;
  }
  flow.y += 12;
  flow.pages.line(flow.left, flow.y, flow.left + flow.width, flow.y, 'graphite', 0.6);
}

function drawRow(flow: Flow, row: ReportRow): void {
  const { pages } = flow;
  const { verdict } = row.checked;
  const cells = columns.map((column) => {
    const room = column.width - gap - (column.title === 'Verdict' ? 4 : 0);
    return { column, lines: pages.wrap(column.value(row), room, column.style) };
  });
  const height = Math.max(...cells.map(({ lines }) => lines.length)) * lineHeight + 4;
  flow.ensure(height + 14);
  const base = flow.y + 9.5;
  let x = flow.left;
  for (const { column, lines } of cells) {
    const isVerdict = column.title === 'Verdict';
    if (isVerdict) drawVerdict(pages, verdict, x + 2.8, base - 2.7);
    lines.forEach((text, at) => {
      const y = base + at * lineHeight;
      if (isVerdict) pages.text(x + 8, y, text, { ...words, colour: verdictColours[verdict] });
      else if (column.right === true) pages.textRight(x + column.width - gap, y, text, column.style);
      else pages.text(x, y, text, column.style);
    });
    x += column.width;
  }
  flow.y += height;
  if (row.facts.class === 'safety-regulatory') {
    const note =
      'Safety or regulatory: no automatic result approves this characteristic; the caution of this document applies.';
    pages.text(flow.left + 38, flow.y + 7, note, { ...caption, colour: 'brass' });
    flow.y += 9;
  }
  drawReadings(flow, row);
  pages.line(flow.left, flow.y, flow.left + flow.width, flow.y);
}

const indent = 38;
const labelWidth = 96;

/** Readings in the order of the pieces, the pieces of each line named at its head. */
function drawReadings(flow: Flow, { readings, counted }: ReportRow): void {
  const { pages } = flow;
  const step = 9.5;
  if (counted !== null) {
    pages.text(
      flow.left + indent,
      flow.y + 7,
      `${counted.checked} checked, ${counted.failed} failed`,
      figures,
    );
    flow.y += step + 2;
    return;
  }
  if (readings.length === 0) return;
  const longest = Math.max(...readings.map(({ text }) => pages.widthOf(text ?? '–', figures)));
  const room = flow.width - indent - labelWidth;
  const cell = Math.min(Math.max(longest + 16, 30), room);
  const perLine = Math.max(1, Math.floor(room / cell));
  for (let at = 0; at < readings.length; at += perLine) {
    flow.ensure(step);
    const line = readings.slice(at, at + perLine);
    pages.text(flow.left + indent, flow.y + 7, pieceSpan(pages, line), caption);
    line.forEach((reading, column) => {
      const x = flow.left + indent + labelWidth + column * cell;
      drawReading(pages, x + cell - 12, flow.y + 7, reading);
    });
    flow.y += step;
  }
  flow.y += 2;
}

/** Set to the right, so that readings of equal decimals stand with their points in line. */
function drawReading(pages: PageWriter, right: number, y: number, { text, verdict }: ReportReading): void {
  const stands = verdict === 'out-of-tolerance' || verdict === 'undecided';
  const shown = text ?? '–';
  const style: TextStyle = {
    face: stands ? 'strong-figures' : 'figures',
    size: figures.size,
    colour: stands ? verdictColours[verdict] : text === null ? 'pencil' : 'graphite',
  };
  const x = right - pages.widthOf(shown, style);
  if (stands) drawVerdict(pages, verdict, x - 4.5, y - 2.6, 1.9);
  pages.text(x, y, shown, style);
}

function pieceSpan(pages: PageWriter, line: readonly ReportReading[]): string {
  const first = line[0]?.piece ?? '';
  const last = line.at(-1)?.piece ?? '';
  const text = line.length === 1 ? `piece ${first}` : `pieces ${first} to ${last}`;
  return pages.wrap(text, labelWidth - 8, caption)[0] ?? text;
}
