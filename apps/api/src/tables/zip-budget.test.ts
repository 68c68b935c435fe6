import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { readWorkbook, workbookNumber } from './read-workbook.ts';
import { TableRefused } from './table.ts';
import { writeWorkbook } from './write-workbook.ts';
import { assertZipBudget } from './zip-budget.ts';

interface Part {
  readonly name: string;
  readonly data: Buffer;
  /** Size told in the directory, where it lies. */
  readonly told?: number;
  readonly mode?: number;
}

const types: Part = { name: '[Content_Types].xml', data: Buffer.from('<Types/>') };

/** A ZIP written by hand (APPNOTE 4.3), so that its directory can lie. */
function zip(parts: readonly Part[]): Buffer {
  const locals: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const { name, data, told, mode } of parts) {
    const packed = deflateRawSync(data, { level: 9 });
    const file = Buffer.from(name);
    const local = Buffer.alloc(30);
    local.writeUInt32LE(0x04034b50, 0);
    local.writeUInt16LE(20, 4);
    local.writeUInt16LE(8, 8);
    local.writeUInt32LE(packed.length, 18);
    local.writeUInt32LE(told ?? data.length, 22);
    local.writeUInt16LE(file.length, 26);
    const central = Buffer.alloc(46);
    central.writeUInt32LE(0x02014b50, 0);
    central.writeUInt16LE(0x031e, 4);
    central.writeUInt16LE(20, 6);
    central.writeUInt16LE(8, 10);
    central.writeUInt32LE(packed.length, 20);
    central.writeUInt32LE(told ?? data.length, 24);
    central.writeUInt16LE(file.length, 28);
    central.writeUInt32LE(((mode ?? 0o100644) << 16) >>> 0, 38);
    central.writeUInt32LE(offset, 42);
    locals.push(local, file, packed);
    directory.push(central, file);
    offset += local.length + file.length + packed.length;
  }
  const names = Buffer.concat(directory);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(parts.length, 8);
  end.writeUInt16LE(parts.length, 10);
  end.writeUInt32LE(names.length, 12);
  end.writeUInt32LE(offset, 16);
  return Buffer.concat([...locals, names, end]);
}

const blanks = (megabytes: number) => Buffer.alloc(megabytes * 1024 * 1024, 0x20);
/** Packs about thirtyfold: within the ratio, so that the other limits are met first. */
const digits = (megabytes: number) => {
  const line = (i: number) => [1, 2, 3, 4, 5, 6].map((k) => Math.imul(i * 7 + k, 2654435761) >>> 0).join('');
  return Buffer.from(
    Array.from({ length: megabytes * 1024 }, (_, i) => line(i).padEnd(1024, String(i % 10))).join(''),
  );
};

describe('the budget of a workbook', () => {
  it.each<[string, readonly Part[], string]>([
    ['a bomb of blanks', [types, { name: 'xl/worksheets/sheet1.xml', data: blanks(19) }], 'a hundred times'],
    ['a part above 20 MB', [types, { name: 'xl/a.xml', data: digits(21) }], 'more than 20 MB'],
    [
      '50 MB in several parts',
      [types, ...[1, 2, 3].map((i) => ({ name: `xl/${i}.xml`, data: digits(18) }))],
      'more than 50 MB',
    ],
    [
      'a part that lies about its size',
      [types, { name: 'xl/a.xml', data: blanks(30), told: 1000 }],
      'damaged',
    ],
    [
      'more than 200 parts',
      [types, ...Array.from({ length: 201 }, (_, i) => ({ name: `xl/${i}.xml`, data: Buffer.from('x') }))],
      'more than 200 parts',
    ],
    ['a path that climbs', [types, { name: '../../etc/passwd', data: Buffer.from('x') }], 'damaged'],
    ['an absolute path', [types, { name: '/etc/passwd', data: Buffer.from('x') }], 'damaged'],
    [
      'a symbolic link',
      [types, { name: 'xl/a.xml', data: Buffer.from('/etc/passwd'), mode: 0o120777 }],
      'damaged',
    ],
    ['the same part twice', [types, types], 'damaged'],
    ['macros', [types, { name: 'xl/vbaProject.bin', data: Buffer.from('x') }], 'macros'],
    [
      'links to other workbooks',
      [types, { name: 'xl/externalLinks/externalLink1.xml', data: Buffer.from('x') }],
      'other workbooks',
    ],
    [
      'an archive inside',
      [types, { name: 'xl/embeddings/a.zip', data: Buffer.from('x') }],
      'other files inside',
    ],
    ['no workbook at all', [{ name: 'readme.txt', data: Buffer.from('x') }], 'no workbook'],
  ])('refuses %s', async (_name, parts, reason) => {
    const refusal = await assertZipBudget(zip(parts)).catch((error: unknown) => error);
    expect(refusal).toBeInstanceOf(TableRefused);
    expect((refusal as TableRefused).message).toContain(reason);
  });

  it('stops a bomb before it takes memory', async () => {
    const bomb = zip([types, ...[1, 2, 3, 4].map((i) => ({ name: `xl/${i}.xml`, data: blanks(100) }))]);
    expect(bomb.length).toBeLessThan(500_000);
    const before = process.memoryUsage().rss;
    await expect(assertZipBudget(bomb)).rejects.toBeInstanceOf(TableRefused);
    expect(process.memoryUsage().rss - before).toBeLessThan(150 * 1024 * 1024);
  });

  it('lets an ordinary workbook through and keeps its text as written', async () => {
    const bytes = await writeWorkbook({
      sheet: 'S',
      header: ['A', 'B'],
      widths: [10, 10],
      rows: [
        ['2.50', '=1+1'],
        ['', 'é'],
      ],
    });
    const [sheet] = await readWorkbook(bytes);
    expect(sheet?.table.rows.map((row) => row.cells)).toEqual([
      ['A', 'B'],
      ['2.50', "'=1+1"],
      ['', 'é'],
    ]);
  });
});

describe('a number of a workbook', () => {
  it.each([
    ['25.006399999999999', '25.0064'],
    ['0.30000000000000004', '0.3'],
    ['12.5', '12.5'],
    ['-0.012', '-0.012'],
    ['1E-4', '0.0001'],
    ['1.2000000000000001E-3', '0.0012'],
    ['1.5E+3', '1500'],
    ['123456789012345', '123456789012345'],
    ['0', '0'],
  ])('%s shows as %s', (stored, shown) => {
    expect(workbookNumber(stored)).toBe(shown);
  });
});
