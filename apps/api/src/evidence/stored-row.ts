import { randomUUID } from 'node:crypto';
import type { Verdict } from '@trammel/shared/status';
import type { CharacteristicFacts } from './characteristic-facts.ts';

export interface StoredRow {
  id: string;
  characteristicId: string;
  streamId: string;
  readings: string;
  marks: string;
  attributeChecked: number | null;
  attributeFailed: number | null;
  gaugeId: string | null;
  measuredOn: string | null;
  note: string;
  n: number;
  minimum: string | null;
  maximum: string | null;
  mean: number | null;
  standardDeviation: number | null;
  outCount: number;
  undecidedCount: number;
  verdict: Verdict;
  version: number;
}

export const storedRowColumns = `id, characteristic_id AS characteristicId, stream_id AS streamId, readings, marks,
  attribute_checked AS attributeChecked, attribute_failed AS attributeFailed, gauge_id AS gaugeId, measured_on AS measuredOn,
  note, n, minimum, maximum, mean, standard_deviation AS standardDeviation, out_count AS outCount,
  undecided_count AS undecidedCount, verdict, version`;

/** A row nothing is stored for yet. */
export function emptyRow(facts: Pick<CharacteristicFacts, 'id'>, streamId: string): StoredRow {
  return {
    id: randomUUID(),
    characteristicId: facts.id,
    streamId,
    readings: '',
    marks: '',
    attributeChecked: null,
    attributeFailed: null,
    gaugeId: null,
    measuredOn: null,
    note: '',
    n: 0,
    minimum: null,
    maximum: null,
    mean: null,
    standardDeviation: null,
    outCount: 0,
    undecidedCount: 0,
    verdict: 'not-measured',
    version: 0,
  };
}
