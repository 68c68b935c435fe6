import type { CheckedRow } from '@trammel/shared/checks';
import { hasVerdict, type CharacteristicFacts } from '../../evidence/characteristic-facts.ts';
import type { Stream } from '../../evidence/package-context.ts';
import { judgeRows } from '../../evidence/row-checks.ts';
import type { ReportScene } from './report-scene.ts';
import { verdictOfMark } from './report-words.ts';
import type { Verdict } from '@trammel/shared/status';

export interface ReportReading {
  readonly piece: string;
  /** As it was typed; null where the piece was not measured. */
  readonly text: string | null;
  readonly verdict: Verdict;
}

export interface ReportRow {
  readonly facts: CharacteristicFacts;
  readonly stream: Stream;
  readonly checked: CheckedRow;
  readonly readings: readonly ReportReading[];
  /** Checked and failed pieces where they were counted and not noted one by one. */
  readonly counted: { readonly checked: number; readonly failed: number } | null;
}

/**
 * Rows in drawing order. Readings and marks come from the stored texts; verdict and figures of a sealed round are those
 * of its official check, whatever a later method would say.
 */
export function reportRows({
  inputs,
  officialRows,
}: Pick<ReportScene, 'inputs' | 'officialRows'>): ReportRow[] {
  const key = (row: CheckedRow) => `${row.characteristicId} ${row.streamId}`;
  const stored = officialRows === null ? [] : (JSON.parse(officialRows) as CheckedRow[]);
  const official = new Map(stored.map((row) => [key(row), row]));
  const pieces = new Map(
    inputs.streams.map((stream) => [
      stream.id,
      inputs.pieces.filter((piece) => piece.streamId === stream.id),
    ]),
  );
  return judgeRows(inputs).map(({ facts, stream, stored: row, texts, marks, checked }) => {
    const shown = official.get(key(checked)) ?? checked;
    const read = texts();
    const listed = (pieces.get(stream.id) ?? []).map(({ label, slot }) => ({
      piece: label,
      text: read[slot] ?? null,
      verdict: verdictOfMark(marks[slot]),
    }));
    const measured = listed.filter((reading) => reading.text !== null).length;
    const owed = hasVerdict(facts) && row.attributeChecked === null ? shown.required : 0;
    let gaps = Math.max(0, owed - measured);
    const readings = listed.filter((reading) => reading.text !== null || (gaps -= 1) >= 0);
    const counted =
      measured === 0 && row.attributeChecked !== null
        ? { checked: row.attributeChecked, failed: row.attributeFailed ?? 0 }
        : null;
    return { facts, stream, checked: shown, readings, counted };
  });
}

export function rowCounts(rows: readonly ReportRow[]) {
  const covered = rows.filter((row) => !row.stream.blocked);
  const of = (verdict: Verdict) => covered.filter((row) => row.checked.verdict === verdict).length;
  return {
    inTolerance: of('in-tolerance'),
    out: of('out-of-tolerance'),
    undecided: of('undecided'),
    notMeasured: of('not-measured'),
  };
}
