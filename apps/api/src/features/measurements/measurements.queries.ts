import type { DataSource } from 'typeorm';
import type { MeasurementSheetResponse } from '@trammel/shared/measurements';
import { readStatement } from '../../database/raw.ts';
import {
  characteristicsOf,
  judgingRules,
  piecesOf,
  streamsOf,
  type Prepare,
} from '../../evidence/package-context.ts';
import { presentCharacteristic, presentRow, slotsByStream } from '../../evidence/row-presenter.ts';
import { storedRowColumns, type StoredRow } from '../../evidence/stored-row.ts';

export interface SheetPage {
  readonly after: number;
  readonly limit: number;
}

/** One page of the measurement sheet, by the order of the drawing: six statements, however many rows. */
export function findSheet(
  reader: DataSource,
  submission: { id: string; requestId: string; revisionId: string },
  page: SheetPage,
  editable: boolean,
): MeasurementSheetResponse {
  const prepare: Prepare = (sql) => readStatement(reader, sql);
  const { list } = characteristicsOf(prepare, submission.revisionId);
  const rules = judgingRules(prepare, submission.requestId);
  const pieces = piecesOf(prepare, submission.id);
  const following = list.filter((facts) => facts.sequence > page.after);
  const shown = following.slice(0, page.limit);
  const last = shown.at(-1);
  const rows = prepare(
    `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ? AND characteristic_id IN
       (SELECT id FROM characteristics WHERE revision_id = ? AND sequence > ? AND sequence <= ?)`,
  ).all(submission.id, submission.revisionId, page.after, last?.sequence ?? page.after) as StoredRow[];
  const slots = slotsByStream(pieces);
  return {
    streams: streamsOf(prepare, submission.id),
    pieces: pieces.map(({ slot, ...piece }) => ({ ...piece, sequence: slot + 1 })),
    characteristics: shown.map((facts) => presentCharacteristic(facts, rules)),
    rows: rows.map((row) => presentRow(row, slots)),
    next: following.length > shown.length && last ? last.sequence : null,
    total: list.length,
    editable,
  };
}
