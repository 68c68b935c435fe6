import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import type { CheckResponse, Finding } from '@trammel/shared/checks';
import { afterAll, describe, expect, it } from 'vitest';
import { bore, bossPosition, marking, PackageStory, wall } from './testing/package-story.ts';
import { ifVersion } from './testing/sign-in.ts';

const stories: PackageStory[] = [];
async function begun(
  characteristics: readonly CharacteristicRequest[],
  request: Parameters<PackageStory['issue']>[0] = {},
  roundingRule?: 'astm-e29',
): Promise<PackageStory> {
  const story = await PackageStory.begin({ closes: 'caller' });
  stories.push(story);
  await story.releasePart(characteristics);
  // What the drawing says of rounding is settled before its release; here it is said afterwards, to the same effect.
  if (roundingRule)
    await story.app.db.writeTransaction((manager) =>
      manager.query('UPDATE part_revisions SET rounding_rule = ? WHERE id = ?', [
        roundingRule,
        story.revisionId,
      ]),
    );
  await story.issue(request);
  await story.acknowledge();
  return story;
}
afterAll(async () => {
  for (const story of stories) await story.app.close();
});

const rowOf = async (story: PackageStory, balloon: string, stream = 'cavity 1') => {
  const sheet = await story.sheet();
  const id = sheet.characteristics.find((facts) => facts.balloon === balloon)?.id;
  const streamId = sheet.streams.find((one) => one.name === stream)?.id;
  const row = sheet.rows.find((one) => one.characteristicId === id && one.streamId === streamId);
  if (!row) throw new Error(`no row ${balloon} ${stream}`);
  return row;
};
const findingsOf = (check: CheckResponse, rule: string, balloon?: string): Finding[] =>
  check.findings.filter(
    (one) => one.rule === rule && (balloon === undefined || one.place.balloon === balloon),
  );

const scales = [0, 1, 2, 3, 4, 5, 6, 7, 8];
/** Limits 17 and 23 at a scale, one unit beyond each of them, and the same values with one zero more. */
function textsAt(scale: number) {
  const text = (last: number) => {
    const digits = String(last).padStart(scale + 1, '0');
    return scale === 0 ? digits : `${digits.slice(0, -scale)}.${digits.slice(-scale)}`;
  };
  return { lower: text(17), upper: text(23), below: text(16), above: text(24) };
}

describe('verdicts through the API', { timeout: 120_000 }, () => {
  it('takes a reading equal to a limit as in and one unit in the last place beyond as out, at 0 to 8 decimals', async () => {
    const story = await begun(
      scales.map((decimals): CharacteristicRequest => {
        const { lower, upper } = textsAt(decimals);
        return {
          balloon: String(decimals + 1),
          description: `At ${decimals} decimals`,
          kind: 'size',
          tolerance: { form: 'limits', lower, upper },
          unit: 'mm',
          decimals,
        };
      }),
      { streams: ['cavity 1'], piecesPerStream: 4 },
    );
    const readings = Object.fromEntries(
      scales.map((decimals) => {
        const { lower, upper, below, above } = textsAt(decimals);
        return [String(decimals + 1), { 'cavity 1': [lower, upper, below, above] }];
      }),
    );
    await story.measure(readings);
    for (const decimals of scales) {
      const { lower, upper, below, above } = textsAt(decimals);
      expect(await rowOf(story, String(decimals + 1)), `${decimals} decimals`).toMatchObject({
        readings: [lower, upper, below, above],
        marks: 'iioo',
        outCount: 2,
        minimum: below,
        maximum: above,
        verdict: 'out-of-tolerance',
      });
    }
    // Far behind the last place of the limit, where binary fractions can no longer tell the two apart.
    await story.measure({
      '3': {
        'cavity 1': ['0.23000000000000000000', '0.23000000000000000001', '0.17', '0.16999999999999999999'],
      },
    });
    expect((await rowOf(story, '3')).marks).toBe('ioio');
  });

  it('keeps what was typed, converts a unit written behind it exactly, and loses nothing over a word that is no reading', async () => {
    const story = await begun([bore, wall, marking]);
    const saved = await story.measure({
      '3': { 'cavity 1': ['2.50', '0.1 in', 'OK'], 'cavity 2': ['+2.5', '0.100 in', '2.600'] },
    });
    expect(saved.body.refused).toHaveLength(1);
    expect(saved.body.refused[0]).toMatchObject({
      text: 'OK',
      reason: '"OK" is not a number. Enter digits with a point, such as 12.50.',
    });
    expect(await rowOf(story, '3')).toMatchObject({
      readings: expect.arrayContaining(['2.50', '0.1 in']),
      marks: expect.stringMatching(/^ii/),
      n: 2,
      minimum: '2.50',
      maximum: '2.54',
    });
    expect((await rowOf(story, '3', 'cavity 2')).readings).toEqual(['+2.5', '0.100 in', '2.600']);
    // 19.00 mm is 0.74803149… in: 0.748 in is 18.9992 mm, out by 0.0008 mm, and 0.75 in is 19.05 mm, the limit itself.
    await story.measure({ '1': { 'cavity 1': ['0.748 in', '0.75 in', '0.7500000001 in'] } });
    expect(await rowOf(story, '1')).toMatchObject({ marks: 'oio', minimum: '18.9992' });
    const words = await story.measure({
      '1': { 'cavity 1': ['pass'] },
      '4': { 'cavity 1': ['pass', 'fail', '1.0'] },
    });
    expect(words.body.refused.map((one: { text: string }) => one.text)).toEqual(['pass', '1.0']);
    expect((await rowOf(story, '4')).verdict).toBe('out-of-tolerance');
  });

  it('rounds by ASTM E29 only where the drawing says so, and shows both texts', async () => {
    const readings = { '3': { 'cavity 1': ['2.604', '2.605', '2.50'] } };
    const absolute = await begun([wall]);
    await absolute.measure(readings);
    expect((await rowOf(absolute, '3')).marks).toBe('ooi');
    const rounding = await begun([wall], {}, 'astm-e29');
    await rounding.measure({ '3': { ...readings['3'], 'cavity 2': ['2.615', '2.395', '2.3949'] } });
    // Half goes to the even digit: 2.605 to 2.60, 2.615 to 2.62, 2.395 to 2.40.
    expect(await rowOf(rounding, '3')).toMatchObject({ marks: 'iii', readings: ['2.604', '2.605', '2.50'] });
    expect((await rowOf(rounding, '3', 'cavity 2')).marks).toBe('oio');
    await rounding.measure({ '3': { 'cavity 2': ['2.50', '2.51', '2.395'] } });
    await rounding.nameGauges();
    await rounding.attachControlPlan();
    await rounding.stateRun();
    expect((await rounding.sign()).status).toBe(201);
    const [row] = (await rounding.review()).rows;
    expect(row.checked.map((one: { rounded: unknown }) => one.rounded)).toEqual([
      [
        { raw: '2.604', rounded: '2.60' },
        { raw: '2.605', rounded: '2.60' },
      ],
      [{ raw: '2.395', rounded: '2.40' }],
    ]);
    expect(row.results).toContainEqual(
      expect.objectContaining({ readings: ['2.604', '2.605', '2.50'], maximum: '2.605' }),
    );
  });

  it('leaves readings within the agreed uncertainty of a limit undecided', async () => {
    // A tenth of the tolerance 0.20 is 0.02: proved in from 2.42 to 2.58, proved out beyond 2.38 and 2.62.
    const rule = { kind: 'guard-band', uncertaintyPercentOfTolerance: '10', proves: 'supplier' } as const;
    const story = await begun([wall], { decisionRule: rule });
    await story.measure({
      '3': { 'cavity 1': ['2.58', '2.59', '2.60'], 'cavity 2': ['2.62', '2.621', '2.42'] },
    });
    expect(await rowOf(story, '3')).toMatchObject({ marks: 'iuu', undecidedCount: 2, verdict: 'undecided' });
    expect(await rowOf(story, '3', 'cavity 2')).toMatchObject({ marks: 'uoi', verdict: 'out-of-tolerance' });
    const check = await story.check();
    expect(findingsOf(check, 'R19', '3')[0]).toMatchObject({ weight: 'reviewer-decides' });
  });
});

