import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { HOUR, MINUTE, SECOND } from '../../clock.ts';
import { User } from '../../database/entities/user.entity.ts';
import { buildOrganisation, buildUser, testPassword } from '../../testing/builders.ts';
import { anonymous, signInAs } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

async function withPerson() {
  const app = await createTestApp();
  const user = await buildUser(app, await buildOrganisation(app), ['quality-reviewer'], { maySign: true });
  return { app, user };
}

const enter = (app: TestApp, email: string, password: string) =>
  anonymous(app).post('/api/session').send({ email, password });

describe('sign-in', () => {
  it('answers who is signed in and sets a cookie that scripts cannot read', async () => {
    const { app, user } = await withPerson();
    const answer = await enter(app, user.email, testPassword).expect(201);
    expect(answer.body).toMatchObject({ user: { id: user.id, roles: ['quality-reviewer'] } });
    expect(answer.body.permissions).toContain('disposition:sign');
    const cookie = String(answer.headers['set-cookie']);
    expect(cookie).toMatch(/^trammel=.*HttpOnly.*SameSite=Lax/);
    await request(app.server)
      .get('/api/session')
      .set('Cookie', cookie.split(';')[0] ?? '')
      .expect(200);
  });

  it('answers a wrong password and an unknown address with the same bytes', async () => {
    const { app, user } = await withPerson();
    const wrong = await enter(app, user.email, 'something else altogether').expect(401);
    const unknown = await enter(app, 'nobody@works.example', 'something else altogether').expect(401);
    expect({ ...unknown.body, instance: '' }).toEqual({ ...wrong.body, instance: '' });
    expect(Object.keys(unknown.headers)).toEqual(Object.keys(wrong.headers));
  });

  it('slows down from the fifth failure on, for known and unknown addresses alike, and never beyond 25 seconds', async () => {
    const { app, user } = await withPerson();
    for (const email of [user.email, 'somebody@works.example']) {
      for (let attempt = 0; attempt < 5; attempt += 1)
        await enter(app, email, 'wrong wrong wrong').expect(401);
      const slowed = await enter(app, email, testPassword).expect(429);
      expect(slowed.body.retryAfter).toBe(1);
    }
    await app.db.writeTransaction((manager) => manager.update(User, { id: user.id }, { failedAttempts: 30 }));
    app.clock.advance(SECOND + 1);
    await enter(app, user.email, 'wrong wrong wrong').expect(401);
    const late = await enter(app, user.email, testPassword).expect(429);
    expect(late.body.retryAfter).toBe(25);
    app.clock.advance(25 * SECOND + 1);
    await enter(app, user.email, testPassword).expect(201);
  });

  it('refuses a page of another origin', async () => {
    const { app, user } = await withPerson();
    const body = { email: user.email, password: testPassword };
    await request(app.server)
      .post('/api/session')
      .set('Origin', 'https://elsewhere.example')
      .send(body)
      .expect(403);
    await request(app.server).post('/api/session').send(body).expect(403);
    await request(app.server).post('/api/session').set('Sec-Fetch-Site', 'cross-site').send(body).expect(403);
  });
});

describe('a session', () => {
  it('ends after an hour without use and twelve hours at most', async () => {
    const { app, user } = await withPerson();
    const client = await signInAs(app, user);
    app.clock.advance(59 * MINUTE);
    await client.get('/api/session').expect(200);
    await expect.poll(() => lastSeen(app, client.sessionId)).toBe(app.clock.now());
    app.clock.advance(61 * MINUTE);
    await client.get('/api/session').expect(401);

    const busy = await signInAs(app, user);
    for (let minutes = 0; minutes < 12 * 60; minutes += 30) {
      await busy.get('/api/session').expect(200);
      await expect.poll(() => lastSeen(app, busy.sessionId)).toBe(app.clock.now());
      app.clock.advance(30 * MINUTE);
    }
    await busy.get('/api/session').expect(401);
  });

  it('is gone at the next request after signing out, here or everywhere, and when the person is disabled', async () => {
    const { app, user } = await withPerson();
    const [one, two, three] = await Promise.all([
      signInAs(app, user),
      signInAs(app, user),
      signInAs(app, user),
    ]);
    await one.delete('/api/session').expect(204);
    await one.get('/api/session').expect(401);
    await two.get('/api/session').expect(200);
    await two.delete('/api/sessions').expect(204);
    await three.get('/api/session').expect(401);

    const four = await signInAs(app, user);
    await app.db.writeTransaction((manager) =>
      manager.update(User, { id: user.id }, { disabledAt: app.clock.now() }),
    );
    await four.get('/api/session').expect(401);
  });

  it('needs the token of its own page for every change', async () => {
    const { app, user } = await withPerson();
    const [one, two] = await Promise.all([signInAs(app, user), signInAs(app, user)]);
    await one.delete('/api/session').set('X-CSRF-Token', '').expect(403);
    const token = (await two.get('/api/session')).body.csrfToken as string;
    await one.delete('/api/session').set('X-CSRF-Token', token).expect(403);
  });

  it('of somebody else is not found', async () => {
    const { app, user } = await withPerson();
    const stranger = await buildUser(app, await buildOrganisation(app), ['purchasing']);
    const theirs = await signInAs(app, stranger);
    const mine = await signInAs(app, user);
    await mine.delete(`/api/sessions/${theirs.sessionId}`).expect(404);
    await theirs.get('/api/session').expect(200);
    app.clock.advance(HOUR - 1);
    const list = await mine.get('/api/sessions').expect(200);
    expect(list.body.items).toMatchObject([{ id: mine.sessionId, current: true }]);
  });
});

async function lastSeen(app: TestApp, sessionId: string): Promise<string | undefined> {
  const rows = await app.db.reader.query<{ last_seen_at: string }[]>(
    'SELECT last_seen_at FROM sessions WHERE id = ?',
    [sessionId],
  );
  return rows[0]?.last_seen_at;
}
