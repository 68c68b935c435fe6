import { describe, expect, it } from 'vitest';
import { DAY } from '../../clock.ts';
import { bore, bossPosition, marking, PackageStory, wall } from '../../testing/package-story.ts';
import { onceKey } from '../../testing/sign-in.ts';
import { testPassword } from '../../testing/builders.ts';
import { runInterimClock } from '../buying-status/interim-clock.ts';

async function inPreparation(): Promise<PackageStory> {
  const story = await PackageStory.begin();
  await story.releasePart([bore, bossPosition, wall, marking]);
  await story.issue();
  await story.acknowledge();
  return story;
}

describe('a package from request to buying status', () => {
  it('is approved when everything is in tolerance, marked and signed', async () => {
    const story = await inPreparation();
    expect(await story.buyingLine()).toMatchObject({ verdict: 'hold', openPackageState: 'in-preparation' });
    await story.submitClean();
    expect(await story.head(story.reviewer)).toMatchObject({ state: 'submitted', side: 'customer' });
    const early = await story.dispose({ outcome: 'approved' });
    expect(early.status).toBe(409);
    expect(early.body.detail).toContain('Not marked yet: balloon 1, 2, 3, 4.');
    await story.acceptAll();
    const signed = await story.dispose({ outcome: 'approved' });
    expect(signed.body).toMatchObject({
      outcome: 'approved',
      signature: { meaning: 'Approved for production' },
    });
    expect(await story.buyingLine()).toMatchObject({
      verdict: 'may-buy',
      approvedRevision: 'B',
      toolingRelease: true,
    });
    expect(await story.head()).toMatchObject({
      state: 'approved',
      warrantSignature: { name: story.cast.supplierSigner.name },
    });
    const kinds = (await story.app.mails()).map((mail) => mail.kind);
    expect(kinds).toContain('package-submitted');
    expect(kinds).toContain('buying-status-changed');
  });

  it('stops at a row out of tolerance until a deviation that reaches it is asked for, and accepts it only once granted', async () => {
    const story = await inPreparation();
    await story.measure({
      '3': { 'cavity 1': ['2.50', '2.61', '2.51'], 'cavity 2': ['2.49', '2.50', '2.53'] },
    });
    const stopped = await story.check();
    expect(stopped.findings).toContainEqual(
      expect.objectContaining({
        rule: 'R20',
        weight: 'stops-submission',
        place: expect.objectContaining({ balloon: '3', stream: 'cavity 1' }),
      }),
    );
    const sheet = await story.sheet();
    const wallId = sheet.characteristics.find((facts) => facts.balloon === '3')?.id;
    const asked = {
      characteristicId: wallId,
      rangeLower: null,
      rangeUpper: '2.60',
      cause: 'Core worn',
      containment: '100 % check',
      quantity: 400,
      untilOn: null,
    };
    const inside = await story.supplier
      .post(`/api/submissions/${story.submissionId}/deviations`)
      .set(onceKey())
      .send(asked)
      .expect(422);
    expect(inside.body.errors[0].pointer).toBe('/rangeUpper');
    const deviation = await story.supplier
      .post(`/api/submissions/${story.submissionId}/deviations`)
      .set(onceKey())
      .send({ ...asked, rangeUpper: '2.62' })
      .expect(201);
    expect(deviation.body).toMatchObject({ number: 1, state: 'sent', coversReadings: true });
    await story.measure({
      '1': { 'cavity 1': ['19.02', '19.03', '19.04'], 'cavity 2': ['19.01', '19.02', '19.02'] },
      '2': { 'cavity 1': ['0.066', '0.080', '0.100'], 'cavity 2': ['0.071', '0.082', '0.090'] },
      '4': { 'cavity 1': ['pass', 'pass', 'pass'], 'cavity 2': ['pass', 'pass', 'pass'] },
    });
    await story.nameGauges();
    await story.attachControlPlan();
    await story.stateRun();
    expect((await story.check()).counts.stops).toBe(0);
    expect((await story.sign()).status).toBe(201);

    const { rows } = await story.review('out');
    expect(rows).toHaveLength(1);
    const refused = await story.mark(rows[0].characteristic.id, 0, { mark: 'accepted' }).expect(422);
    expect(refused.body.errors[0].pointer).toBe('/deviationId');
    await story.reviewer
      .post(`/api/deviations/${deviation.body.id}/decision`)
      .set({ 'If-Match': `"${deviation.body.version}"` })
      .send({ decision: 'granted', note: 'Does not touch function.' })
      .expect(200);
    await story
      .mark(rows[0].characteristic.id, 0, { mark: 'accepted', deviationId: deviation.body.id })
      .expect(200);
    expect((await story.review('out')).rows[0].decision).toMatchObject({ mark: 'accepted', version: 1 });
  });

  it('runs out by itself after an interim approval and tells everyone once', async () => {
    const story = await inPreparation();
    await story.submitClean();
    const { rows } = await story.review();
    for (const row of rows) await story.mark(row.characteristic.id, 0, { mark: 'accepted' }).expect(200);
    const bare = await story.dispose({ outcome: 'interim-approval' });
    expect(bare.status).toBe(422);
    expect(bare.body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      '/endOn',
      '/conditions',
      '/containment',
    ]);
    const signed = await story.dispose({
      outcome: 'interim-approval',
      endOn: story.inDays(60),
      pieceLimit: 40_000,
      containment: '100 % check of bore 1',
      conditions: [{ text: 'New core', owner: 'Toolroom', dueOn: story.inDays(45) }],
    });
    expect(signed.status).toBe(201);
    expect(await story.buyingLine()).toMatchObject({ verdict: 'may-buy-within-limits', piecesLeft: 40_000 });
    const line = await story.buyingLine();
    await story.purchaser
      .post(`/api/buying-status/${line.id}/deliveries`)
      .set(onceKey())
      .send({ quantity: 500 })
      .expect(201);
    expect(await story.buyingLine()).toMatchObject({ piecesLeft: 39_500 });

    const need = { db: story.app.db, clock: story.app.clock, publicUrl: story.app.url };
    story.app.clock.advance(31 * DAY);
    expect(await runInterimClock(need)).toBe(1);
    expect(await runInterimClock(need)).toBe(0);
    story.app.clock.advance(29 * DAY);
    const purchaser = story.app;
    expect(await runInterimClock(need)).toBe(1);
    story.app.clock.advance(DAY);
    expect(await runInterimClock(need)).toBe(1);
    const mails = (await purchaser.mails()).filter((mail) => mail.kind === 'interim-stopped');
    expect(new Set(mails.map((mail) => mail.recipient)).size).toBe(mails.length);
    expect(mails.map((mail) => mail.recipient)).toContain(story.cast.purchaser.email);
  });

  it('signs what was shown: a reading changed in between is refused with the new digest', async () => {
    const story = await inPreparation();
    await story.prepareClean();
    const path = `/api/submissions/${story.submissionId}/warrant`;
    const seen = (await story.signer.get(path).expect(200)).body;
    expect(seen).toMatchObject({ blockers: [], findings: { stops: 0 } });
    await story.measure({ '3': { 'cavity 1': ['2.50', '2.55', '2.51'] } });
    const body = { password: testPassword, digest: seen.digest };
    const stale = await story.signer.post(`${path}/signature`).set(onceKey()).send(body).expect(412);
    expect(stale.body.current.digest).toBe((await story.signer.get(path).expect(200)).body.digest);
    expect(await story.head()).toMatchObject({ state: 'in-preparation', warrantSignature: null });
  });

  it('refuses the signature while anything stops submission, and whatever the package is, a wrong password', async () => {
    const story = await inPreparation();
    await story.measure({ '3': { 'cavity 1': ['2.50', '2.52', '2.51'] } });
    const path = `/api/submissions/${story.submissionId}/warrant`;
    const { digest, blockers } = (await story.signer.get(path).expect(200)).body;
    expect(blockers).toHaveLength(1);
    const refused = await story.signer
      .post(`${path}/signature`)
      .set(onceKey())
      .send({ password: testPassword, digest })
      .expect(409);
    expect(refused.body.detail).toMatch(/findings stop submission/);
    const wrong = await story.signer
      .post(`${path}/signature`)
      .set(onceKey())
      .send({ password: 'not this one at all', digest });
    expect(wrong.status).toBe(422);
    await story.supplier
      .post(`${path}/signature`)
      .set(onceKey())
      .send({ password: testPassword, digest })
      .expect(403);
  });

  it('submits once however often the button is pressed, and freezes what was submitted', async () => {
    const story = await inPreparation();
    await story.prepareClean();
    const key = onceKey();
    const [first, second] = [await story.sign(key), await story.sign(key)];
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(second.body).toEqual(first.body);
    const frozen = await story.supplier
      .put(`/api/submissions/${story.submissionId}/readings`)
      .send({ changes: [{ characteristicId: story.partId, pieceId: story.partId, text: '1', was: null }] })
      .expect(409);
    expect(frozen.body.detail).toMatch(/frozen/);
    await expect(
      story.app.db.writeTransaction((manager) =>
        manager.query("UPDATE characteristic_results SET readings = '9'"),
      ),
    ).rejects.toThrow();
    await expect(
      story.app.db.writeTransaction((manager) => manager.query('DELETE FROM sealed_packages')),
    ).rejects.toThrow();
  });
});
