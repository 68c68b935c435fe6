import type {
  MeasurementSheetResponse,
  PieceResponse,
  RowResult,
  SheetCharacteristic,
} from '@trammel/shared/measurements';
import { previewMark } from './preview-verdict.ts';

export interface Column {
  readonly piece: PieceResponse;
  readonly streamId: string;
  readonly streamName: string;
  /** Place of the piece among those of its stream. */
  readonly place: number;
  readonly firstOfStream: boolean;
}

export interface Cell {
  readonly text: string | null;
  readonly mark: string;
  readonly reason: string | null;
  readonly state: 'saved' | 'unsaved' | 'refused' | 'conflict';
}

export interface PendingChange {
  readonly characteristicId: string;
  readonly pieceId: string;
  readonly text: string | null;
  readonly was: string | null;
}

export interface Conflict {
  readonly characteristicId: string;
  readonly pieceId: string;
  readonly now: string | null;
  readonly wanted: string | null;
}

const cellKey = (characteristicId: string, pieceId: string) => `${characteristicId} ${pieceId}`;
const rowKey = (characteristicId: string, streamId: string) => `${characteristicId} ${streamId}`;

/**
 * The sheet while it is open: what the server knows, over it what was typed and is on its way. Rows are versioned by a
 * counter so that only the row that changed draws itself again.
 */
export class SheetModel {
  readonly characteristics: readonly SheetCharacteristic[];
  readonly columns: readonly Column[];
  readonly streams: MeasurementSheetResponse['streams'];
  private readonly rows = new Map<string, RowResult>();
  private readonly pending = new Map<string, PendingChange>();
  private readonly refused = new Map<string, { text: string; reason: string }>();
  readonly conflicts = new Map<string, Conflict>();
  private readonly byBalloon = new Map<string, SheetCharacteristic>();
  private readonly rowVersions = new Map<string, number>();
  private readonly listeners = new Set<() => void>();
  private total = 0;

  constructor(sheet: MeasurementSheetResponse) {
    this.characteristics = sheet.characteristics;
    this.streams = sheet.streams;
    this.columns = sheet.streams.flatMap((stream) =>
      sheet.pieces
        .filter((piece) => piece.streamId === stream.id)
        .map((piece, place) => ({
          piece,
          streamId: stream.id,
          streamName: stream.name,
          place,
          firstOfStream: place === 0,
        })),
    );
    for (const facts of sheet.characteristics) this.byBalloon.set(facts.balloon, facts);
    for (const row of sheet.rows) this.rows.set(rowKey(row.characteristicId, row.streamId), row);
  }

