import { characteristicColumns, type CharacteristicColumn } from '@trammel/shared/table-import';

/** Headers of template and export: what was exported is recognised without help. */
export const columnLabels: Record<CharacteristicColumn, string> = {
  balloon: 'Balloon',
  sheet: 'Sheet',
  zone: 'Zone',
  description: 'Description',
  kind: 'Kind',
  nominal: 'Nominal',
  upperDeviation: 'Upper deviation',
  lowerDeviation: 'Lower deviation',
  tolerance: 'Tolerance',
  lowerLimit: 'Lower limit',
  upperLimit: 'Upper limit',
  fitClass: 'Fit class',
  generalClass: 'General tolerance class',
  unit: 'Unit',
  decimals: 'Decimals',
  class: 'Class',
  method: 'Method',
  attributeAllowed: 'Attribute allowed',
  pieces: 'Pieces',
  geometricType: 'Geometric type',
  diametral: 'Diametral zone',
  modifier: 'Material condition',
  datums: 'Datums',
  feature: 'Internal or external',
  sizeBalloon: 'Size balloon',
  zeroBound: 'Zero bound',
  generalFeature: 'General tolerance of',
  shorterLeg: 'Shorter leg',
  controlledBy: 'Controlled by',
  note: 'Note',
};

/** Words people write over their columns, English and German as met in real sheets; common practice. */
const words: Partial<Record<CharacteristicColumn, string>> = {
  balloon:
    'balloon no|balloon number|balloon nr|char|char no|char nr|char number|char #|characteristic no|characteristic number|characteristic|item|item no|no|nr|#|pos|position|position no|merkmal nr|merkmalnr|merkmal|lfd nr|feature no|dim no|dimension no|dim #|id',
  sheet: 'page|blatt|sheet no|sheet number',
  zone: 'grid|drawing zone|location|feld|zeichnungsfeld',
  description:
    'characteristic name|feature|name|bezeichnung|beschreibung|designation|merkmalsbezeichnung|text|characteristic description',
  kind: 'type|characteristic type|art|merkmalsart|characteristic kind',
  nominal:
    'nominal value|nominal size|nennmaß|nennmass|nennwert|sollmaß|sollmass|sollwert|soll|target|dimension|requirement|specification|spec|size|maß|mass',
  upperDeviation:
    'upper dev|upper tol|upper tolerance|tol +|+ tol|+tol|tol plus|plus|+|oberes abmaß|oberes abmass|ob abmaß|o abmaß|abmaß oben|ob tol|plus tolerance',
  lowerDeviation:
    'lower dev|lower tol|lower tolerance|tol -|- tol|-tol|tol minus|minus|-|unteres abmaß|unteres abmass|u abmaß|abmaß unten|unt abmaß|unt tol|minus tolerance',
  tolerance: 'tol|toleranz|±|+/-|plus/minus|tolerance text',
  lowerLimit:
    'lower|low|min|minimum|lsl|ltl|lower tolerance limit|lower spec limit|lower specification limit|kleinstmaß|mindestmaß|ug|ugw|untergrenze|unterer grenzwert|untere toleranzgrenze',
  upperLimit:
    'upper|high|max|maximum|usl|utl|upper tolerance limit|upper spec limit|upper specification limit|größtmaß|höchstmaß|og|ogw|obergrenze|oberer grenzwert|obere toleranzgrenze',
  fitClass: 'fit|passung|iso fit|tolerance zone|iso tolerance',
  generalClass: 'general tolerance|general class|allgemeintoleranz|iso 2768',
  unit: 'units|uom|einheit|unit of measure',
  decimals: 'decimal places|places|nachkommastellen',
  class:
    'classification|special|special characteristic|criticality|klasse|key characteristic|key|characteristic class',
  method:
    'measuring method|inspection method|gauge|gage|instrument|equipment|messmittel|prüfmittel|messmethode|prüfmethode',
  attributeAllowed: 'pass/fail allowed',
  pieces: 'sample pieces|sample size|stichprobe|sample',
  geometricType: 'geometric tolerance|gd&t|geometric|geometrical tolerance',
  diametral: 'diametral|ø zone',
  modifier: 'modifier|mmc/lmc',
  datums: 'datum|datum reference|bezug|bezüge',
  sizeBalloon: 'size characteristic|bonus from',
  controlledBy: 'controlled by rows',
  note: 'notes|remark|remarks|comment|comments|bemerkung|bemerkungen|anmerkung',
};

const unitSuffix = /\s*(?:\[([^\]]{1,20})\]|\(([^)]{1,20})\))/u;

export interface ReadHeader {
  /** Lower case, without unit, dots and doubled spaces. */
  readonly word: string;
  readonly unit: string | null;
}

/** The words of a header and the unit it may carry: "Ø [mm]", "width (in)". */
export function readHeader(header: string): ReadHeader {
  const match = unitSuffix.exec(header);
  const word = header
    .replace(unitSuffix, ' ')
    .toLowerCase()
    .replace(/[.:_*]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  return { word, unit: match ? (match[1] ?? match[2] ?? '').trim() : null };
}

const columnOfWord = new Map<string, CharacteristicColumn>();
for (const column of characteristicColumns) {
  columnOfWord.set(columnLabels[column].toLowerCase(), column);
}
for (const column of characteristicColumns) {
  for (const word of (words[column] ?? '').split('|'))
    if (word && !columnOfWord.has(word)) columnOfWord.set(word, column);
}

export const characteristicColumnOf = (header: string): CharacteristicColumn | null =>
  columnOfWord.get(readHeader(header).word) ?? null;
