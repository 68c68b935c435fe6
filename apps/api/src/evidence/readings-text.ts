/** Readings of one row as they are stored: exact texts by slot, one a line; an empty line is a piece not measured. */
export function decodeReadings(stored: string): (string | null)[] {
  if (stored === '') return [];
  const texts: (string | null)[] = stored.split('\n');
  // Most rows are whole; only a row with an empty line is walked.
  if (stored.startsWith('\n') || stored.includes('\n\n')) {
    for (let slot = 0; slot < texts.length; slot += 1) if (texts[slot] === '') texts[slot] = null;
  }
  return texts;
}

export function encodeReadings(texts: readonly (string | null)[]): string {
  let last = texts.length;
  while (last > 0 && (texts[last - 1] ?? null) === null) last -= 1;
  let stored = '';
  for (let slot = 0; slot < last; slot += 1) stored += (slot === 0 ? '' : '\n') + (texts[slot] ?? '');
  return stored;
}
