import type ExcelJs from 'exceljs';
import papaparse from 'papaparse';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import { signInAs } from '../../testing/sign-in.ts';
import { download, pdfText, squeezed } from '../../testing/read-pdf.ts';
import { bore, bossPosition, marking, PackageStory, wall } from '../../testing/package-story.ts';

const flat: CharacteristicRequest = {
  balloon: '5',
  description: '=1+1',
  kind: 'size',
  tolerance: { form: 'limits', lower: '-0.020', upper: '0.020' },
  unit: 'mm',
  decimals: 3,
};
const foreign = 'Ø25 ±0,01 µm ΔE ≤ Łódź';
const critical: CharacteristicRequest = {
  balloon: '6',
  description: foreign,
  kind: 'size',
  tolerance: { form: 'symmetric', nominal: '8.00', tolerance: '0.05' },
  unit: 'mm',
  decimals: 2,
  class: 'safety-regulatory',
};

let story: PackageStory;
const submitted = () => `/api/submissions/${story.submissionId}`;

beforeAll(async () => {
  story = await PackageStory.begin({ closes: 'caller' });
  await story.releasePart([bore, bossPosition, wall, marking, flat, critical]);
  await story.issue();
}, 60_000);
afterAll(() => story.app.close());

describe('before the supplier has submitted', () => {
  it('keeps the evidence from the customer, and gives the supplier a draft with unsigned fields', async () => {
    await story.acknowledge();
    for (const name of [
      'warrant.pdf',
      'dimensional-results.pdf',
      'dimensional-results.csv',
      'dimensional-results.xlsx',
    ]) {
      const answer = await story.reviewer.get(`${submitted()}/${name}`).expect(409);
      expect(answer.body.detail).toMatch(/not submitted/);
    }
    const pages = await pdfText(
      (await download(story.supplier, `${submitted()}/warrant.pdf`).expect(200)).body as Buffer,
    );
    expect(pages.join(' ').match(/not signed/g)).toHaveLength(2);
    expect(pages.join(' ')).toContain('not stated');
  }, 60_000);
});

