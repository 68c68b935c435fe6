import { describe, expect, it } from 'vitest';
import { hostileName, judgeFile } from './file-types.ts';

const png = (width: number, height: number) => {
  const head = Buffer.alloc(32);
  Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]).copy(head);
  head.writeUInt32BE(width, 16);
  head.writeUInt32BE(height, 20);
  return head;
};
const zip = (entry: string) =>
  Buffer.concat([Buffer.from('PK\x03\x04', 'latin1'), Buffer.alloc(26), Buffer.from(entry)]);

describe('names', () => {
  it.each([
    'drawing.pdf\u0000.exe',
    'invoice\u202Efdp.exe',
    'drawing.pdf.',
    'drawing.pdf ',
    'setup.exe.pdf',
    'page.html.txt',
    '../../etc/passwd.txt',
    'C:\\Windows\\a.pdf',
    'line\nbreak.pdf',
    '   ',
    `${'x'.repeat(200)}.pdf`,
  ])('refuses %j', (name) => expect(hostileName(name)).not.toBeNull());

  it.each([
    'CON.pdf',
    'Zeichnung Ø25 k6 (Rev C).pdf',
    '図面.pdf',
    '.pdf',
    'v1.2.3.pdf',
    '%2e%2e%2fx.pdf',
    "O'Neil & Söhne.pdf",
  ])('takes %j', (name) => expect(hostileName(name)).toBeNull());
});

describe('content', () => {
  it.each<[string, string, Buffer]>([
    ['report.pdf', 'application/pdf', Buffer.from('%PDF-1.4')],
    ['late-start.pdf', '', Buffer.concat([Buffer.alloc(500, 10), Buffer.from('%PDF-1.4')])],
    ['photo.PNG', 'image/png', png(4000, 3000)],
    ['photo.jpg', 'image/jpeg', Buffer.from([0xff, 0xd8, 0xff, 0xe0, 0, 4, 0, 0])],
    ['book.xlsx', 'application/octet-stream', zip('[Content_Types].xml')],
    ['values.csv', 'application/vnd.ms-excel', Buffer.from('a;b\n1,5;2')],
    ['values.csv', 'text/plain', Buffer.from('a;b')],
    ['wide.csv', 'text/csv', Buffer.from('\uFEFFa;b', 'utf16le')],
    ['model.stp', '', Buffer.from('ISO-10303-21;\nHEADER;')],
    ['plan.qif', 'application/xml', Buffer.from('\uFEFF<?xml version="1.0"?><QIFDocument/>')],
    ['data.json', 'application/json', Buffer.from(' {"a":1}')],
  ])('takes %s sent as %s', (name, type, head) => {
    expect(judgeFile('evidence', name, type, head)).toHaveProperty('mediaType');
  });

  it.each<[string, string, Buffer, string]>([
    ['program.pdf', 'application/pdf', Buffer.from('MZ\x90'), 'not a PDF'],
    ['picture.png', 'image/png', Buffer.from('GIF89a'), 'not a PNG'],
    ['huge.png', 'image/png', png(30_000, 30_000), '30000 × 30000 pixels'],
    ['renamed.png', 'application/pdf', png(10, 10), 'sent as application/pdf'],
    ['page.pdf', 'text/html', Buffer.from('%PDF-1.4'), 'text/html'],
    ['book.xlsx', '', Buffer.from('\xd0\xcf\x11\xe0', 'latin1'), 'not a spreadsheet'],
    ['archive.xlsx', '', zip('holiday/photo.jpg'), 'not a spreadsheet'],
    ['binary.csv', 'text/csv', Buffer.from([1, 0, 2, 0]), 'not text'],
    ['program.txt', 'text/plain', Buffer.from('MZ this is a program'), 'not text'],
    [
      'page.xml',
      '',
      Buffer.from('<html xmlns="http://www.w3.org/1999/xhtml"><script/></html>'),
      'browser would run',
    ],
    ['image.xml', '', Buffer.from('<svg onload="x()"/>'), 'browser would run'],
    ['macro.xlsm', '', zip('xl/vbaProject.bin'), 'not taken here'],
    ['image.svg', '', Buffer.from('<svg/>'), 'not taken here'],
    ['nothing', '', Buffer.from('x'), 'not taken here'],
    ['empty.pdf', '', Buffer.alloc(0), 'empty'],
  ])('refuses %s sent as %s', (name, type, head, words) => {
    const verdict = judgeFile('evidence', name, type, head);
    expect('refused' in verdict && verdict.refused).toContain(words);
  });
});