  subscribe = (listener: () => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  /** Raised by every change. */
  version = () => this.total;
  rowVersion = (characteristicId: string) => this.rowVersions.get(characteristicId) ?? 0;

  row(characteristicId: string, streamId: string): RowResult | undefined {
    return this.rows.get(rowKey(characteristicId, streamId));
  }

  savedText(characteristicId: string, column: Column): string | null {
    return this.row(characteristicId, column.streamId)?.readings[column.place] ?? null;
  }

  text(characteristicId: string, column: Column): string | null {
    const key = cellKey(characteristicId, column.piece.id);
    const pending = this.pending.get(key);
    if (pending) return pending.text;
    return this.refused.get(key)?.text ?? this.savedText(characteristicId, column);
  }

  cell(facts: SheetCharacteristic, column: Column): Cell {
    const key = cellKey(facts.id, column.piece.id);
    const conflict = this.conflicts.get(key);
    const refused = this.refused.get(key);
    if (refused && !this.pending.has(key))
      return { text: refused.text, mark: 'r', reason: refused.reason, state: 'refused' };
    const pending = this.pending.get(key);
    if (pending) {
      const preview = previewMark(pending.text, facts, this.sizeOf(facts, column));
      return { text: pending.text, ...preview, state: conflict ? 'conflict' : 'unsaved' };
    }
    const row = this.row(facts.id, column.streamId);
    const text = row?.readings[column.place] ?? null;
    return { text, mark: row?.marks.charAt(column.place) || 'n', reason: null, state: 'saved' };
  }

  /** Takes typed values; a value equal to the saved one takes an earlier change back. Answers what stood there before. */
  edit(
    changes: readonly { facts: SheetCharacteristic; column: Column; text: string | null }[],
  ): { facts: SheetCharacteristic; column: Column; text: string | null }[] {
    const before = changes.map(({ facts, column }) => ({ facts, column, text: this.text(facts.id, column) }));
    for (const { facts, column, text } of changes) {
      const key = cellKey(facts.id, column.piece.id);
      const saved = this.savedText(facts.id, column);
      this.refused.delete(key);
      this.conflicts.delete(key);
      const preview = text === null ? null : previewMark(text, facts, this.sizeOf(facts, column));
      if (preview?.mark === 'r') {
        this.pending.delete(key);
        this.refused.set(key, { text: text ?? '', reason: preview.reason ?? '' });
      } else if (text === saved) this.pending.delete(key);
      else this.pending.set(key, { characteristicId: facts.id, pieceId: column.piece.id, text, was: saved });
      this.touch(facts.id);
    }
    this.publish();
    return before;
  }

  unsaved(): PendingChange[] {
    return [...this.pending.entries()]
      .filter(([key]) => !this.conflicts.has(key))
      .map(([, change]) => change);
  }

  refusals(): { characteristicId: string; pieceId: string; text: string; reason: string }[] {
    return [...this.refused.entries()].map(([key, refusal]) => {
      const [characteristicId = '', pieceId = ''] = key.split(' ');
      return { characteristicId, pieceId, ...refusal };
    });
  }

  /** Takes the server's answer to the changes that were sent; what was typed meanwhile stays on its way. */
  applySaved(
    sent: readonly PendingChange[],
    answer: {
      rows: readonly RowResult[];
      conflicts: readonly Conflict[];
      refused: readonly { characteristicId: string; pieceId: string; text: string; reason: string }[];
    },
  ): void {
    this.applyRows(answer.rows, false);
    for (const change of sent) {
      const key = cellKey(change.characteristicId, change.pieceId);
      if (this.pending.get(key) === change) this.pending.delete(key);
      this.touch(change.characteristicId);
    }
    for (const conflict of answer.conflicts) {
      const key = cellKey(conflict.characteristicId, conflict.pieceId);
      this.conflicts.set(key, conflict);
      if (!this.pending.has(key))
        this.pending.set(key, {
          characteristicId: conflict.characteristicId,
          pieceId: conflict.pieceId,
          text: conflict.wanted,
          was: conflict.now,
        });
    }
    for (const { characteristicId, pieceId, text, reason } of answer.refused) {
      this.refused.set(cellKey(characteristicId, pieceId), { text, reason });
    }
    this.publish();
  }

  applyRows(rows: readonly RowResult[], publish = true): void {
    for (const row of rows) {
      this.rows.set(rowKey(row.characteristicId, row.streamId), row);
      this.touch(row.characteristicId);
    }
    if (publish) this.publish();
  }

  /** `mine` sends the typed values over what stands there now; `theirs` drops them. */
  settleConflicts(choice: 'mine' | 'theirs'): void {
    for (const [key, conflict] of this.conflicts) {
      const pending = this.pending.get(key);
      if (choice === 'theirs') {
        this.pending.delete(key);
        const facts = this.characteristics.find((candidate) => candidate.id === conflict.characteristicId);
        const column = this.columns.find((candidate) => candidate.piece.id === conflict.pieceId);
        const row = facts && column ? this.row(facts.id, column.streamId) : undefined;
        if (row && column) {
          const readings = [...row.readings];
          readings[column.place] = conflict.now;
          this.rows.set(rowKey(row.characteristicId, row.streamId), { ...row, readings });
        }
      } else if (pending) this.pending.set(key, { ...pending, was: conflict.now });
      this.touch(conflict.characteristicId);
    }
    this.conflicts.clear();
    this.publish();
  }

  /** Puts back what a closed tab or a lost connection left behind. */
  recover(changes: readonly PendingChange[]): void {
    for (const change of changes) {
      const known = this.characteristics.some((facts) => facts.id === change.characteristicId);
      if (known && this.columns.some((column) => column.piece.id === change.pieceId)) {
        this.pending.set(cellKey(change.characteristicId, change.pieceId), change);
        this.touch(change.characteristicId);
      }
    }
    this.publish();
  }

  private sizeOf(facts: SheetCharacteristic, column: Column) {
    const balloon = facts.geometric?.modifier === 'RFS' ? null : (facts.geometric?.sizeBalloon ?? null);
    const size = balloon === null ? undefined : this.byBalloon.get(balloon);
    return size ? { facts: size, text: this.text(size.id, column) } : null;
  }

  private touch(characteristicId: string): void {
    this.rowVersions.set(characteristicId, (this.rowVersions.get(characteristicId) ?? 0) + 1);
  }

  private publish(): void {
    this.total += 1;
    for (const listener of this.listeners) listener();
  }
}
