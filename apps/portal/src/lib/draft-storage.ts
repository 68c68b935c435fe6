const prefix = 'trammel.draft.';

export interface StoredDraft<T> {
  value: T;
  /** Version the draft was made from. */
  version: number;
  at: string;
}

/** What was typed and not yet saved. Keys carry the person, so that a second one at the same browser reads nothing. */
export function draftKey(personId: string, subject: string): string {
  return `${prefix}${personId}.${subject}`;
}

export function writeDraft<T>(key: string, draft: StoredDraft<T>): void {
  try {
    localStorage.setItem(key, JSON.stringify(draft));
  } catch {
    // A full or refused storage costs only the copy that outlives the tab; saving to the server goes on.
  }
}

export function readDraft<T>(key: string): StoredDraft<T> | null {
  try {
    const text = localStorage.getItem(key);
    return text === null ? null : (JSON.parse(text) as StoredDraft<T>);
  } catch {
    return null;
  }
}

export function dropDraft(key: string): void {
  try {
    localStorage.removeItem(key);
  } catch {
    // Nothing was stored where storage is refused.
  }
}

function draftKeys(): string[] {
  try {
    return Object.keys(localStorage).filter((key) => key.startsWith(prefix));
  } catch {
    return [];
  }
}

export function countDrafts(): number {
  return draftKeys().length;
}

/** At sign-out everything goes; at sign-in only what belongs to other people. */
export function dropDrafts(exceptPersonId?: string): void {
  for (const key of draftKeys()) {
    if (exceptPersonId === undefined || !key.startsWith(`${prefix}${exceptPersonId}.`)) dropDraft(key);
  }
}
