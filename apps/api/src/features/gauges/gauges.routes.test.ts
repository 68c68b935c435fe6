import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildCast, type Cast } from '../../testing/builders.ts';
import { anonymous, ifVersion, signInAs, type Client } from '../../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../../testing/test-app.ts';

let app: TestApp;
let cast: Cast;
let supplier: Client;
let stranger: Client;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  cast = await buildCast(app);
  supplier = await signInAs(app, cast.supplierQuality);
  stranger = await signInAs(app, cast.otherSupplierQuality);
});
afterAll(() => app.close());

const gauge = { code: 'M-12', kind: 'Micrometer 0-25', resolution: '0.001', dueOn: '2026-08-01' };

describe('gauges', () => {
  it('are kept by suppliers, and each organisation has its own', async () => {
    const reviewer = await signInAs(app, cast.reviewer);
    await anonymous(app).get('/api/gauges').expect(401);
    await reviewer.get('/api/gauges').expect(403);
    await reviewer.post('/api/gauges').send(gauge).expect(403);
    const added = await supplier.post('/api/gauges').send(gauge).expect(201);
    await stranger.post('/api/gauges').send(gauge).expect(201);
    const put = (client: Client, id: string) => client.put(`/api/gauges/${id}`).set(ifVersion(1)).send(gauge);
    const foreign = await put(stranger, added.body.id as string).expect(404);
    const never = await put(stranger, randomUUID()).expect(404);
    expect({ ...foreign.body, instance: '' }).toEqual({ ...never.body, instance: '' });
    expect((await stranger.get('/api/gauges').expect(200)).body.items).toHaveLength(1);
  });

  it('have a code used once, and dates and resolution that can be', async () => {
    const place = async (body: object) => {
      const answer = await supplier.post('/api/gauges').send(body).expect(422);
      return answer.body.errors.map((error: { pointer: string }) => error.pointer) as string[];
    };
    expect(await place(gauge)).toEqual(['/code']);
    expect(await place({ ...gauge, code: 'M-13', calibratedOn: '2026-09-01' })).toEqual(['/dueOn']);
    expect(await place({ ...gauge, code: 'M-13', resolution: '0.000' })).toEqual(['/resolution']);
    expect(await place({ ...gauge, code: 'M-13', resolution: '1e-3' })).toEqual(['/resolution']);
    const race = await Promise.all([
      supplier.post('/api/gauges').send({ ...gauge, code: 'M-20' }),
      supplier.post('/api/gauges').send({ ...gauge, code: 'M-20' }),
    ]);
    expect(race.map((answer) => answer.status).sort()).toEqual([201, 422]);
  });

  it('change with the version that was read, and are listed by code or due date', async () => {
    const added = await supplier
      .post('/api/gauges')
      .send({ ...gauge, code: 'A-1', dueOn: null })
      .expect(201);
    const put = (version: number) =>
      supplier
        .put(`/api/gauges/${added.body.id as string}`)
        .set(ifVersion(version))
        .send({ ...gauge, code: 'A-1', dueOn: '2026-03-01' });
    await supplier
      .put(`/api/gauges/${added.body.id as string}`)
      .send(gauge)
      .expect(428);
    expect((await put(1).expect(200)).body).toMatchObject({ dueOn: '2026-03-01', version: 2 });
    expect((await put(1).expect(412)).body.current.version).toBe(2);
    const codes = async (query: string) =>
      (await supplier.get(`/api/gauges${query}`).expect(200)).body.items.map(
        (item: { code: string }) => item.code,
      ) as string[];
    expect(await codes('')).toEqual(['A-1', 'M-12', 'M-20']);
    expect(await codes('?sort=-code&limit=2')).toEqual(['M-20', 'M-12']);
    expect((await codes('?sort=dueOn'))[0]).toBe('A-1');
    expect(await codes('?q=m-2')).toEqual(['M-20']);
  });
});
