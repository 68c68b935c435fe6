import type { EntityManager } from 'typeorm';
import type { Verdict } from '@trammel/shared/status';
import { writeStatement } from '../database/raw.ts';
import { sizeBalloonOf, type CharacteristicFacts } from './characteristic-facts.ts';
import { evaluateRow, type RowEvaluation } from './evaluate-row.ts';
import {
  characteristicsOf,
  judgingRules,
  limitCompiler,
  requiredPieces,
  type Characteristics,
  type JudgingRules,
  type Prepare,
} from './package-context.ts';
import { decodeReadings, encodeReadings } from './readings-text.ts';
import { emptyRow, storedRowColumns, type StoredRow } from './stored-row.ts';

export interface WritingScope {
  readonly submissionId: string;
  readonly requestId: string;
  readonly revisionId: string;
  readonly userId: string;
  readonly now: string;
}

interface PlacedPiece {
  streamId: string;
  slot: number;
  label: string;
}

interface RowInHand {
  readonly facts: CharacteristicFacts;
  readonly stored: StoredRow;
  readonly texts: (string | null)[];
  changed: boolean;
}

/** Rows of one package in hand: read once, changed, judged and written together. */
export class RowWork {
  readonly characteristics: Characteristics;
  private readonly rules: JudgingRules;
  private readonly compile: ReturnType<typeof limitCompiler>;
  private readonly inHand = new Map<string, RowInHand>();
  private last: RowInHand | null = null;
  private readonly blocked = new Map<string, boolean>();
  private readonly prepare: Prepare;

  constructor(
    private readonly manager: EntityManager,
    private readonly scope: WritingScope,
  ) {
    this.prepare = (sql) => writeStatement(manager, sql);
    this.characteristics = characteristicsOf(this.prepare, scope.revisionId);
    this.rules = judgingRules(this.prepare, scope.requestId);
    this.compile = limitCompiler(this.rules);
  }

  piecesFor(changes: readonly { readonly pieceId: string }[]): Map<string, PlacedPiece> {
    const found = new Map<string, PlacedPiece>();
    const columns =
      'SELECT id, stream_id AS streamId, slot, label FROM sample_pieces WHERE submission_id = ?';
    if (changes.length > 8) {
      for (const raw of this.prepare(columns).all(this.scope.submissionId)) {
        const piece = raw as PlacedPiece & { id: string };
        found.set(piece.id, piece);
      }
      return found;
    }
    const one = this.prepare(`${columns} AND id = ?`);
    for (const { pieceId } of changes) {
      const piece = one.get(this.scope.submissionId, pieceId) as PlacedPiece | undefined;
      if (piece) found.set(pieceId, piece);
    }
    return found;
  }

  row(facts: CharacteristicFacts, streamId: string): RowInHand {
    // Changes mostly come along a row.
    if (this.last?.facts === facts && this.last.stored.streamId === streamId) return this.last;
    const key = `${facts.id} ${streamId}`;
    let row = this.inHand.get(key);
    if (row === undefined) {
      const stored = (this.prepare(
        `SELECT ${storedRowColumns} FROM characteristic_results WHERE submission_id = ? AND characteristic_id = ? AND stream_id = ?`,
      ).get(this.scope.submissionId, facts.id, streamId) ?? emptyRow(facts, streamId)) as StoredRow;
      row = { facts, stored, texts: decodeReadings(stored.readings), changed: false };
      this.inHand.set(key, row);
    }
    this.last = row;
    return row;
  }

  /** Judges and writes what changed, and what hangs on it; keeps the package's counters in step. */
  store(): StoredRow[] {
    for (const row of [...this.inHand.values()]) {
      if (!row.changed) continue;
      for (const dependent of this.characteristics.dependents.get(row.facts.id) ?? []) {
        const other = this.row(dependent, row.stored.streamId);
        if (other.stored.version > 0) other.changed = true;
      }
    }
    const written: StoredRow[] = [];
    const delta = { out: 0, undecided: 0, measured: 0 };
    for (const row of [...this.inHand.values()]) {
      if (!row.changed) continue;
      const before = row.stored.verdict;
      Object.assign(row.stored, this.judge(row), {
        readings: encodeReadings(row.texts),
        version: row.stored.version + 1,
      });
      this.upsert(row.stored);
      if (!this.isBlocked(row.stored.streamId)) {
        count(delta, before, -1);
        count(delta, row.stored.verdict, 1);
      }
      written.push(row.stored);
    }
    if (written.length > 0) this.addToCounters(delta);
    return written;
  }

