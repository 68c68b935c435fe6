import type { RevisionSummary } from '@trammel/shared/parts';

export const revisionStateWords: Record<RevisionSummary['state'], string> = {
  draft: 'draft',
  released: 'released',
  superseded: 'superseded',
};

/** The next letter of a series A, B, C; drawings leave out I, O, Q, S, X and Z (common practice). */
export function nextCode(code: string): string {
  const letters = 'ABCDEFGHJKLMNPRTUVWY';
  const at = letters.indexOf(code);
  if (code.length === 1 && at >= 0 && at < letters.length - 1) return letters[at + 1] ?? '';
  return /^\d+$/.test(code) ? String(Number(code) + 1).padStart(code.length, '0') : '';
}
