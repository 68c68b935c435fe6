import Papa from 'papaparse';
import { delimiters, statedDelimiter, type Delimiter } from './read-delimited.ts';
import { cellText, type Table } from './table.ts';

/** The delimiter whose first rows agree best in their number of columns; a stated one wins. */
export function suggestDelimiter(text: string): Delimiter {
  const stated = statedDelimiter(text);
  if (stated) return stated;
  const head = text.slice(0, 60_000);
  let best: { sign: Delimiter; score: number } = { sign: ',', score: 0 };
  for (const sign of delimiters) {
    const rows = Papa.parse<string[]>(head, { delimiter: sign, preview: 40 }).data.filter((row) =>
      row.some((cell) => cell !== ''),
    );
    const counts = new Map<number, number>();
    for (const row of rows) counts.set(row.length, (counts.get(row.length) ?? 0) + 1);
    const [width = 1, often = 0] = [...counts].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0] ?? [];
    // Columns count less than agreement: a decimal comma makes many ragged columns of a ';' file.
    const score = width < 2 ? 0 : (often / rows.length) * (1 + Math.min(width, 10) / 100);
    if (score > best.score + 1e-9) best = { sign, score };
  }
  return best.sign;
}

export interface NumberSigns {
  readonly decimalSign: '.' | ',';
  readonly groupSign: '' | ',' | '.' | ' ' | "'";
}

/** Signs that the text cells themselves prove; where nothing proves anything, a point and no groups. */
export function suggestNumberSigns(table: Table): NumberSigns {
  const votes = { point: 0, comma: 0, groupPoint: 0, groupComma: 0, groupSpace: 0, groupQuote: 0 };
  for (const row of table.rows.slice(0, 2000)) {
    for (const cell of row.cells) {
      if (typeof cell !== 'string' || cell.length > 40) continue;
      for (const number of cell.match(/\d[\d.,'’ \u00a0\u202f]*\d/g) ?? []) vote(number, votes);
    }
  }
  const groupSign = votes.groupSpace > 0 ? ' ' : votes.groupQuote > 0 ? "'" : '';
  if (votes.comma > votes.point && votes.groupComma === 0) {
    return { decimalSign: ',', groupSign: votes.groupPoint > 0 ? '.' : groupSign };
  }
  return { decimalSign: '.', groupSign: votes.groupComma > 0 ? ',' : groupSign };
}

function vote(
  number: string,
  votes: Record<'point' | 'comma' | 'groupPoint' | 'groupComma' | 'groupSpace' | 'groupQuote', number>,
): void {
  if (/^\d{1,3}(?:[ \u00a0\u202f]\d{3})+(?:[.,]\d+)?$/.test(number)) votes.groupSpace += 1;
  if (/^\d{1,3}(?:['’]\d{3})+(?:[.,]\d+)?$/.test(number)) votes.groupQuote += 1;
  const plain = number.replace(/[ \u00a0\u202f'’]/g, '');
  if (/^\d{1,3}(?:\.\d{3})+,\d+$/.test(plain) || /^\d{1,3}(?:\.\d{3}){2,}$/.test(plain)) {
    votes.groupPoint += 1;
    votes.comma += 1;
  } else if (/^\d{1,3}(?:,\d{3})+\.\d+$/.test(plain) || /^\d{1,3}(?:,\d{3}){2,}$/.test(plain)) {
    votes.groupComma += 1;
    votes.point += 1;
  } else if (/^\d+,\d+$/.test(plain)) {
    votes.comma += 1;
  } else if (/^\d+\.\d+$/.test(plain)) votes.point += 1;
}

const looksNumeric = (text: string): boolean => /^[+\-−±≤≥<>~(]?\s*[\d.,]+/.test(text);

/**
 * The line of the header: of the first rows the one with the most words that `recognise` knows, else the first row of
 * at least two words and no number that has a row with numbers below it; 0 when there is none.
 */
export function suggestHeaderLine(table: Table, recognise: (header: string) => boolean): number {
  let best = { line: 0, score: 0 };
  const head = table.rows.slice(0, 40);
  for (const row of head) {
    const texts = row.cells.map(cellText).filter((text) => text !== '');
    const score = texts.filter((text) => !looksNumeric(text) && recognise(text)).length;
    if (score > best.score) best = { line: row.line, score };
  }
  if (best.score > 0) return best.line;
  for (const [index, row] of head.entries()) {
    const texts = row.cells.map(cellText).filter((text) => text !== '');
    const next = head[index + 1]?.cells.map(cellText) ?? [];
    if (
      texts.length > 0 &&
      !texts.some(looksNumeric) &&
      next.some(looksNumeric) &&
      next.length <= row.cells.length + 1
    ) {
      return row.line;
    }
  }
  return 0;
}
