import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { BuyingStatusItem } from '@trammel/shared/buying-status';
import type { ReviewDeskItem } from '@trammel/shared/submissions';
import { runInterimClock } from '../features/buying-status/interim-clock.ts';
import { verifyAuditTrail } from '../database/verify-audit.ts';
import { signInAs, type Client } from '../testing/sign-in.ts';
import { createTestApp, type TestApp } from '../testing/test-app.ts';
import { mailOf } from './people.ts';
import { seedDemo } from './seed-demo.ts';

let app: TestApp;

beforeAll(async () => {
  app = await createTestApp({ closes: 'caller' });
  expect(await seedDemo(app.core, app.store)).toBe(true);
}, 120_000);
afterAll(() => app.close());

async function as(name: string, organisation: string): Promise<Client> {
  const [user]: { id: string }[] = await app.db.reader.query('SELECT id FROM users WHERE email = ?', [
    mailOf(name, organisation),
  ]);
  return signInAs(app, { id: user?.id ?? '' });
}

describe('the demo', () => {
  it('is seeded once only', async () => {
    expect(await seedDemo(app.core, app.store)).toBe(false);
  });

  it('ends its packages in the states of the scenario', async () => {
    const rows: { part: string; rev: string; round: number; state: string; supplier: string }[] =
      await app.db.reader.query(
        `SELECT s.part_number AS part, s.revision_code AS rev, s.round, s.state, o.name AS supplier FROM submissions s
       JOIN organisations o ON o.id = s.supplier_id ORDER BY part, supplier, rev, round`,
      );
    expect(
      rows.map((row) => `${row.part} ${row.rev} ${row.supplier} round ${row.round}: ${row.state}`),
    ).toEqual([
      'TD-20417 C Quillmark Turning round 1: approved',
      'TD-20418 A Quillmark Turning round 1: requested',
      'TD-20418 A Vesperholt Castings round 1: withdrawn',
      'TD-31880 B Oberlyn Polymers round 1: interim-approval',
      'TD-31895 A Oberlyn Polymers round 1: interim-approval',
      'TD-40256 A Askelund Stampings round 1: in-preparation',
      'TD-40256 A Dunmeric Pressings round 1: sent-back',
      'TD-40256 A Dunmeric Pressings round 2: submitted',
      'TD-52711 C Vesperholt Castings round 1: approved',
      'TD-52711 D Vesperholt Castings round 1: rejected',
      'TD-52711 D Vesperholt Castings round 2: approved',
    ]);
  });

  it('tells the buyer what may be bought, and holds what ran out', async () => {
    const buyer = await as('Ravi Stonelake', 'Tarnfell Drives');
    const list = (await buyer.get('/api/buying-status').expect(200)).body.items as BuyingStatusItem[];
    const verdicts = Object.fromEntries(
      list.map((item) => [`${item.partNumber} ${item.supplierName}`, item.verdict]),
    );
    expect(verdicts).toMatchObject({
      'TD-20417 Quillmark Turning': 'may-buy',
      'TD-31880 Oberlyn Polymers': 'may-buy-within-limits',
      'TD-31895 Oberlyn Polymers': 'hold',
      'TD-40256 Dunmeric Pressings': 'hold',
      'TD-40256 Askelund Stampings': 'hold',
      'TD-52711 Vesperholt Castings': 'may-buy-within-limits',
    });
    const cover = list.find((item) => item.partNumber === 'TD-31880');
    expect(cover).toMatchObject({
      piecesLeft: 40_000,
      toolingRelease: false,
      streamsCovered: ['cavity 1', 'cavity 2', 'cavity 4'],
    });
    expect(await runInterimClock({ db: app.db, clock: app.clock, publicUrl: app.url })).toBeGreaterThan(0);
    const [lapsed]: { state: string }[] = await app.db.reader.query(
      "SELECT state FROM submissions WHERE part_number = 'TD-31895'",
    );
    expect(lapsed?.state).toBe('lapsed');
  });

  it('judges each reading of the scenario as the scenario says', async () => {
    const reviewer = await as('Ines Carrow', 'Tarnfell Drives');
    const desk = (await reviewer.get('/api/review-desk?show=all&sort=partNumber').expect(200)).body
      .items as ReviewDeskItem[];
    const cover = desk.find((item) => item.partNumber === 'TD-31880');
    const review = (await reviewer.get(`/api/submissions/${cover?.id}/review?order=balloon`).expect(200))
      .body;
    const byStream = (balloon: string) => {
      const row = review.rows.find(
        (candidate: { characteristic: { balloon: string } }) => candidate.characteristic.balloon === balloon,
      );
      return Object.fromEntries(
        row.checked.map((checked: { stream: string; verdict: string }) => [checked.stream, checked.verdict]),
      );
    };
    expect(byStream('4')).toEqual({
      'cavity 1': 'in-tolerance',
      'cavity 2': 'in-tolerance',
      'cavity 3': 'out-of-tolerance',
      'cavity 4': 'in-tolerance',
    });
    expect(byStream('5')).toEqual({
      'cavity 1': 'in-tolerance',
      'cavity 2': 'in-tolerance',
      'cavity 3': 'out-of-tolerance',
      'cavity 4': 'in-tolerance',
    });
    expect(byStream('19')).toEqual({
      'cavity 1': 'no-verdict',
      'cavity 2': 'no-verdict',
      'cavity 3': 'no-verdict',
      'cavity 4': 'no-verdict',
    });
  });

  it('shows each source of the bracket nothing of the other', async () => {
    const nils = await as('Nils Orrey', 'Askelund Stampings');
    const list = await nils.get('/api/worklist?show=all').expect(200);
    expect(list.body.items).toHaveLength(1);
    expect(JSON.stringify(list.body)).not.toMatch(/Dunmeric/);
  });

  it('leaves an unbroken trail', async () => {
    expect(await verifyAuditTrail(app.db.reader, [])).toMatchObject({ sound: true });
  });
});
