import { dropDraft, readDraft, writeDraft } from '../../lib/draft-storage.ts';
import { NetworkFailure } from '../../lib/api-problem.ts';
import { saveReadings } from './api.ts';
import type { PendingChange, SheetModel } from './sheet-model.ts';

export type SaveState = 'saved' | 'saving' | 'waiting' | 'offline' | 'failed';

const settleMs = 350;
const retryMs = 4000;

/**
 * Sends what was typed shortly after the typing pauses, one message at a time and in order. Until the server has
 * answered, the changes also lie in the browser's storage, so that a closed tab or a dead line loses nothing.
 */
export class SaveQueue {
  state: SaveState = 'saved';
  failure: unknown = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private running = false;
  private sent: Promise<void> = Promise.resolve();
  private readonly listeners = new Set<() => void>();
  private readonly unsubscribe: () => void;

  constructor(
    private readonly model: SheetModel,
    private readonly submissionId: string,
    private readonly draft: string,
  ) {
    this.unsubscribe = model.subscribe(() => this.noteChange());
  }

  subscribe = (listener: () => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  current = () => this.state;

  /** Takes up what an earlier visit could not send. Answers how many readings that were. */
  recover(): number {
    const left = readDraft<PendingChange[]>(this.draft)?.value ?? [];
    if (left.length > 0) this.model.recover(left);
    return left.length;
  }

  flush = () => {
    clearTimeout(this.timer);
    this.send(false);
  };

  /** Sends what is left. Answers whether anything was on its way, so that other pages may ask anew. */
  async stop(): Promise<boolean> {
    clearTimeout(this.timer);
    this.unsubscribe();
    const pending = this.running || this.model.unsaved().length > 0;
    await this.sent;
    this.send(true);
    await this.sent;
    return pending;
  }

  private noteChange(): void {
    const changes = this.model.unsaved();
    if (changes.length === 0) {
      dropDraft(this.draft);
      if (!this.running) this.become('saved');
      return;
    }
    writeDraft(this.draft, { value: changes, version: 0, at: new Date().toISOString() });
    if (this.running) return;
    this.become('waiting');
    clearTimeout(this.timer);
    this.timer = setTimeout(this.flush, settleMs);
  }

  private send(keepalive: boolean): void {
    if (this.running) return;
    const changes = this.model.unsaved();
    if (changes.length === 0) return;
    this.running = true;
    this.become('saving');
    this.sent = this.deliver(changes, keepalive);
  }

  private async deliver(changes: PendingChange[], keepalive: boolean): Promise<void> {
    try {
      const answer = await saveReadings(this.submissionId, { changes }, keepalive);
      this.running = false;
      this.failure = null;
      this.model.applySaved(changes, answer);
      if (this.model.unsaved().length === 0) this.become('saved');
    } catch (error) {
      this.running = false;
      this.failure = error;
      this.become(error instanceof NetworkFailure ? 'offline' : 'failed');
      if (error instanceof NetworkFailure) this.timer = setTimeout(this.flush, retryMs);
    }
  }

  private become(state: SaveState): void {
    if (this.state === state) return;
    this.state = state;
    for (const listener of this.listeners) listener();
  }
}