describe('after submission', () => {
  beforeAll(async () => {
    await story.measure({
      '5': {
        'cavity 1': ['-0.012', '0.000', '0.0105'],
        'cavity 2': ['0.001', '0.002', '0.003'],
      },
      '6': { 'cavity 1': ['8.00', '8.01', '8.02'], 'cavity 2': ['7.95', '8.05', '8.04'] },
    });
    await story.submitClean();
  }, 60_000);

  it('prints the warrant with facts, declaration, coverage, caution and the signature with its zone', async () => {
    const answer = await download(story.reviewer, `${submitted()}/warrant.pdf`).expect(200);
    expect(answer.headers['content-type']).toBe('application/pdf');
    expect(answer.headers['content-disposition']).toMatch(
      /attachment; filename="TD-1-B-round-1-warrant\.pdf"/,
    );
    const text = (await pdfText(answer.body as Buffer)).join(' ');
    const { warrantSignature: signature } = await story.head();
    if (!signature) throw new Error('The warrant is not signed.');
    expect(text).toContain('TD-1');
    expect(text).toContain('1200');
    expect(text).toContain('0.0613 kg');
    expect(text).toContain('I declare that the sample pieces');
    expect(text).toContain('Covers: cavity 1, cavity 2');
    expect(text).toContain('Characteristic 6 is marked safety or regulatory');
    expect(text).toContain(signature.name);
    expect(text).toContain(signature.organisation);
    expect(text).toContain(`${signature.signedAt.slice(0, 19).replace('T', ' ')} UTC`);
    expect(squeezed(text)).toContain(signature.digest);
    expect(text).toContain(signature.keyId);
    expect(text).toContain('Submitted: the declaration above is made for the supplier');
    expect(text).toContain('not signed');
    expect(text).toContain('page 1 of 1');
  }, 60_000);

  it('prints every row with limits, figures, verdict and readings as typed, in letters of every alphabet', async () => {
    const answer = await download(story.reviewer, `${submitted()}/dimensional-results.pdf`).expect(200);
    const pages = await pdfText(answer.body as Buffer);
    const text = pages.join(' ');
    for (const part of [
      '19.00',
      '19.05',
      '19.02',
      '0.15 + bonus',
      '-0.012',
      '0.000',
      '0.0105',
      '7.95',
      '8.05',
    ]) {
      expect(text).toContain(part);
    }
    expect(squeezed(text)).toContain(squeezed(foreign));
    expect(text).toContain('in tolerance');
    expect(text).toContain('safety or regulatory');
    expect(squeezed(text)).toContain((await story.head()).warrantSignature?.digest ?? 'unsigned');
    pages.forEach((page, at) => {
      expect(page).toContain('Part number');
      expect(page).toContain(`page ${at + 1} of ${pages.length}`);
    });
  }, 60_000);

  it('exports each reading as it was typed, with formulas defused and numbers left alone', async () => {
    const answer = await story.reviewer.get(`${submitted()}/dimensional-results.csv`).expect(200);
    expect(answer.headers['content-type']).toMatch(/^text\/csv/);
    const { data } = papaparse.parse<Record<string, string>>(answer.text.replace(/^\uFEFF/, ''), {
      header: true,
      skipEmptyLines: true,
    });
    const measured = data.filter((line) => line.Balloon === '5' && line.Stream === 'cavity 1');
    expect(measured.map((line) => line.Reading)).toEqual(['-0.012', '0.000', '0.0105']);
    expect(measured[0]).toMatchObject({
      Description: "'=1+1",
      Unit: 'mm',
      'Lower limit': '-0.020',
      'Upper limit': '0.020',
      Verdict: 'in tolerance',
    });
    expect(data).toHaveLength(6 * 2 * 3);
    expect(data.find((line) => line.Balloon === '6')?.Description).toBe(foreign);
  }, 60_000);

  it('exports a workbook whose numbers are numbers that show their decimals', async () => {
    const answer = await download(story.supplier, `${submitted()}/dimensional-results.xlsx`).expect(200);
    const { default: exceljs } = (await import('exceljs')) as unknown as { default: typeof ExcelJs };
    const workbook = new exceljs.Workbook();
    await workbook.xlsx.load(answer.body as never);
    const [readings, rows] = workbook.worksheets;
    const found: ExcelJs.Row[] = [];
    readings?.eachRow((row) => {
      if (row.getCell(1).value === '5' && row.getCell(3).value === 'cavity 1') found.push(row);
    });
    expect(found.map((row) => [row.getCell(5).value, row.getCell(5).numFmt])).toEqual([
      [-0.012, '0.000'],
      [0, '0.000'],
      [0.0105, '0.0000'],
    ]);
    expect(found[0]?.getCell(2).value).toBe("'=1+1");
    expect(found[0]?.getCell(2).formula).toBeUndefined();
    expect(rows?.rowCount).toBe(1 + 6 * 2);
    const wallRow = rows?.getRows(2, 12)?.find((row) => row.getCell(1).value === '3');
    expect(wallRow?.getCell(5).value).toBe(2.4);
    expect(wallRow?.getCell(5).numFmt).toBe('0.00');
    expect(wallRow?.getCell(9).value).toBe(3);
    expect(wallRow?.getCell(16).value).toBe('in tolerance');
  }, 60_000);

  it('is as absent for another supplier as a package that never was', async () => {
    const stranger = await signInAs(story.app, story.cast.otherSupplierQuality);
    for (const name of [
      'warrant.pdf',
      'dimensional-results.pdf',
      'dimensional-results.csv',
      'dimensional-results.xlsx',
    ]) {
      const theirs = await stranger.get(`${submitted()}/${name}`).expect(404);
      const none = await stranger
        .get(`/api/submissions/00000000-0000-4000-8000-000000000000/${name}`)
        .expect(404);
      expect({ ...theirs.body, instance: '' }).toEqual({ ...none.body, instance: '' });
      await story.purchaser.get(`${submitted()}/${name}`).expect(403);
    }
  });
});

describe('after the disposition', () => {
  it('prints both signatures side by side and none of the internal remarks', async () => {
    await story.acceptAll();
    const { rows } = await story.review();
    const [row] = rows;
    await story
      .mark(row.characteristic.id, row.decision.version, {
        mark: 'accepted',
        internalRemark: 'Not for the supplier',
      })
      .expect(200);
    const signed = await story.dispose({ outcome: 'approved' });
    expect(signed.status).toBe(201);
    const { warrantSignature, dispositionSignature } = await story.head();
    for (const name of ['warrant.pdf', 'dimensional-results.pdf']) {
      for (const who of [story.reviewer, story.supplier]) {
        const answer = await download(who, `${submitted()}/${name}`).expect(200);
        const text = (await pdfText(answer.body as Buffer)).join(' ');
        for (const signature of [warrantSignature, dispositionSignature]) {
          expect(text).toContain(signature?.name ?? 'unsigned');
          expect(squeezed(text)).toContain(signature?.digest ?? 'unsigned');
        }
        expect(text).toContain('Approved for production');
        expect(text).not.toContain('not signed');
        expect(text).not.toContain('Not for the supplier');
      }
    }
  }, 60_000);
});
