import { findUnit } from '@trammel/metrology/units';
import {
  unitSymbols,
  type CharacteristicClass,
  type CharacteristicKind,
  type GeometricSpec,
  type UnitSymbol,
} from '@trammel/shared/characteristics';

const dictionary = <Word extends string>(entries: Record<Word, string>): ReadonlyMap<string, Word> => {
  const map = new Map<string, Word>();
  for (const [value, words] of Object.entries(entries) as [Word, string][]) {
    map.set(value, value);
    map.set(value.replaceAll('-', ' '), value);
    for (const word of words.split('|')) if (word) map.set(word, value);
  }
  return map;
};

const kinds = dictionary<CharacteristicKind>({
  size: 'dimension|linear|length|diameter|radius|angle|dim|maß|länge|durchmesser|winkel|variable',
  geometric: 'gd&t|geometry|form|form and position|lage|form und lage|geometrical',
  attribute:
    'attributive|visual|go/no-go|go/no go|go/nogo|gauge check|pass/fail|attributiv|sichtprüfung|lehre',
  note: 'notes|text|drawing note|hinweis',
  reference: 'ref|hilfsmaß|reference dimension',
  basic: 'theoretically exact|ted|theoretical|theoretisches maß',
  'material-performance':
    'material|performance|functional|function|hardness|test|material/performance|werkstoff|funktion|härte',
});
const classes = dictionary<CharacteristicClass>({
  none: 'standard|minor|normal|no|-|nein|n',
  significant: 'significant characteristic|major|key|key characteristic|wesentlich|signifikant|hauptmerkmal',
  critical: 'critical characteristic|kritisch|kritisches merkmal',
  'safety-regulatory':
    'safety|regulatory|safety or regulatory|safety/regulatory|safety and regulatory|sicherheit|sicherheitsrelevant|sicherheitsmerkmal',
});
const geometricTypes = dictionary<GeometricSpec['type']>({
  position: 'true position|⌖|ortsabweichung',
  flatness: '⏥|ebenheit',
  straightness: '⏤|geradheit',
  roundness: 'circularity|○|rundheit',
  cylindricity: '⌭|zylindrizität|zylinderform',
  parallelism: '∥|⫽|//|parallelität',
  perpendicularity: 'squareness|⟂|⊥|rechtwinkligkeit',
  angularity: '∠|neigung|angularity',
  profile:
    'profile of a surface|profile of a line|surface profile|line profile|pointprofile|point profile|⌓|⌒|profil',
  runout: 'run-out|circular runout|circular run-out|↗|rundlauf|planlauf',
  'total-runout': 'total run-out|⌰|gesamtlauf',
  symmetry: '⌯|symmetrie',
  concentricity: 'coaxiality|◎|konzentrizität|koaxialität',
});

const yes = new Set(['yes', 'y', 'true', '1', 'x', 'ja', 'j', 'wahr']);
const no = new Set(['', 'no', 'n', 'false', '0', '-', 'nein', 'falsch']);

const norm = (text: string): string => text.trim().toLowerCase().replace(/\s+/g, ' ');

export const kindOf = (text: string): CharacteristicKind | null => kinds.get(norm(text)) ?? null;
export const classOf = (text: string): CharacteristicClass | null => classes.get(norm(text)) ?? null;
export const geometricTypeOf = (text: string): GeometricSpec['type'] | null =>
  geometricTypes.get(norm(text)) ?? null;

/** "Flatness of datum A", "Position Ø0.15 to A|B": the tolerance that a description begins with. */
export function geometricTypeIn(description: string): GeometricSpec['type'] | null {
  const start = norm(description);
  let best: { word: string; type: GeometricSpec['type'] } | null = null;
  for (const [word, type] of geometricTypes) {
    if (!start.startsWith(word) || /[\p{L}\d]/u.test(start.charAt(word.length))) continue;
    if (!best || word.length > best.word.length) best = { word, type };
  }
  return best?.type ?? null;
}

export function yesOrNo(text: string): boolean | null {
  const word = norm(text);
  return yes.has(word) ? true : no.has(word) ? false : null;
}

const ownUnits = new Map<string, UnitSymbol>(unitSymbols.map((symbol) => [symbol, symbol]));
const extraUnits: Record<string, UnitSymbol> = {
  δe: 'dE',
  de: 'dE',
  'n·m': 'Nm',
  hb: 'HBW',
  brinell: 'HBW',
  vickers: 'HV',
  zoll: 'in',
  grad: 'deg',
};

/** The unit symbol of the product for what a person wrote: um, μm, inch, ", °; null for a unit not taken. */
export function unitOf(text: string): UnitSymbol | null {
  const written = text.trim();
  const own = ownUnits.get(written) ?? extraUnits[norm(written)];
  if (own) return own;
  const found = findUnit(written);
  if (found && !('undetermined' in found)) {
    return ownUnits.get(found.symbol) ?? extraUnits[norm(found.symbol)] ?? null;
  }
  return null;
}
