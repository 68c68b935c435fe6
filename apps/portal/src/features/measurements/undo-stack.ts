import type { SheetModel } from './sheet-model.ts';

type Changes = Parameters<SheetModel['edit']>[0];

const kept = 200;

/** Takes back and does again whole acts: one typed value, one pasted block. */
export class UndoStack {
  private readonly past: Changes[] = [];
  private readonly future: Changes[] = [];

  constructor(private readonly model: SheetModel) {}

  edit(changes: Changes): void {
    if (changes.length === 0) return;
    this.past.push(this.model.edit(changes));
    if (this.past.length > kept) this.past.shift();
    this.future.length = 0;
  }

  undo(): number {
    return this.turn(this.past, this.future);
  }

  redo(): number {
    return this.turn(this.future, this.past);
  }

  private turn(from: Changes[], to: Changes[]): number {
    const changes = from.pop();
    if (!changes) return 0;
    to.push(this.model.edit(changes));
    return changes.length;
  }
}
