import { extname } from 'node:path';
import { TableRefused } from './table.ts';

export type TableFormat = 'csv' | 'xlsx';

const textExtensions = new Set(['.csv', '.txt', '.tsv', '.tab', '.asc', '.dat', '']);

const startsWith = (bytes: Uint8Array, text: string): boolean =>
  Buffer.from(bytes.buffer, bytes.byteOffset, Math.min(bytes.length, text.length)).toString('latin1') ===
  text;

const known: readonly { signature: string; name: string; remedy: string }[] = [
  {
    signature: '%PDF-',
    name: 'a PDF',
    remedy: 'Ask the program that made it for a CSV or XLSX table; attach the PDF as evidence.',
  },
  {
    signature: '\xd0\xcf\x11\xe0',
    name: 'an older XLS workbook, or a workbook protected by a password',
    remedy: 'Open it, remove the password, and save it as XLSX or CSV.',
  },
  { signature: '\x89PNG', name: 'a PNG picture', remedy: 'Send the table itself as CSV or XLSX.' },
  { signature: '\xff\xd8\xff', name: 'a JPEG picture', remedy: 'Send the table itself as CSV or XLSX.' },
  { signature: '{\\rtf', name: 'an RTF document', remedy: 'Save the table as CSV or XLSX.' },
  { signature: '\x1f\x8b', name: 'a gzip archive', remedy: 'Unpack it and send the table.' },
];

/** What the first bytes say the file is; throws `TableRefused` for what is no table or not what its name claims. */
export function sniffTableFile(name: string, bytes: Uint8Array): TableFormat {
  const extension = extname(name).toLowerCase();
  if (bytes.length === 0) throw new TableRefused('The file is empty.', 'Save the table again and send it.');
  const found = known.find((entry) => startsWith(bytes, entry.signature));
  if (found) throw new TableRefused(`This is ${found.name}, whatever its name says.`, found.remedy);
  if (startsWith(bytes, 'PK')) {
    if (extension === '.xlsx') return 'xlsx';
    if (extension === '.xlsm')
      throw new TableRefused('A workbook with macros is not taken.', 'Save it as XLSX, without macros.');
    throw new TableRefused(
      `This is a packed file, but its name ends in ${extension || 'nothing'}.`,
      'Send a workbook under its own name ending in .xlsx, or a CSV.',
    );
  }
  if (extension === '.xlsx') {
    throw new TableRefused(
      'The name says XLSX, but this is no workbook.',
      'Save it as XLSX again, or name it .csv if it is text.',
    );
  }
  if (!textExtensions.has(extension)) {
    throw new TableRefused(
      `A table ending in ${extension} is not taken.`,
      'Send CSV, tab-separated text or XLSX.',
    );
  }
  const head = Buffer.from(bytes.subarray(0, 2048))
    .toString('latin1')
    .replace(/[\0\uFEFF]|^ÿþ|^þÿ|^ï»¿/g, '')
    .trimStart();
  if (/^<(?:!doctype|html|\?xml|svg|table|script)/i.test(head)) {
    throw new TableRefused('This is a web page or XML, not a table.', 'Export the table as CSV or XLSX.');
  }
  return 'csv';
}
