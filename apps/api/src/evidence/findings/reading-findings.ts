import type { Finding } from '@trammel/shared/checks';
import type { CheckInputs } from '../check-inputs.ts';
import { hasVerdict, takesAttribute } from '../characteristic-facts.ts';
import { requiredPieces } from '../package-context.ts';
import type { JudgedRow } from '../row-checks.ts';
import { onPackage, onPiece, onRow, onStream, plural } from './finding.ts';

/** What is missing or looks wrong in the sample itself: R21, R22, R23, R26, R27. */
export function readingFindings(inputs: CheckInputs, rows: readonly JudgedRow[]): Finding[] {
  const open = inputs.streams.filter((stream) => !stream.blocked);
  return [
    ...(inputs.characteristics.list.length === 0 ? [nothingToMeasure()] : []),
    ...streamFindings(inputs, open.length),
    ...shortSamples(inputs),
    ...missingReadings(inputs, rows),
    ...tooFewDecimals(rows),
    ...copiedAcrossStreams(inputs, rows),
    ...sortedReadings(rows),
  ];
}

function nothingToMeasure(): Finding {
  return onPackage({
    rule: 'R04',
    weight: 'stops-submission',
    title: 'The drawing has no characteristics',
    detail: 'Nothing can be measured against this revision.',
    remedy: 'Ask the customer to complete the characteristics.',
  });
}

function streamFindings(inputs: CheckInputs, openStreams: number): Finding[] {
  const found = inputs.streams
    .filter((stream) => stream.blocked)
    .map((stream) =>
      onStream(stream, {
        rule: 'R23',
        weight: 'reviewer-decides',
        title: 'Stream blocked',
        detail: `${stream.name} is declared blocked: ${stream.blockedReason}. Warrant and disposition will not cover it.`,
        remedy: 'The reviewer decides whether the package stands without this stream.',
      }),
    );
  if (openStreams > 0) return found;
  const stop = onPackage({
    rule: 'R23',
    weight: 'stops-submission',
    title: 'Every stream is blocked',
    detail: 'There is no stream left that the warrant could cover.',
    remedy: 'Open at least one stream again and measure its pieces.',
  });
  return [...found, stop];
}

function shortSamples(inputs: CheckInputs): Finding[] {
  const needed = Math.max(
    0,
    ...inputs.characteristics.list.filter(hasVerdict).map((facts) => requiredPieces(facts, inputs.rules)),
  );
  const count = new Map<string, number>();
  for (const piece of inputs.pieces) count.set(piece.streamId, (count.get(piece.streamId) ?? 0) + 1);
  const short = inputs.streams
    .filter((stream) => !stream.blocked && (count.get(stream.id) ?? 0) < needed)
    .map((stream) =>
      onStream(stream, {
        rule: 'R22',
        weight: 'stops-submission',
        title: 'Too few sample pieces',
        detail: `${stream.name} has ${plural(count.get(stream.id) ?? 0, 'piece')}; ${needed} are asked for.`,
        remedy: 'Add the missing pieces and measure them.',
      }),
    );
  const future = inputs.pieces
    .filter((piece) => piece.madeOn !== null && piece.madeOn > inputs.today)
    .map((piece) =>
      onPiece(piece, {
        rule: 'R26',
        weight: 'stops-submission',
        title: 'Made in the future',
        detail: `Piece ${piece.label} is said to be made on ${piece.madeOn ?? ''}, after today.`,
        remedy: 'Correct the date made.',
      }),
    );
  return [...short, ...future];
}

function missingReadings(inputs: CheckInputs, rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  for (const row of rows) {
    const { facts, stream, checked } = row;
    if (stream.blocked) continue;
    if (facts.kind === 'reference' && checked.n === 0) {
      found.push(
        onRow(row, {
          rule: 'R12',
          weight: 'for-information',
          title: 'Reference dimension not reported',
          detail: `Balloon ${facts.balloon}, ${stream.name}: a reference dimension has no verdict and may stay empty.`,
          remedy: 'Enter a value if the customer wants it listed.',
        }),
      );
    }
    if (!hasVerdict(facts) || checked.n >= checked.required) continue;
    const attribute = takesAttribute(facts);
    found.push(
      onRow(row, {
        rule: checked.n === 0 ? 'R21' : 'R22',
        weight: 'stops-submission',
        title: checked.n === 0 ? 'Not measured' : 'Sample too short',
        detail: `Balloon ${facts.balloon} (${facts.description}), ${stream.name}: ${checked.n} of ${checked.required} ${attribute ? 'pieces checked' : 'readings'}.`,
        remedy: attribute
          ? 'Enter pass or fail for each piece, or the numbers checked and failed.'
          : `Measure the missing ${plural(checked.required - checked.n, 'piece')}.`,
      }),
    );
  }
  return found;
}

function tooFewDecimals(rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  for (const row of rows) {
    const { facts, stream } = row;
    const { coarse } = row.habits;
    if (stream.blocked || coarse === null) continue;
    found.push(
      onRow(row, {
        rule: 'R21',
        weight: 'reviewer-decides',
        title: 'Too few decimals',
        detail: `Balloon ${facts.balloon}, ${stream.name}: ${plural(coarse.count, 'reading')} with fewer decimals than the drawing’s ${facts.decimals}, such as ${coarse.first}.`,
        remedy: 'Enter the readings with the digits the gauge shows.',
      }),
    );
  }
  return found;
}

/** The same figures in the same order in two streams: possible, but more often a copied block (R27). */
function copiedAcrossStreams(inputs: CheckInputs, rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  if (inputs.streams.length < 2) return found;
  const seen = new Map<string, JudgedRow>();
  for (const row of rows) {
    if (row.stream.blocked || takesAttribute(row.facts) || row.checked.n < 3) continue;
    if (row.checked.minimum === row.checked.maximum) continue;
    const key = `${row.facts.id}\n${row.stored.readings}`;
    const twin = seen.get(key);
    if (!twin) {
      seen.set(key, row);
      continue;
    }
    found.push(
      onRow(row, {
        rule: 'R27',
        weight: 'reviewer-decides',
        title: 'Same readings in two streams',
        detail: `Balloon ${row.facts.balloon}: ${row.stream.name} and ${twin.stream.name} have the same ${row.checked.n} readings in the same order.${row.stored.note === '' ? '' : ` Note: ${row.stored.note}`}`,
        remedy: 'Check that the block was not pasted twice; where it is right, say why in the row’s note.',
      }),
    );
  }
  return found;
}

/** Readings in rising or falling order tell that they were sorted: order carries the drift (R27). */
function sortedReadings(rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  for (const row of rows) {
    const { order } = row.habits;
    if (row.stream.blocked || order === null) continue;
    found.push(
      onRow(row, {
        rule: 'R27',
        weight: 'reviewer-decides',
        title: 'Readings are in order of size',
        detail: `Balloon ${row.facts.balloon}, ${row.stream.name}: ${row.checked.n} readings ${order} from piece to piece.`,
        remedy:
          'Enter the readings in the order of production; where the process truly drifts, say so in the row’s note.',
      }),
    );
  }
  return found;
}
