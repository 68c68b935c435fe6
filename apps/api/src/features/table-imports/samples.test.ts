import { existsSync, readFileSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildCast } from '../../testing/builders.ts';
import { buildPart } from '../../testing/part-builders.ts';
import { signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

const samples = resolve(dirname(fileURLToPath(import.meta.url)), '../../../../../../shared/samples');
const present = existsSync(samples);
// The files people really send are not part of the product: without them these tests are left out, and say so.
const withSamples = present ? describe : describe.skip;

let app: TestApp;
let reviewer: Client;
let revisionId: string;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  reviewer = await signInAs(app, (await buildCast(app)).reviewer);
  revisionId = (await buildPart(reviewer)).revisions[0]?.id ?? '';
});
afterAll(() => app.close());

const send = (file: string, name = file.split('/').at(-1) ?? '') =>
  reviewer
    .post(`/api/revisions/${revisionId}/characteristic-imports`)
    .attach('file', readFileSync(join(samples, file)), name);

interface Expected {
  readonly encoding?: string;
  readonly delimiter?: string;
  readonly decimalSign?: string;
  readonly groupSign?: string;
  readonly headerLine: number;
  readonly totalRows: number;
  readonly add: number;
}

withSamples(
  `tables as they are really sent (${present ? 'read' : 'skipped: ../shared/samples is not there'})`,
  () => {
    const cases: [string, Expected][] = [
      ['inspection-sheets/widget_textual_tolerances.csv', { headerLine: 1, totalRows: 42, add: 26 }],
      [
        'process-messy/furnace_windows1252_units_in_header.csv',
        { encoding: 'windows-1252', delimiter: ';', headerLine: 2, totalRows: 168, add: 0 },
      ],
      [
        'process-messy/gear_semicolon_decimalcomma_bom_crlf.csv',
        { delimiter: ';', decimalSign: ',', headerLine: 1, totalRows: 100, add: 0 },
      ],
      [
        'process-messy/wafer_thickness_german_thousands.csv',
        { delimiter: ';', decimalSign: ',', groupSign: '.', headerLine: 1, totalRows: 464, add: 0 },
      ],
      ['process-nist/csv/gear.csv', { headerLine: 1, totalRows: 100, add: 0 }],
      ['process-nist/csv/zarr13.csv', { headerLine: 1, totalRows: 195, add: 0 }],
      ['csv-edge/newlines_crlf.csv', { headerLine: 1, totalRows: 3, add: 0 }],
      ['csv-edge/utf8.csv', { headerLine: 1, totalRows: 2, add: 0 }],
      ['csv-edge/quotes_and_newlines.csv', { headerLine: 1, totalRows: 2, add: 0 }],
      ['hostile/csv/formula_injection.csv', { headerLine: 1, totalRows: 8, add: 7 }],
      ['hostile/csv/markup.csv', { headerLine: 1, totalRows: 3, add: 0 }],
      ['hostile/text/antivirus_lookalike.txt', { headerLine: 0, totalRows: 1, add: 0 }],
      ['spreadsheets-real/poi/SampleSS.xlsx', { headerLine: 1, totalRows: 2, add: 0 }],
      ['spreadsheets-real/poi/SampleSS.strict.xlsx', { headerLine: 1, totalRows: 2, add: 0 }],
      ['spreadsheets-real/poi/DateFormatTests.xlsx', { headerLine: 1, totalRows: 3, add: 0 }],
    ];
    it.each(cases)(
      '%s is read under the settings it needs',
      async (file, { totalRows, add, ...settings }) => {
        const { body } = await send(file).expect(201);
        const wanted = { encoding: 'utf-8', delimiter: ',', decimalSign: '.', groupSign: '', ...settings };
        expect(body).toMatchObject({ settings: wanted, totalRows, counts: { add, replace: 0, same: 0 } });
      },
    );

    it('takes the textual tolerances of an inspection sheet and names each repeat by its line', async () => {
      const { body } = await send('inspection-sheets/widget_textual_tolerances.csv').expect(201);
      const limits = Object.fromEntries(
        body.rows.map((row: Record<string, string>) => [
          row.balloon,
          [row.kind, row.lowerLimit, row.upperLimit],
        ]),
      );
      expect(limits).toMatchObject({
        '113': ['geometric', '0', '0.25'],
        '10': ['size', '18.87', '19.13'],
        '6': ['size', '4.975', '5.025'],
        // Half of "2 total" about 0.
        '109': ['geometric', '-1', '1'],
        '19': ['size', '104.75', '105.25'],
      });
      expect(body.refused).toHaveLength(42 - 26);
      expect(body.refused[0]).toMatchObject({
        line: 14,
        column: 'Balloon',
        detail: 'Balloon 6 stands already on line 12.',
      });
    });

    it.each([
      ['spreadsheets-real/poi/SampleSS.xls', 'sheet.xls', 'older XLS'],
      ['spreadsheets-real/poi/SampleSS.xls', 'renamed.xlsx', 'older XLS'],
      ['spreadsheets-real/poi/SampleSS.ods', 'renamed.xlsx', 'no workbook'],
      ['spreadsheets-real/poi/SampleSS.ods', 'sheet.ods', 'packed file'],
      ['hostile/pdf/plain_reference.pdf', 'table.csv', 'a PDF'],
      ['hostile/pdf/polyglot_html_in_comment.pdf', 'table.xlsx', 'a PDF'],
      ['hostile/svg/script.svg', 'table.csv', 'web page or XML'],
    ])('%s sent as %s is refused with the reason', async (file, name, reason) => {
      const { body } = await send(file, name).expect(422);
      expect(body.errors[0]).toMatchObject({ pointer: '/file' });
      expect(body.errors[0].detail).toContain(reason);
    });
  },
);
