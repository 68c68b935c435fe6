import { expect, it } from 'vitest';
import { DAY } from '../../clock.ts';
import { buildScene, draftRequest, issueDraft, placeRound } from '../../testing/package-builders.ts';
import { signInAs } from '../../testing/sign-in.ts';
import { createTestApp } from '../../testing/test-app.ts';
import { sendReminders } from './reminders.ts';

it('reminds the supplier once at each step, and the buyer when it is overdue', async () => {
  const app = await createTestApp();
  const scene = await buildScene(app);
  const issued = await issueDraft(scene.reviewer, await draftRequest(scene, { dueOn: '2026-03-30' }));
  const submissionId = issued.rounds[0]?.id ?? '';
  const run = () => sendReminders({ db: app.db, clock: app.clock, publicUrl: app.url });
  const kindsOf = async (recipient: string) =>
    (await app.mails())
      .filter((mail) => mail.recipient === recipient && mail.kind.startsWith('submission-'))
      .map((mail) => mail.kind);
  const { supplierQuality, purchaser } = scene.cast;

  expect(await run()).toBe(0);
  app.clock.advance(3 * DAY);
  expect(await run()).toBe(1);
  const supplier = await signInAs(app, supplierQuality);
  await supplier.post(`/api/requests/${issued.id}/acknowledge`).expect(200);
  app.clock.set('2026-03-16T06:00:00.000Z');
  expect(await Promise.all([run(), run()])).toContain(1);
  expect(await run()).toBe(0);
  app.clock.set('2026-03-31T06:00:00.000Z');
  expect(await run()).toBe(1);
  expect(await kindsOf(supplierQuality.email)).toEqual([
    'submission-not-acknowledged',
    'submission-due-14',
    'submission-overdue',
  ]);
  expect(await kindsOf(purchaser.email)).toEqual(['submission-overdue']);
  const [due] = (await app.mails()).filter((mail) => mail.kind === 'submission-due-14');
  expect(due?.text).toContain('in 14 days');
  expect(due?.text).toContain('Rows not measured: 4');

  app.clock.advance(30 * DAY);
  await placeRound(app, submissionId, { desk: 'customer', state: 'submitted' });
  expect(await run()).toBe(0);
});
