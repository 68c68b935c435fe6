import { ApiProblem, NetworkFailure } from './api-problem.ts';
import { dropDraft, readDraft, writeDraft } from './draft-storage.ts';

export type AutosaveState = 'untouched' | 'waiting' | 'saving' | 'saved' | 'offline' | 'conflict' | 'refused';

export interface AutosaveSnapshot<T> {
  state: AutosaveState;
  savedAt: Date | null;
  /** In a conflict: what the person has and what stands on the server now. */
  conflict: { mine: T; theirs: unknown } | null;
  problem: ApiProblem | null;
}

export interface AutosaveOptions<T> {
  /** From `draftKey()`. */
  key: string;
  initial: T;
  version: number;
  /** Writes the value with `If-Match: version`; answers with the new version. */
  save: (value: T, version: number, options: { keepalive: boolean }) => Promise<{ version: number }>;
  delayMs?: number;
}

const longestRetryMs = 30_000;

/**
 * Saves a value a moment after its last change. Until the server has it, a copy stands in the browser's storage, so that
 * a closed tab loses nothing; a newer version on the server stops the saving until the person has chosen.
 */
export class Autosave<T> {
  private snapshot: AutosaveSnapshot<T> = {
    state: 'untouched',
    savedAt: null,
    conflict: null,
    problem: null,
  };
  private readonly listeners = new Set<() => void>();
  private value: T;
  private savedText: string;
  private version: number;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private running: Promise<void> | null = null;
  private failures = 0;
  private isRecovering = false;

  constructor(private readonly options: AutosaveOptions<T>) {
    this.value = options.initial;
    this.savedText = JSON.stringify(options.initial);
    this.version = options.version;
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  read = (): AutosaveSnapshot<T> => this.snapshot;

  /** A draft a closed tab left: answered when it still fits; a draft on an older version becomes a conflict. */
  recover(): T | null {
    const draft = readDraft<T>(this.options.key);
    if (draft === null) return null;
    if (JSON.stringify(draft.value) === this.savedText) {
      dropDraft(this.options.key);
      return null;
    }
    if (draft.version === this.version) return draft.value;
    this.isRecovering = true;
    this.publish({ state: 'conflict', conflict: { mine: draft.value, theirs: this.value } });
    return null;
  }

  change(value: T): void {
    if (JSON.stringify(value) === JSON.stringify(this.value)) return;
    this.value = value;
    if (this.snapshot.conflict !== null) {
      // A draft that a closed tab left must not be replaced by what is typed now: both wait for the choice.
      if (this.isRecovering) return;
      this.keepDraft();
      this.publish({ conflict: { ...this.snapshot.conflict, mine: value } });
      return;
    }
    if (!this.isDirty() && this.running === null) {
      clearTimeout(this.timer);
      dropDraft(this.options.key);
      this.publish({ state: this.snapshot.savedAt === null ? 'untouched' : 'saved', problem: null });
      return;
    }
    this.keepDraft();
    this.publish({ state: this.running ? 'saving' : 'waiting', problem: null });
    this.schedule(this.options.delayMs ?? 700);
  }

  /** Saves now; resolves when nothing is left unsaved or saving has stopped for a reason that the state tells. */
  async flush(options = { keepalive: false }): Promise<void> {
    clearTimeout(this.timer);
    if (this.running) await this.running;
    if (!this.isDirty() || this.snapshot.state === 'conflict') return;
    this.running = this.saveOnce(options).finally(() => {
      this.running = null;
    });
    await this.running;
    if (this.isDirty() && this.snapshot.state === 'waiting') await this.flush(options);
  }

  /**
   * After a conflict: `mine` is written over the newer version the person has seen; `theirs` drops the draft, and keeps
   * what was typed on top of theirs since. Answers with the value that the form shows from now on.
   */
  resolve(choice: 'mine' | 'theirs', theirs: { value: T; version: number }): T {
    const mine = this.snapshot.conflict?.mine ?? this.value;
    const typedOnTheirs = this.isRecovering ? this.value : theirs.value;
    this.isRecovering = false;
    this.version = theirs.version;
    this.savedText = JSON.stringify(theirs.value);
    this.value = choice === 'mine' ? mine : typedOnTheirs;
    const dirty = this.isDirty();
    this.publish({ state: dirty ? 'waiting' : 'saved', conflict: null, problem: null });
    if (dirty) {
      this.keepDraft();
      this.schedule(0);
    } else dropDraft(this.options.key);
    return this.value;
  }

  retryNow = (): void => {
    if (this.snapshot.state === 'offline') this.schedule(0);
  };

  stop(): void {
    clearTimeout(this.timer);
  }

  private async saveOnce(options: { keepalive: boolean }): Promise<void> {
    const sent = this.value;
    const sentText = JSON.stringify(sent);
    this.publish({ state: 'saving', problem: null });
    try {
      const { version } = await this.options.save(sent, this.version, options);
      this.version = version;
      this.savedText = sentText;
      this.failures = 0;
      if (this.isDirty()) {
        this.keepDraft();
        this.publish({ state: 'waiting', savedAt: new Date() });
        this.schedule(this.options.delayMs ?? 700);
      } else {
        dropDraft(this.options.key);
        this.publish({ state: 'saved', savedAt: new Date() });
      }
    } catch (error) {
      this.keepDraft();
      this.fail(error, sent);
    }
  }

  private fail(error: unknown, mine: T): void {
    if (error instanceof ApiProblem && error.is('stale-version', 'conflict')) {
      this.publish({ state: 'conflict', conflict: { mine, theirs: error.problem.current }, problem: error });
    } else if (
      error instanceof NetworkFailure ||
      (error instanceof ApiProblem && error.is('unavailable', 'unauthenticated'))
    ) {
      this.failures += 1;
      this.publish({ state: 'offline' });
      this.schedule(Math.min(longestRetryMs, 1000 * 2 ** this.failures));
    } else {
      this.publish({ state: 'refused', problem: error instanceof ApiProblem ? error : null });
      if (!(error instanceof ApiProblem)) throw error;
    }
  }

  private isDirty(): boolean {
    return JSON.stringify(this.value) !== this.savedText;
  }

  private keepDraft(): void {
    writeDraft(this.options.key, { value: this.value, version: this.version, at: new Date().toISOString() });
  }

  private schedule(delayMs: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), delayMs);
  }

  private publish(change: Partial<AutosaveSnapshot<T>>): void {
    this.snapshot = { ...this.snapshot, ...change };
    for (const listener of this.listeners) listener();
  }
}
