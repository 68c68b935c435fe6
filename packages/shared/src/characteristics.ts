import { z } from 'zod';
import {
  balloonNumber,
  decimalText,
  id,
  longText,
  optionalShortText,
  shortText,
  version,
} from './primitives.ts';

export const characteristicKinds = [
  'size',
  'geometric',
  'attribute',
  'note',
  'reference',
  'basic',
  'material-performance',
] as const;
export const characteristicKind = z.enum(characteristicKinds);
export type CharacteristicKind = z.infer<typeof characteristicKind>;

export const characteristicClasses = ['none', 'significant', 'critical', 'safety-regulatory'] as const;
export const characteristicClass = z.enum(characteristicClasses);
export type CharacteristicClass = z.infer<typeof characteristicClass>;

export const unitSymbols = [
  'mm',
  'µm',
  'in',
  'mil',
  'deg',
  'arcmin',
  'arcsec',
  'N',
  'kN',
  'g',
  'kg',
  'Nm',
  'MPa',
  'bar',
  'HRC',
  'HRB',
  'HV',
  'HBW',
  's',
  'ml/min',
  '%',
  'dE',
  '1',
] as const;
export const unitSymbol = z.enum(unitSymbols);
export type UnitSymbol = z.infer<typeof unitSymbol>;

/** The ways a drawing gives a tolerance; the server works out the two limits from them. */
export const toleranceSpec = z.discriminatedUnion('form', [
  z.strictObject({ form: z.literal('symmetric'), nominal: decimalText, tolerance: decimalText }),
  z.strictObject({
    form: z.literal('deviations'),
    nominal: decimalText,
    upper: decimalText,
    lower: decimalText,
  }),
  z.strictObject({
    form: z.literal('limits'),
    lower: decimalText,
    upper: decimalText,
    nominal: decimalText.nullable().default(null),
  }),
  z.strictObject({ form: z.literal('max'), upper: decimalText, zeroBound: z.boolean().default(false) }),
  z.strictObject({ form: z.literal('min'), lower: decimalText }),
  z.strictObject({
    form: z.literal('fit'),
    nominal: decimalText,
    fitClass: z
      .string()
      .trim()
      .regex(/^[A-Za-z]{1,2}\d{1,2}$/, 'A fit class looks like H7 or g6.'),
  }),
  z.strictObject({
    form: z.literal('general'),
    nominal: decimalText,
    generalClass: z.enum(['f', 'm', 'c', 'v']),
    feature: z.enum(['linear', 'radius-chamfer', 'angular']).default('linear'),
    /** Angles only: the table is entered with the shorter leg in mm. */
    shorterLeg: decimalText.optional(),
  }),
  z.strictObject({ form: z.literal('none'), nominal: decimalText.nullable().default(null) }),
]);
export type ToleranceSpec = z.infer<typeof toleranceSpec>;
export const toleranceForms = [
  'symmetric',
  'deviations',
  'limits',
  'max',
  'min',
  'fit',
  'general',
  'none',
] as const;

/** Geometric tolerance: its zone, and whose size gives a bonus (R15). */
export const geometricSpec = z.strictObject({
  type: z.enum([
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
  ]),
  diametral: z.boolean().default(false),
  modifier: z.enum(['RFS', 'MMC', 'LMC']).default('RFS'),
  datums: optionalShortText.default(''),
  /** Whether the feature is inside material (hole) or outside (shaft); needed with MMC or LMC. */
  feature: z.enum(['internal', 'external']).default('internal'),
  /** Balloon of the size characteristic whose actual size gives the bonus. */
  sizeBalloon: balloonNumber.nullable().default(null),
});
export type GeometricSpec = z.infer<typeof geometricSpec>;

export const characteristicFields = {
  balloon: balloonNumber,
  sheet: z.string().trim().max(20).default(''),
  zone: z.string().trim().max(20).default(''),
  description: shortText,
  kind: characteristicKind,
  tolerance: toleranceSpec,
  geometric: geometricSpec.nullable().default(null),
  unit: unitSymbol,
  /** Digits after the point that the drawing shows. */
  decimals: z.int().min(0).max(8),
  class: characteristicClass.default('none'),
  method: optionalShortText.default(''),
  /** A counted or pass/fail result may stand for readings. */
  attributeAllowed: z.boolean().default(false),
  /** Sample pieces for each stream; empty takes the request's number. */
  pieces: z.int().min(1).max(1000).nullable().default(null),
  /** Basic dimensions: balloons of the geometric rows that control them (R13). */
  controlledBy: z.array(balloonNumber).max(20).default([]),
  note: longText.default(''),
};

export const characteristicRequest = z
  .strictObject(characteristicFields)
  .meta({ id: 'CharacteristicRequest' });
export type CharacteristicRequest = z.input<typeof characteristicRequest>;
export type CharacteristicInput = z.output<typeof characteristicRequest>;

export const characteristicResponse = z
  .object({
    id,
    revisionId: id,
    sequence: z.int(),
    balloon: z.string(),
    sheet: z.string(),
    zone: z.string(),
    description: z.string(),
    kind: characteristicKind,
    tolerance: toleranceSpec,
    geometric: geometricSpec.nullable(),
    unit: unitSymbol,
    decimals: z.int(),
    class: characteristicClass,
    method: z.string(),
    attributeAllowed: z.boolean(),
    pieces: z.int().nullable(),
    controlledBy: z.array(z.string()),
    note: z.string(),
    /** Worked out by the server, as exact decimal text. */
    nominal: z.string().nullable(),
    lowerLimit: z.string().nullable(),
    upperLimit: z.string().nullable(),
    /** Zero cannot be undercut by nature; it is not a tolerance limit. */
    naturalLower: z.boolean(),
    /** How the limits came about, for a person. */
    explanation: z.string(),
    version,
  })
  .meta({ id: 'Characteristic' });
export type CharacteristicResponse = z.infer<typeof characteristicResponse>;

export const characteristicsResponse = z
  .object({ items: z.array(characteristicResponse) })
  .meta({ id: 'Characteristics' });
export type CharacteristicsResponse = z.infer<typeof characteristicsResponse>;

/** The keyboard table saves whole blocks at once; a row without id is new. All or nothing. */
export const characteristicTableRequest = z
  .strictObject({
    rows: z
      .array(z.strictObject({ id: id.nullable(), version: version.nullable(), ...characteristicFields }))
      .max(2000),
    removed: z.array(z.strictObject({ id, version })).max(2000).default([]),
  })
  .meta({ id: 'CharacteristicTableRequest' });
export type CharacteristicTableRequest = z.input<typeof characteristicTableRequest>;

export const comparisonResponse = z
  .object({
    from: z.object({ id, code: z.string() }),
    to: z.object({ id, code: z.string() }),
    rows: z.array(
      z.object({
        balloon: z.string(),
        change: z.enum(['added', 'removed', 'changed', 'text-only', 'same']),
        before: characteristicResponse.nullable(),
        after: characteristicResponse.nullable(),
        /** Names of the fields that differ. */
        fields: z.array(z.string()),
      }),
    ),
  })
  .meta({ id: 'RevisionComparison' });
export type ComparisonResponse = z.infer<typeof comparisonResponse>;
