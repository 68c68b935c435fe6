import { randomUUID } from 'node:crypto';
import type { CheckInputs } from '../src/evidence/check-inputs.ts';
import type { CharacteristicFacts } from '../src/evidence/characteristic-facts.ts';
import type { Characteristics, Piece, Stream } from '../src/evidence/package-context.ts';
import { emptyRow } from '../src/evidence/stored-row.ts';
import { rowsFor } from './readings.ts';

/** A package of so many characteristics and pieces in one stream, everything measured and in tolerance but a few. */
export function packageInputs(count: number, pieceCount: number): CheckInputs {
  const list: CharacteristicFacts[] = Array.from({ length: count }, (_, index) => ({
    id: randomUUID(),
    sequence: index + 1,
    balloon: String(index + 1),
    sheet: '1',
    zone: 'A1',
    description: `Feature ${index + 1}`,
    kind: 'size',
    class: index % 20 === 0 ? 'significant' : 'none',
    unit: 'mm',
    decimals: 3,
    nominal: '25.000',
    lowerLimit: '24.950',
    upperLimit: '25.050',
    naturalLower: false,
    geometric: null,
    attributeAllowed: false,
    method: '',
    pieces: null,
    controlledBy: [],
  }));
  const characteristics: Characteristics = {
    list,
    byId: new Map(list.map((facts) => [facts.id, facts])),
    byBalloon: new Map(list.map((facts) => [facts.balloon, facts])),
    dependents: new Map(),
  };
  const stream: Stream = {
    id: randomUUID(),
    name: 'line 1',
    sequence: 1,
    blocked: false,
    blockedReason: '',
    version: 1,
  };
  const pieces: Piece[] = Array.from({ length: pieceCount }, (_, slot) => ({
    id: randomUUID(),
    streamId: stream.id,
    slot,
    label: String(slot + 1),
    madeOn: null,
    lot: '',
    version: 1,
  }));
  const gauge = {
    id: randomUUID(),
    code: 'CMM',
    resolution: '0.001',
    unit: 'mm',
    calibratedOn: '2026-01-01',
    dueOn: '2027-01-01',
  };
  const texts = rowsFor(count, pieceCount);
  return {
    submission: {
      id: randomUUID(),
      round: 1,
      partNumber: 'TD-1',
      revisionCode: 'A',
      revisionState: 'released',
      newestRevision: 'A',
      drawingSha256: null,
    },
    rules: { decisionRule: { kind: 'simple' }, roundingRule: 'absolute', piecesPerStream: pieceCount },
    characteristics,
    streams: [stream],
    pieces,
    rows: list.map((facts, index) => ({
      ...emptyRow(facts, stream.id),
      readings: texts[index] ?? '',
      gaugeId: gauge.id,
      measuredOn: '2026-06-01',
      version: 1,
    })),
    gauges: new Map([[gauge.id, gauge]]),
    elements: [],
    deviations: [],
    warrant: {
      runOn: '2026-05-30',
      runHours: '4',
      runQuantity: 1000,
      partMassKg: null,
      productionTool: '',
      materialReport: '',
      exceptions: '',
      comment: '',
    },
    today: '2026-06-02',
  };
}
