import { describe, expect, it } from 'vitest';
import { buildCast, buildUser } from '../../testing/builders.ts';
import { anonymous, onceKey, signInAs } from '../../testing/sign-in.ts';
import { createTestApp } from '../../testing/test-app.ts';

async function scene() {
  const app = await createTestApp();
  const cast = await buildCast(app);
  return { app, cast, administrator: await signInAs(app, cast.customerAdministrator) };
}

const invitation = {
  organisationName: 'Brightwater Springs',
  siteName: 'Works 2',
  contactName: 'Ada Fell',
  contactEmail: 'ada@brightwater.example',
};

describe('sites', () => {
  it('are added by administrators only, once by each name', async () => {
    const { app, cast, administrator } = await scene();
    const reviewer = await signInAs(app, cast.reviewer);
    await anonymous(app).post('/api/organisation/sites').send({ name: 'North' }).expect(401);
    await reviewer.post('/api/organisation/sites').send({ name: 'North' }).expect(403);
    const unknown = await administrator
      .post('/api/organisation/sites')
      .send({ organisationId: 'x' })
      .expect(422);
    expect(unknown.body.errors).toEqual([
      { pointer: '/name', detail: 'Fill this in.' },
      { pointer: '/organisationId', detail: 'There is no such field here.' },
    ]);
    await administrator.post('/api/organisation/sites').send({ name: 'North' }).expect(201);
    const twice = await administrator.post('/api/organisation/sites').send({ name: 'North' }).expect(422);
    expect(twice.body.errors[0].pointer).toBe('/name');
    const own = await reviewer.get('/api/organisation').expect(200);
    expect(own.body.sites.map((site: { name: string }) => site.name)).toEqual(['Main works', 'North']);
  });
});

describe('suppliers', () => {
  it('are listed for the customer they deliver to and for nobody else', async () => {
    const { app, cast, administrator } = await scene();
    const listed = await administrator.get('/api/suppliers').expect(200);
    expect(listed.body.items.map((item: { id: string }) => item.id).sort()).toEqual(
      [cast.supplier.id, cast.otherSupplier.id].sort(),
    );
    const stranger = await signInAs(app, cast.otherReviewer);
    expect((await stranger.get('/api/suppliers').expect(200)).body.items).toEqual([]);
    const purchaser = await signInAs(app, cast.purchaser);
    await purchaser.get('/api/suppliers').expect(403);
  });

  it('are invited once, by mail, however often the button is pressed', async () => {
    const { app, administrator } = await scene();
    await administrator.post('/api/suppliers').send(invitation).expect(400);
    const key = onceKey();
    const presses = await Promise.all(
      [1, 2, 3].map(() => administrator.post('/api/suppliers').set(key).send(invitation)),
    );
    // A press that came too early is told to wait; one that came later gets the answer of the first.
    for (const press of presses) expect([201, 409]).toContain(press.status);
    const again = await administrator.post('/api/suppliers').set(key).send(invitation).expect(201);
    for (const press of presses.filter(({ status }) => status === 201))
      expect(press.body).toEqual(again.body);
    expect(again.headers['idempotent-replayed']).toBe('true');
    await administrator
      .post('/api/suppliers')
      .set(key)
      .send({ ...invitation, siteName: 'Works 3' })
      .expect(422);
    const mails = await app.mails();
    expect(mails.map((mail) => mail.recipient)).toEqual(['ada@brightwater.example']);
    const items = (await administrator.get('/api/suppliers').expect(200)).body.items;
    expect(items).toContainEqual(expect.objectContaining({ name: 'Brightwater Springs', state: 'invited' }));
  });

  it('answers alike for an address that is known to another customer', async () => {
    const { app, cast, administrator } = await scene();
    const known = await buildUser(app, cast.otherCustomer, ['administrator']);
    const answer = await administrator
      .post('/api/suppliers')
      .set(onceKey())
      .send({ ...invitation, contactEmail: known.email })
      .expect(201);
    expect(JSON.stringify(answer.body)).not.toContain(cast.otherCustomer.name);
    expect(answer.body.state).toBe('invited');
  });

  it('leave nothing behind when the invitation fails half-way', async () => {
    const { app, administrator } = await scene();
    await app.db.writeTransaction((manager) =>
      manager.query(
        `CREATE TRIGGER broken BEFORE INSERT ON outbox_mails BEGIN SELECT RAISE(ABORT, 'no mail'); END`,
      ),
    );
    const before = await counts(app.db.reader);
    await administrator.post('/api/suppliers').set(onceKey()).send(invitation).expect(500);
    expect(await counts(app.db.reader)).toEqual(before);
  });
});

async function counts(reader: { query<T>(sql: string): Promise<T> }) {
  return reader.query(
    `SELECT (SELECT COUNT(*) FROM organisations) AS organisations, (SELECT COUNT(*) FROM users) AS users,
       (SELECT COUNT(*) FROM audit_events) AS events, (SELECT COUNT(*) FROM idempotency_keys) AS keys`,
  );
}
