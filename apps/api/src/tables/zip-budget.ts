import yauzl from 'yauzl';
import { tableBudget } from './budget.ts';
import { TableRefused } from './table.ts';

const tooMuch = (what: string) =>
  new TableRefused(`The workbook ${what}.`, 'Copy the table alone into a new workbook, or save it as CSV.');

/**
 * Inflates every part of a workbook once, counting bytes as they flow, before any reader sees it: sizes that the
 * archive declares are not believed. Refuses macros, links to other workbooks, archives inside and odd paths.
 */
export function assertZipBudget(bytes: Uint8Array): Promise<void> {
  return new Promise((resolve, reject) => {
    const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    // strictFileNames refuses back-slashes; names that are absolute or climb up are refused by yauzl itself.
    yauzl.fromBuffer(
      buffer,
      { lazyEntries: true, validateEntrySizes: true, strictFileNames: true },
      (error, zip) => {
        if (error) return reject(damaged());
        const fail = (problem: unknown) => {
          zip.close();
          reject(problem instanceof TableRefused ? problem : damaged());
        };
        if (zip.entryCount > tableBudget.zipEntries)
          return fail(tooMuch(`has more than ${tableBudget.zipEntries} parts`));
        const seen = new Set<string>();
        let total = 0;
        zip.on('error', fail);
        zip.on('end', () => (seen.has('[content_types].xml') ? resolve() : fail(notAWorkbook())));
        zip.on('entry', (entry: yauzl.Entry) => {
          const problem = refusalOf(entry, seen);
          if (problem) return fail(problem);
          if (entry.fileName.endsWith('/')) return zip.readEntry();
          zip.openReadStream(entry, (openError, stream) => {
            if (openError) return fail(openError);
            let size = 0;
            stream.on('data', (chunk: Buffer) => {
              size += chunk.length;
              total += chunk.length;
              const over = overBudget(size, total, entry.compressedSize);
              if (over) {
                stream.destroy();
                fail(over);
              }
            });
            stream.on('error', fail);
            stream.on('end', () => zip.readEntry());
          });
        });
        zip.readEntry();
      },
    );
  });
}

const damaged = () =>
  new TableRefused('The workbook is damaged.', 'Open it and save it again, or save it as CSV.');
const notAWorkbook = () =>
  new TableRefused('This archive is no workbook.', 'Send the workbook itself, ending in .xlsx.');

const symbolicLink = 0o120000;

function refusalOf(entry: yauzl.Entry, seen: Set<string>): TableRefused | null {
  const name = entry.fileName.toLowerCase();
  if (seen.has(name)) return damaged();
  seen.add(name);
  if (entry.isEncrypted())
    return new TableRefused(
      'The workbook is protected by a password.',
      'Remove the password and send it again.',
    );
  if (((entry.externalFileAttributes >>> 16) & 0o170000) === symbolicLink) return damaged();
  if (/vbaproject|\.bin$/.test(name) && !/printersettings/.test(name)) {
    return new TableRefused(
      'The workbook carries macros or binary parts.',
      'Save it as XLSX without macros.',
    );
  }
  if (name.startsWith('xl/externallinks/')) {
    return new TableRefused(
      'The workbook draws values from other workbooks.',
      'Copy the table and paste it as values into a new workbook.',
    );
  }
  if (/\.(?:zip|xlsx|xlsm|xls|docx|7z|rar|gz|exe|dll|js|html?)$/.test(name)) {
    return new TableRefused(
      'The workbook has other files inside.',
      'Copy the table alone into a new workbook.',
    );
  }
  return null;
}

function overBudget(size: number, total: number, packed: number): TableRefused | null {
  if (size > tableBudget.entryBytes) return tooMuch('has a part of more than 20 MB');
  if (total > tableBudget.inflatedBytes) return tooMuch('unpacks to more than 50 MB');
  if (size > tableBudget.ratioFromBytes && size > packed * tableBudget.ratio) {
    return tooMuch('unpacks to more than a hundred times its size');
  }
  return null;
}
