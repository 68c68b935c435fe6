import type { CharacteristicClass, CharacteristicKind, GeometricSpec } from '@trammel/shared/characteristics';

export const kindWords: Record<CharacteristicKind, string> = {
  size: 'size',
  geometric: 'geometric',
  attribute: 'attribute',
  note: 'note',
  reference: 'reference',
  basic: 'basic',
  'material-performance': 'material or performance',
};

export const classWords: Record<CharacteristicClass, string> = {
  none: 'none',
  significant: 'significant',
  critical: 'critical',
  'safety-regulatory': 'safety or regulatory',
};

export const geometricTypes: readonly GeometricSpec['type'][] = [
  'position',
  'flatness',
  'straightness',
  'roundness',
  'cylindricity',
  'parallelism',
  'perpendicularity',
  'angularity',
  'profile',
  'runout',
  'total-runout',
  'symmetry',
  'concentricity',
];

/** The value whose key or word was typed; null for anything else. */
export function valueOfWord<Value extends string>(words: Record<Value, string>, typed: string): Value | null {
  const wanted = typed.trim().toLowerCase();
  const entries = Object.entries(words) as [Value, string][];
  return entries.find(([value, word]) => value === wanted || word === wanted)?.[0] ?? null;
}
