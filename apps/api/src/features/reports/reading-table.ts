import { writeCsv } from '../../tables/export-text.ts';
import type { ReportRow } from './report-rows.ts';
import { verdictWords } from './report-words.ts';

export const readingHeader = [
  'Balloon',
  'Description',
  'Stream',
  'Piece',
  'Reading',
  'Unit',
  'Lower limit',
  'Upper limit',
  'Verdict',
] as const;

/** One line a reading; what was counted, or owed and not measured, keeps a line of its own. */
export function readingLines({ facts, stream, checked, readings, counted }: ReportRow): string[][] {
  const line = (piece: string, reading: string, verdict: string) => [
    facts.balloon,
    facts.description,
    stream.name,
    piece,
    reading,
    facts.unit === '1' ? '' : facts.unit,
    facts.lowerLimit ?? '',
    facts.upperLimit ?? '',
    verdict,
  ];
  const lines = readings.map((one) => line(one.piece, one.text ?? '', verdictWords[one.verdict]));
  if (counted !== null) {
    lines.push(
      line('', `${counted.checked} checked, ${counted.failed} failed`, verdictWords[checked.verdict]),
    );
  }
  return lines;
}

/** Row by row, so that no second copy of a large package stands in memory as cells. */
export function readingsCsv(rows: readonly ReportRow[]): Uint8Array {
  const text = [writeCsv([[...readingHeader]])];
  for (const row of rows) {
    const lines = readingLines(row);
    if (lines.length > 0) text.push(writeCsv(lines).slice(1));
  }
  return new Uint8Array(Buffer.from(text.join(''), 'utf8'));
}
