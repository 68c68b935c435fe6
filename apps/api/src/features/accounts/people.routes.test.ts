import { describe, expect, it } from 'vitest';
import { DAY, HOUR } from '../../clock.ts';
import { buildCast, buildUser, testPassword } from '../../testing/builders.ts';
import { anonymous, ifVersion, onceKey, signInAs } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

async function scene() {
  const app = await createTestApp();
  const cast = await buildCast(app);
  return { app, cast, administrator: await signInAs(app, cast.customerAdministrator) };
}

const invitation = { name: 'Lin Okara', email: 'Lin@Works.example', roles: ['purchasing'] };
const strong = 'seven brass scribers in a drawer';

async function tokenIn(app: TestApp): Promise<string> {
  const text = (await app.mails()).at(-1)?.text ?? '';
  return /\/(?:invitation|password-reset)\/([\w-]+)/.exec(text)?.[1] ?? '';
}

describe('an invitation', () => {
  it('is sent by administrators, sets a password once and lets the person sign in', async () => {
    const { app, cast, administrator } = await scene();
    const reviewer = await signInAs(app, cast.reviewer);
    await anonymous(app).post('/api/people').set(onceKey()).send(invitation).expect(401);
    await reviewer.post('/api/people').set(onceKey()).send(invitation).expect(403);
    const invited = await administrator.post('/api/people').set(onceKey()).send(invitation).expect(201);
    expect(invited.body).toMatchObject({ email: 'lin@works.example', state: 'invited', version: 1 });
    const twice = await administrator.post('/api/people').set(onceKey()).send(invitation).expect(422);
    expect(twice.body.errors[0].pointer).toBe('/email');

    const token = await tokenIn(app);
    const visitor = anonymous(app);
    const state = await visitor.get(`/api/account-tokens/${token}`).expect(200);
    expect(state.body).toMatchObject({ kind: 'invitation', name: 'Lin Okara' });
    await visitor
      .post(`/api/account-tokens/${token}/password`)
      .send({ newPassword: 'too short 1234' })
      .expect(422);
    await visitor
      .post(`/api/account-tokens/${token}/password`)
      .send({ newPassword: 'lin okara lin okara' })
      .expect(422);
    await visitor.post(`/api/account-tokens/${token}/password`).send({ newPassword: strong }).expect(204);
    await visitor.post(`/api/account-tokens/${token}/password`).send({ newPassword: strong }).expect(404);
    await visitor.post('/api/session').send({ email: 'lin@works.example', password: strong }).expect(201);
    const people = await administrator.get('/api/people').expect(200);
    expect(people.body.items).toContainEqual(expect.objectContaining({ name: 'Lin Okara', state: 'active' }));
  });

  it('runs out after seven days and is replaced by the next', async () => {
    const { app, administrator } = await scene();
    const { id } = (await administrator.post('/api/people').set(onceKey()).send(invitation).expect(201)).body;
    const first = await tokenIn(app);
    await administrator.post(`/api/people/${id}/invitation`).set(onceKey()).expect(200);
    const second = await tokenIn(app);
    await anonymous(app).get(`/api/account-tokens/${first}`).expect(404);
    await anonymous(app).get(`/api/account-tokens/${second}`).expect(200);
    app.clock.advance(7 * DAY);
    await anonymous(app).get(`/api/account-tokens/${second}`).expect(404);
  });

  it('gives an address that is known elsewhere an account of its own', async () => {
    const { app, cast, administrator } = await scene();
    const known = await buildUser(app, cast.otherCustomer, ['purchasing']);
    await administrator
      .post('/api/people')
      .set(onceKey())
      .send({ ...invitation, email: known.email })
      .expect(201);
    await anonymous(app)
      .post(`/api/account-tokens/${await tokenIn(app)}/password`)
      .send({ newPassword: strong })
      .expect(204);
    const enter = (password: string) =>
      anonymous(app).post('/api/session').send({ email: known.email, password });
    expect((await enter(strong).expect(201)).body.organisation.id).toBe(cast.customer.id);
    expect((await enter(testPassword).expect(201)).body.organisation.id).toBe(cast.otherCustomer.id);
  });
});

describe('a person', () => {
  const change = { name: 'New Name', title: '', roles: ['purchasing'], maySign: false, disabled: false };

  it('is changed by administrators of the same organisation, on the version they saw', async () => {
    const { app, cast, administrator } = await scene();
    const path = `/api/people/${cast.reviewer.id}`;
    const reviewer = await signInAs(app, cast.reviewer);
    await administrator.put(path).send(change).expect(428);
    await administrator
      .put(`/api/people/${cast.otherReviewer.id}`)
      .set(ifVersion(1))
      .send(change)
      .expect(404);
    const changed = await administrator.put(path).set(ifVersion(1)).send(change).expect(200);
    expect(changed.headers.etag).toBe('"2"');
    const stale = await administrator.put(path).set(ifVersion(1)).send(change).expect(412);
    expect(stale.body.current).toMatchObject({ name: 'New Name', version: 2 });
    expect((await reviewer.get('/api/session').expect(200)).body.user.roles).toEqual(['purchasing']);

    await administrator
      .put(path)
      .set(ifVersion(2))
      .send({ ...change, disabled: true })
      .expect(200);
    await reviewer.get('/api/session').expect(401);
  });

  it('keeps its last administrator: nobody takes the role from themselves', async () => {
    const { cast, administrator } = await scene();
    await administrator
      .put(`/api/people/${cast.customerAdministrator.id}`)
      .set(ifVersion(1))
      .send(change)
      .expect(409);
  });
});

describe('a password', () => {
  it('is reset by mail with one answer for known and unknown addresses; all sessions end', async () => {
    const { app, cast } = await scene();
    const reviewer = await signInAs(app, cast.reviewer);
    const visitor = anonymous(app);
    await visitor.post('/api/password-resets').send({ email: 'nobody@works.example' }).expect(204);
    expect(await app.mails()).toEqual([]);
    await visitor
      .post('/api/password-resets')
      .send({ email: cast.reviewer.email })
      .set('Host', 'evil.example')
      .expect(204);
    const mail = (await app.mails())[0];
    expect(mail?.text).toContain(`${app.url}/password-reset/`);
    const token = await tokenIn(app);
    await reviewer.get('/api/session').expect(200);
    await visitor.post(`/api/account-tokens/${token}/password`).send({ newPassword: strong }).expect(204);
    await reviewer.get('/api/session').expect(401);
    const enter = (password: string) =>
      visitor.post('/api/session').send({ email: cast.reviewer.email, password });
    await enter(testPassword).expect(401);
    await enter(strong).expect(201);
    expect((await app.mails()).at(-1)?.subject).toBe('Your password was changed');
    await visitor.post('/api/password-resets').send({ email: cast.reviewer.email }).expect(204);
    app.clock.advance(HOUR);
    await visitor
      .post(`/api/account-tokens/${await tokenIn(app)}/password`)
      .send({ newPassword: strong })
      .expect(404);
  });

  it('is changed with the one in force and ends the other sessions', async () => {
    const { app, cast } = await scene();
    const [here, there] = await Promise.all([signInAs(app, cast.reviewer), signInAs(app, cast.reviewer)]);
    const send = (currentPassword: string) =>
      here.put('/api/account/password').send({ currentPassword, newPassword: strong });
    const refused = await send('not the password at all').expect(422);
    expect(refused.body.errors[0].pointer).toBe('/currentPassword');
    await send(testPassword).expect(204);
    await here.get('/api/session').expect(200);
    await there.get('/api/session').expect(401);
  });
});
