import { createHmac, generateKeyPairSync } from 'node:crypto';
import jwt from 'jsonwebtoken';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildOrganisation, buildUser } from '../testing/builders.ts';
import { signInAs } from '../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../testing/test-app.ts';
import { purposeKey } from './authenticate.ts';

let app: TestApp;
let sid: string;
let key: Buffer;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  const person = await buildUser(app, await buildOrganisation(app), ['quality-reviewer']);
  sid = (await signInAs(app, person)).sessionId;
  key = purposeKey(app.config.secrets.session, 'session token');
});
afterAll(() => app.close());

const seconds = () => Math.floor(app.clock.millis() / 1000);
const claims = () => ({ sid, use: 'session', iat: seconds(), nbf: seconds(), exp: seconds() + 3600 });
const good = { algorithm: 'HS256', issuer: 'trammel', audience: 'trammel-portal' } as const;
const status = async (token: string, name = 'trammel') =>
  (await request(app.server).get('/api/session').set('Cookie', `${name}=${token}`)).status;

const encode = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
function forged(header: object, payload: object, secret: Buffer | string = key): string {
  const body = `${encode(header)}.${encode(payload)}`;
  return `${body}.${createHmac('sha256', secret).update(body).digest('base64url')}`;
}
const full = () => ({ ...claims(), iss: 'trammel', aud: 'trammel-portal' });

describe('a session token', () => {
  it('is taken as it was issued', async () => {
    expect(await status(jwt.sign(claims(), key, good))).toBe(200);
    expect(await status(forged({ alg: 'HS256', typ: 'JWT' }, full()))).toBe(200);
  });

  const rsa = generateKeyPairSync('rsa', { modulusLength: 2048 });
  const publicPem = rsa.publicKey.export({ type: 'spki', format: 'pem' }).toString();
  const hostile: Record<string, () => string> = {
    nothing: () => '',
    'no token at all': () => 'abc',
    'three dots': () => '...',
    unsigned: () => `${encode({ alg: 'none' })}.${encode(full())}.`,
    'unsigned, spelt otherwise': () => `${encode({ alg: 'NoNe' })}.${encode(full())}.`,
    'signature cut off': () => jwt.sign(claims(), key, good).replace(/[^.]+$/, ''),
    'signature changed': () => jwt.sign(claims(), key, good).replace(/.{4}$/, 'AAAA'),
    'payload changed': () => {
      const [header, , signature] = jwt.sign(claims(), key, good).split('.');
      return `${header}.${encode({ ...full(), exp: seconds() + 9e6 })}.${signature}`;
    },
    'another key': () => jwt.sign(claims(), Buffer.alloc(32, 9), good),
    'an empty key': () => forged({ alg: 'HS256' }, full(), ''),
    'the root secret itself': () => jwt.sign(claims(), app.config.secrets.session, good),
    'the key of page tokens': () => jwt.sign(claims(), app.core.authentication.csrfKey, good),
    HS384: () => jwt.sign(claims(), key, { ...good, algorithm: 'HS384' }),
    HS512: () => jwt.sign(claims(), key, { ...good, algorithm: 'HS512' }),
    RS256: () => jwt.sign(claims(), rsa.privateKey, { ...good, algorithm: 'RS256' }),
    'RS256 turned to HS256': () => forged({ alg: 'HS256' }, full(), publicPem),
    'a key id that is a path': () => forged({ alg: 'HS256', kid: '../../dev/null' }, full(), ''),
    'a key in its own header': () =>
      forged({ alg: 'HS256', jwk: { kty: 'oct', k: 'AA' } }, full(), Buffer.from([0])),
    'a key at an address': () => forged({ alg: 'HS256', jku: 'https://evil.example/keys' }, full(), 'evil'),
    'another issuer': () => jwt.sign(claims(), key, { ...good, issuer: 'elsewhere' }),
    'another audience': () => jwt.sign(claims(), key, { ...good, audience: 'elsewhere' }),
    'another use': () => jwt.sign({ ...claims(), use: 'reset' }, key, good),
    'no use': () => jwt.sign({ ...claims(), use: undefined }, key, good),
    'run out': () => jwt.sign({ ...claims(), exp: seconds() - 31 }, key, good),
    'not yet valid': () => jwt.sign({ ...claims(), nbf: seconds() + 31 }, key, good),
    'no end': () => forged({ alg: 'HS256' }, { ...full(), exp: undefined }),
    'an end that is text': () => forged({ alg: 'HS256' }, { ...full(), exp: 'never' }),
    'no session': () => jwt.sign({ ...claims(), sid: undefined }, key, good),
    'an unknown session': () => jwt.sign({ ...claims(), sid: 'x' }, key, good),
    'a session that is an object': () => jwt.sign({ ...claims(), sid: { $ne: '' } }, key, good),
  };

  it.each(Object.keys(hostile))('is refused: %s', async (name) => {
    expect(await status(hostile[name]?.() ?? '')).toBe(401);
  });

  it('is taken from its own cookie only', async () => {
    const token = jwt.sign(claims(), key, good);
    expect(await status(token, '__Host-trammel')).toBe(401);
    expect(
      (await request(app.server).get('/api/session').set('Authorization', `Bearer ${token}`)).status,
    ).toBe(401);
    expect((await request(app.server).get(`/api/session?token=${token}`)).status).toBe(401);
  });

  it('travels over https in a cookie bound to this host', async () => {
    const secure = await createTestApp({ env: { PUBLIC_URL: 'https://parts.example' } });
    const person = await buildUser(secure, await buildOrganisation(secure), ['purchasing']);
    const answer = await request(secure.server)
      .post('/api/session')
      .set('Origin', 'https://parts.example')
      .send({ email: person.email, password: 'measure twice and cut once' })
      .expect(201);
    expect(String(answer.headers['set-cookie'])).toMatch(
      /^__Host-trammel=[^;]+; Max-Age=43200; Path=\/; .*HttpOnly; Secure; SameSite=Lax$/,
    );
    expect(answer.headers['strict-transport-security']).toBe('max-age=63072000; includeSubDomains');
  });
});
