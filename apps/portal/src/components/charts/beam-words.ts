import { countOf, showComputed } from '../../lib/format.ts';
import type { BeamData } from './beam-geometry.ts';

export interface BeamWordsData extends BeamData {
  unit: string;
  decimals: number;
  attribute?: { checked: number; failed: number } | null;
  /** What the beam shows: `Balloon 4, boss bore`. */
  name?: string;
}

/** What the beam shows, in words: its accessible name. */
export function beamInWords(data: BeamWordsData): string {
  const parts: string[] = data.name === undefined ? [] : [data.name];
  if (data.attribute) {
    const { checked, failed } = data.attribute;
    return [
      ...parts,
      `${countOf(checked, 'piece', 'pieces')} checked, ${failed === 0 ? 'none' : failed} failed`,
    ].join(': ');
  }
  return [...parts, `${pieces(data)}. ${limits(data)}${spread(data)}`].join(': ');
}

function pieces({ points, limits: { lower, upper } }: BeamWordsData): string {
  if (points.length === 0) return 'no pieces yet';
  const count = (verdict: string) => points.filter((point) => point.verdict === verdict).length;
  const out = points.filter((point) => point.verdict === 'out-of-tolerance');
  const above = out.filter((point) => upper !== null && point.value !== null && point.value > upper).length;
  const below = out.filter((point) => lower !== null && point.value !== null && point.value < lower).length;
  const sides = [above > 0 && `${above} above`, below > 0 && `${below} below`].filter(Boolean).join(', ');
  const told = [
    [count('in-tolerance'), 'in tolerance'],
    [out.length, `out of tolerance${sides ? ` (${sides})` : ''}`],
    [count('undecided'), 'undecided'],
    [count('not-measured'), 'not measured'],
    [count('no-verdict'), 'without verdict'],
  ] as const;
  const words = told.filter(([n]) => n > 0).map(([n, what]) => `${n} ${what}`);
  return `${countOf(points.length, 'piece', 'pieces')}, ${words.join(', ')}`;
}

function limits({ limits: { lower, upper, naturalLower }, unit, decimals }: BeamWordsData): string {
  const show = (value: number) => showComputed(value, decimals);
  const low = naturalLower === true ? null : lower;
  if (low !== null && upper !== null) return `Limits ${show(low)} to ${show(upper)} ${unit}`;
  if (upper !== null) return `At most ${show(upper)} ${unit}`;
  if (low !== null) return `At least ${show(low)} ${unit}`;
  return 'No limits';
}

function spread({ spread: natural, limits: { lower, upper }, unit, decimals }: BeamWordsData): string {
  if (!natural) return '';
  const show = (value: number) => showComputed(value, decimals + 1);
  const wider = lower !== null && upper !== null && natural.upper - natural.lower > upper - lower;
  return `. Natural spread ${show(natural.lower)} to ${show(natural.upper)} ${unit}${wider ? ', wider than the tolerance' : ''}`;
}
