import { describe, expect, it } from 'vitest';
import { routeCardLine, type RoundFacts } from './route-card.rules.ts';

const stamp = (who: string, at = '2026-11-02T08:00:00.000Z') => ({ who, at });

const preparing: RoundFacts = {
  submissionId: '5f0f3d1e-0000-4000-8000-000000000001',
  round: 1,
  state: 'in-preparation',
  customerName: 'Tarnfell Drives',
  supplierName: 'Quillmark Turning',
  issued: stamp('Ines Carrow'),
  started: stamp('Joana Pell'),
  measured: { done: 20, of: 32 },
  evidence: { open: 2 },
  checked: { at: null, stops: 3 },
  warrant: null,
  review: { startedAt: null },
  decision: null,
  resultsVisible: true,
};

const statesOf = (facts: RoundFacts) => routeCardLine(facts).stations.map((line) => line.state);

describe('a line of the route card', () => {
  it('has the seven stations in their order', () => {
    expect(routeCardLine(preparing).stations.map((line) => line.station)).toEqual([
      'request',
      'measurements',
      'evidence',
      'check',
      'warrant',
      'review',
      'disposition',
    ]);
  });

  it('has the request in the hands of the supplier until it is acknowledged', () => {
    const line = routeCardLine({ ...preparing, state: 'requested', started: null });
    expect(line.stations[0]).toMatchObject({
      state: 'in-hand',
      who: 'Quillmark Turning',
      note: 'To acknowledge',
    });
    expect(line.stations.slice(1).every((station) => station.state === 'ahead')).toBe(true);
  });

  it('stamps a finished station with who and when', () => {
    expect(routeCardLine(preparing).stations[0]).toEqual({
      station: 'request',
      state: 'done',
      who: 'Joana Pell',
      at: '2026-11-02T08:00:00.000Z',
      note: 'Issued by Ines Carrow',
    });
  });

  it('has exactly one station in hand while work goes on', () => {
    expect(statesOf(preparing)).toEqual(['done', 'in-hand', 'ahead', 'ahead', 'ahead', 'ahead', 'ahead']);
    const measured = { ...preparing, measured: { done: 32, of: 32 } };
    expect(statesOf(measured).slice(0, 4)).toEqual(['done', 'done', 'in-hand', 'ahead']);
  });

  it('tells the customer before submission how far it is, not what the check says', () => {
    const line = routeCardLine({
      ...preparing,
      measured: { done: 32, of: 32 },
      evidence: { open: 0 },
      resultsVisible: false,
    });
    expect(line.stations[1]).toMatchObject({
      state: 'done',
      who: 'Quillmark Turning',
      at: null,
      note: '32 of 32 rows',
    });
    expect(line.stations[3]).toMatchObject({ station: 'check', state: 'in-hand', note: null });
  });

  it('moves to the customer with the signature', () => {
    const line = routeCardLine({ ...preparing, state: 'submitted', warrant: stamp('Henrik Sall') });
    expect(line.stations.map((station) => station.state)).toEqual([
      'done',
      'done',
      'done',
      'done',
      'done',
      'in-hand',
      'ahead',
    ]);
    expect(line.stations[5]).toMatchObject({ who: 'Tarnfell Drives', note: 'Waiting' });
  });

  it('is finished by the disposition, whose outcome it says', () => {
    const line = routeCardLine({
      ...preparing,
      state: 'interim-approval',
      warrant: stamp('Henrik Sall'),
      decision: stamp('Mirela Haddow'),
    });
    expect(line.stations.every((station) => station.state === 'done')).toBe(true);
    expect(line.stations[6]?.note).toBe('Interim approval');
  });

  it('skips what a withdrawn package never reached', () => {
    expect(statesOf({ ...preparing, state: 'withdrawn' })).toEqual([
      'done',
      'skipped',
      'skipped',
      'skipped',
      'skipped',
      'skipped',
      'skipped',
    ]);
  });
});