  private judge(row: RowInHand): RowEvaluation {
    const sizeBalloon = sizeBalloonOf(row.facts);
    const sizeFacts = sizeBalloon === null ? undefined : this.characteristics.byBalloon.get(sizeBalloon);
    const { attributeChecked: checked, attributeFailed: failed } = row.stored;
    return evaluateRow({
      facts: row.facts,
      compiled: this.compile(row.facts),
      texts: row.texts,
      attribute: checked === null ? null : { checked, failed: failed ?? 0 },
      size: sizeFacts ? { facts: sizeFacts, texts: this.row(sizeFacts, row.stored.streamId).texts } : null,
      required: requiredPieces(row.facts, this.rules),
    });
  }

  /** A blocked stream stays on record and out of the count. */
  private isBlocked(streamId: string): boolean {
    let blocked = this.blocked.get(streamId);
    if (blocked === undefined) {
      const stream = this.prepare('SELECT blocked FROM submission_streams WHERE id = ?').get(streamId) as {
        blocked: number;
      };
      this.blocked.set(streamId, (blocked = stream.blocked === 1));
    }
    return blocked;
  }

  private upsert(row: StoredRow): void {
    writeStatement(
      this.manager,
      `INSERT INTO characteristic_results (id, submission_id, characteristic_id, stream_id, readings, marks, attribute_checked,
         attribute_failed, gauge_id, measured_on, note, n, minimum, maximum, mean, standard_deviation, out_count,
         undecided_count, verdict, entered_by_id, updated_at, version)
       VALUES (?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?)
       ON CONFLICT (submission_id, characteristic_id, stream_id) DO UPDATE SET readings = excluded.readings,
         marks = excluded.marks, attribute_checked = excluded.attribute_checked, attribute_failed = excluded.attribute_failed,
         gauge_id = excluded.gauge_id, measured_on = excluded.measured_on, note = excluded.note, n = excluded.n,
         minimum = excluded.minimum, maximum = excluded.maximum, mean = excluded.mean,
         standard_deviation = excluded.standard_deviation, out_count = excluded.out_count,
         undecided_count = excluded.undecided_count, verdict = excluded.verdict, entered_by_id = excluded.entered_by_id,
         updated_at = excluded.updated_at, version = excluded.version`,
    ).run(
      row.id,
      this.scope.submissionId,
      row.characteristicId,
      row.streamId,
      row.readings,
      row.marks,
      row.attributeChecked,
      row.attributeFailed,
      row.gaugeId,
      row.measuredOn,
      row.note,
      row.n,
      row.minimum,
      row.maximum,
      row.mean,
      row.standardDeviation,
      row.outCount,
      row.undecidedCount,
      row.verdict,
      this.scope.userId,
      this.scope.now,
      row.version,
    );
  }

  private addToCounters(delta: { out: number; undecided: number; measured: number }): void {
    writeStatement(
      this.manager,
      `UPDATE submissions SET out_count = out_count + ?, undecided_count = undecided_count + ?,
         measured_rows = measured_rows + ?, updated_at = ? WHERE id = ?`,
    ).run(delta.out, delta.undecided, delta.measured, this.scope.now, this.scope.submissionId);
  }
}

function count(
  delta: { out: number; undecided: number; measured: number },
  verdict: Verdict,
  by: number,
): void {
  if (verdict === 'out-of-tolerance') delta.out += by;
  if (verdict === 'undecided') delta.undecided += by;
  if (verdict !== 'not-measured' && verdict !== 'no-verdict') delta.measured += by;
}