describe('findings through the API', { timeout: 120_000 }, () => {
  it('names a copied block, an overdue gauge, a wrong revision and dates to come, and says the same twice', async () => {
    const story = await begun([bore, bossPosition, wall, marking]);
    await story.prepareClean();
    const clean = await story.check();
    expect(clean.counts.stops).toBe(0);

    await story.measure({
      '1': { 'cavity 1': ['19.02', '19.03', '19.04'], 'cavity 2': ['19.02', '19.03', '19.04'] },
    });
    const [copied] = findingsOf(await story.check(), 'R27', '1');
    expect(copied).toMatchObject({ weight: 'reviewer-decides', place: { stream: 'cavity 2' } });

    await story.nameGauges(story.inDays(-1));
    const overdue = findingsOf(await story.check(), 'R28', '3').filter((one) =>
      one.title.includes('overdue'),
    );
    expect(overdue.map((one) => one.weight)).toEqual(['stops-submission', 'stops-submission']);
    const row = await rowOf(story, '3');
    const path = `/api/submissions/${story.submissionId}/rows/${row.characteristicId}/${row.streamId}`;
    const change = (version: number, measuredOn: string, note: string) =>
      story.supplier
        .put(path)
        .set(ifVersion(version))
        .send({ gaugeId: row.gaugeId, measuredOn, note, attribute: null })
        .expect(200);
    const noted = await change(row.version, story.today(), 'Master ring checked the same day');
    const answered = findingsOf(await story.check(), 'R28', '3').filter((one) =>
      one.title.includes('overdue'),
    );
    expect(answered.map((one) => [one.place.stream, one.weight]).sort()).toEqual([
      ['cavity 1', 'reviewer-decides'],
      ['cavity 2', 'stops-submission'],
    ]);
    await change(noted.body.version, story.inDays(1), 'Master ring checked the same day');
    const future = findingsOf(await story.check(), 'R26', '3');
    expect(future).toEqual([
      expect.objectContaining({ title: 'Measured in the future', weight: 'stops-submission' }),
    ]);

    await story.attachControlPlan('A');
    const [wrong] = findingsOf(await story.check(), 'R02');
    expect(wrong).toMatchObject({ weight: 'stops-submission', place: { kind: 'element' } });
    expect(wrong?.detail).toContain('states revision A; the package is for revision B');

    const official = async () =>
      (await story.supplier.post(`/api/submissions/${story.submissionId}/check`).expect(201))
        .body as CheckResponse;
    const [first, second, live] = [await official(), await official(), await story.check()];
    expect(second.inputsDigest).toBe(first.inputsDigest);
    expect(second.findings).toEqual(first.findings);
    expect(live).toMatchObject({
      inputsDigest: first.inputsDigest,
      method: first.method,
      counts: first.counts,
    });
    expect(live.findings).toEqual(first.findings);
    expect(clean.inputsDigest).not.toBe(first.inputsDigest);
  });
});
