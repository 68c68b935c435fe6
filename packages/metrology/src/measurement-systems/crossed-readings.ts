import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { isUsableReading } from './usable-reading.ts';

/** Readings of a crossed gauge study: `readings[part][appraiser][trial]`, every cell with the same number of trials. */
export type CrossedReadings = readonly (readonly (readonly number[])[])[];

/** One reading as it is recorded, before it is arranged. */
export interface GaugeRecord {
  readonly part: string;
  readonly appraiser: string;
  readonly value: number;
}

export interface StudySize {
  readonly parts: number;
  readonly appraisers: number;
  readonly trials: number;
  readonly n: number;
}

export interface ArrangedStudy {
  readonly parts: readonly string[];
  readonly appraisers: readonly string[];
  readonly readings: CrossedReadings;
}

/**
 * Sorts recorded readings into the block a crossed study needs, parts and appraisers in the order they first appear, trials in recorded order.
 * Undetermined when a cell is missing or has another number of trials than the rest: the reason names the part and the appraiser.
 */
export function arrangeCrossed(records: readonly GaugeRecord[]): ArrangedStudy | Undetermined {
  const parts = [...new Set(records.map((record) => record.part))];
  const appraisers = [...new Set(records.map((record) => record.appraiser))];
  const cells = new Map<string, number[]>();
  for (const record of records) {
    const key = JSON.stringify([record.part, record.appraiser]);
    const cell = cells.get(key);
    if (cell) cell.push(record.value);
    else cells.set(key, [record.value]);
  }
  const readings = parts.map((part) =>
    appraisers.map((appraiser) => cells.get(JSON.stringify([part, appraiser])) ?? []),
  );
  let trials = 0;
  for (const cell of cells.values()) trials = Math.max(trials, cell.length);
  for (const [partPlace, row] of readings.entries()) {
    for (const [appraiserPlace, cell] of row.entries()) {
      if (cell.length !== trials) {
        return undetermined(
          'unbalanced',
          `Part ${parts[partPlace]} has ${cell.length} readings by ${appraisers[appraiserPlace]} where other cells have ${trials}`,
        );
      }
    }
  }
  const size = sizeOfCrossed(readings);
  return 'undetermined' in size ? size : { parts, appraisers, readings };
}

/** Checks a block of readings: balanced, finite, at least two parts. */
export function sizeOfCrossed(readings: CrossedReadings): StudySize | Undetermined {
  const parts = readings.length;
  const appraisers = readings[0]?.length ?? 0;
  const trials = readings[0]?.[0]?.length ?? 0;
  if (parts < 2 || appraisers < 1 || trials < 1) {
    return undetermined(
      'too-few',
      'A gauge study needs at least two parts, one appraiser and one reading each',
    );
  }
  for (const [part, row] of readings.entries()) {
    if (row.length !== appraisers || row.some((cell) => cell.length !== trials)) {
      return undetermined(
        'unbalanced',
        `Part ${part + 1} does not have ${trials} readings by each of ${appraisers} appraisers`,
      );
    }
    for (const cell of row) {
      if (!cell.every(isUsableReading))
        return undetermined('not-finite', `Part ${part + 1} has a reading that is not a number`);
    }
  }
  return { parts, appraisers, trials, n: parts * appraisers * trials };
}
