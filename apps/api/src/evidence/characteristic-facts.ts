import type {
  CharacteristicClass,
  CharacteristicKind,
  GeometricSpec,
  UnitSymbol,
} from '@trammel/shared/characteristics';

/** A characteristic as far as judging its readings needs it. */
export interface CharacteristicFacts {
  readonly id: string;
  readonly sequence: number;
  readonly balloon: string;
  readonly sheet: string;
  readonly zone: string;
  readonly description: string;
  readonly kind: CharacteristicKind;
  readonly class: CharacteristicClass;
  readonly unit: UnitSymbol;
  readonly decimals: number;
  readonly nominal: string | null;
  readonly lowerLimit: string | null;
  readonly upperLimit: string | null;
  readonly naturalLower: boolean;
  readonly geometric: GeometricSpec | null;
  readonly attributeAllowed: boolean;
  readonly method: string;
  readonly pieces: number | null;
  readonly controlledBy: readonly string[];
}

/** Counted or pass/fail results are the only ones, or may stand for readings. */
export function takesAttribute(facts: Pick<CharacteristicFacts, 'kind' | 'attributeAllowed'>): boolean {
  return facts.kind === 'attribute' || facts.kind === 'note' || facts.attributeAllowed;
}

/** Reference dimensions never fail (R12); a basic dimension is judged through the rows that control it (R13). */
export function hasVerdict(facts: Pick<CharacteristicFacts, 'kind'>): boolean {
  return facts.kind !== 'reference' && facts.kind !== 'basic';
}

/** The size characteristic whose actual size gives this row a bonus, if any (R15). */
export function sizeBalloonOf(facts: CharacteristicFacts): string | null {
  const geometric = facts.geometric;
  return geometric !== null && geometric.modifier !== 'RFS' ? geometric.sizeBalloon : null;
}

export function isSpecial(facts: Pick<CharacteristicFacts, 'class'>): boolean {
  return facts.class !== 'none';
}

interface CharacteristicRow {
  id: string;
  sequence: number;
  balloon: string;
  sheet: string;
  zone: string;
  description: string;
  kind: CharacteristicKind;
  class: CharacteristicClass;
  unit: UnitSymbol;
  decimals: number;
  nominal: string | null;
  lower_limit: string | null;
  upper_limit: string | null;
  natural_lower: number;
  geometric: string | null;
  attribute_allowed: number;
  method: string;
  pieces: number | null;
  controlled_by: string;
}

export const characteristicColumns =
  'id, sequence, balloon, sheet, zone, description, kind, class, unit, decimals, nominal, lower_limit, upper_limit, natural_lower, geometric, attribute_allowed, method, pieces, controlled_by';

export function factsOfRow(raw: unknown): CharacteristicFacts {
  const row = raw as CharacteristicRow;
  return {
    id: row.id,
    sequence: row.sequence,
    balloon: row.balloon,
    sheet: row.sheet,
    zone: row.zone,
    description: row.description,
    kind: row.kind,
    class: row.class,
    unit: row.unit,
    decimals: row.decimals,
    nominal: row.nominal,
    // A bound set by nature is kept apart from the tolerance limits in everything that judges.
    lowerLimit: row.natural_lower === 1 ? null : row.lower_limit,
    upperLimit: row.upper_limit,
    naturalLower: row.natural_lower === 1,
    geometric: row.geometric === null ? null : (JSON.parse(row.geometric) as GeometricSpec | null),
    attributeAllowed: row.attribute_allowed === 1,
    method: row.method,
    pieces: row.pieces,
    controlledBy: JSON.parse(row.controlled_by) as string[],
  };
}
