import { expect, it } from 'vitest';
import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import { bore, PackageStory, wall } from '../../testing/package-story.ts';
import { download, pdfText } from '../../testing/read-pdf.ts';
import { ifVersion, onceKey } from '../../testing/sign-in.ts';

const pieces = 14;
const readings = (text: string) => Array.from({ length: pieces }, () => text);
const plain: CharacteristicRequest[] = Array.from({ length: 24 }, (_, at) => ({
  balloon: String(10 + at),
  description: `Step ${at + 1} of the stepped bore, measured from datum A along the axis of the spindle`,
  kind: 'size',
  tolerance: { form: 'symmetric', nominal: '2.50', tolerance: '0.10' },
  unit: 'mm',
  decimals: 2,
}));

it('puts what is out first, names what is not covered, and heads every page with the title block', async () => {
  const story = await PackageStory.begin();
  await story.releasePart([bore, wall, ...plain], 'TD-2');
  await story.issue({
    piecesPerStream: pieces,
    elements: [{ code: 'warrant', label: 'Part submission warrant', demand: 'submit' }],
  });
  await story.acknowledge();
  const wallReadings = [...readings('2.52').slice(1), '2.611'];
  await story.measure({
    '1': { 'cavity 1': readings('19.02') },
    '3': { 'cavity 1': wallReadings },
    ...Object.fromEntries(plain.map(({ balloon }) => [balloon, { 'cavity 1': readings('2.50') }])),
  });
  const { streams, characteristics } = await story.sheet();
  const worn = streams.find(({ name }) => name === 'cavity 2');
  await story.supplier
    .put(`/api/submissions/${story.submissionId}/streams/${worn?.id}`)
    .set(ifVersion(worn?.version ?? 0))
    .send({ blocked: true, reason: 'Gate worn' })
    .expect(200);
  await story.supplier
    .post(`/api/submissions/${story.submissionId}/deviations`)
    .set(onceKey())
    .send({
      characteristicId: characteristics.find(({ balloon }) => balloon === '3')?.id,
      rangeLower: null,
      rangeUpper: '2.62',
      cause: 'Core worn',
      containment: '100 % check',
      quantity: 400,
      untilOn: null,
    })
    .expect(201);
  const at = `/api/submissions/${story.submissionId}`;
  const results = await download(story.supplier, `${at}/dimensional-results.pdf`).expect(200);
  const pages = await pdfText(results.body as Buffer);
  expect(pages.length).toBeGreaterThan(2);
  pages.forEach((page, index) => {
    expect(page).toContain('Part number TD-2');
    expect(page).toContain(`page ${index + 1} of ${pages.length}`);
  });
  const first = pages[0] ?? '';
  expect(first.indexOf('out of tolerance')).toBeGreaterThan(-1);
  expect(first.indexOf('2.611')).toBeLessThan(first.indexOf('19.02'));
  expect(first.indexOf('All other rows, in drawing order')).toBeGreaterThan(first.indexOf('2.611'));
  expect(pages.join(' ')).toContain('cavity 2 (not covered)');
  expect(pages.join(' ').match(/2\.52(?!\d)/g)?.length).toBeGreaterThanOrEqual(pieces - 1);

  const warrant = await download(story.supplier, `${at}/warrant.pdf`).expect(200);
  const text = (await pdfText(warrant.body as Buffer)).join(' ');
  expect(text).toContain('Not covered: cavity 2. Gate worn');
  expect(text).toContain('Covers: cavity 1.');
  for (const part of ['2.40 to 2.62 mm', '400 pieces', 'asked for', 'Core worn', '100 % check']) {
    expect(text).toContain(part);
  }
}, 120_000);
