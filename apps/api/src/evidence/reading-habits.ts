import { hasVerdict, takesAttribute, type CharacteristicFacts } from './characteristic-facts.ts';
import { endsInFigure } from './reading-entry.ts';

/** What the way the readings are written tells, apart from their values. */
export interface ReadingHabits {
  /** Readings with fewer decimals than the drawing, and the first of them. */
  readonly coarse: { readonly count: number; readonly first: string } | null;
  /** All readings rise, or all fall, from piece to piece. */
  readonly order: 'rise' | 'fall' | null;
}

/** Fewer steps than these may rise by chance. */
const fewestSteps = 4;
const fewestReadings = 10;

export function habitsOf(texts: readonly (string | null)[], facts: CharacteristicFacts): ReadingHabits {
  if (takesAttribute(facts) || !hasVerdict(facts)) return { coarse: null, order: null };
  return {
    coarse: coarseOf(texts, facts.decimals),
    order: texts.length < fewestReadings ? null : orderOf(texts),
  };
}

function coarseOf(texts: readonly (string | null)[], decimals: number): ReadingHabits['coarse'] {
  let count = 0;
  let first = '';
  for (const text of texts) {
    if (text === null || decimalsOf(text) >= decimals) continue;
    if (count === 0) first = text;
    count += 1;
  }
  return count === 0 ? null : { count, first };
}

/** Digits behind the point of a bare number; a text with a unit or a word behind it is not looked at. */
function decimalsOf(text: string): number {
  if (!endsInFigure(text)) return Infinity;
  const point = text.indexOf('.');
  return point < 0 ? 0 : text.length - point - 1;
}

/** Over at least five different values; most rows answer after a few readings. */
function orderOf(texts: readonly (string | null)[]): ReadingHabits['order'] {
  let rising = true;
  let falling = true;
  let steps = 0;
  let count = 0;
  let before: number | null = null;
  for (const text of texts) {
    if (text === null) continue;
    const value = Number(text);
    if (Number.isNaN(value)) return null;
    if (before !== null && value !== before) {
      if (value > before) falling = false;
      else rising = false;
      steps += 1;
      if (!rising && !falling) return null;
    }
    before = value;
    count += 1;
  }
  if (steps < fewestSteps || count < fewestReadings) return null;
  return rising ? 'rise' : 'fall';
}
