import { z } from 'zod';
import { characteristicKind } from './characteristics.ts';
import { id } from './primitives.ts';

/** What the person declares about a file; nothing is guessed silently: the guess is shown and can be changed. */
export const importSettings = z.strictObject({
  encoding: z.enum(['utf-8', 'utf-16le', 'utf-16be', 'windows-1252']),
  delimiter: z.enum([',', ';', '\t', '|']),
  decimalSign: z.enum(['.', ',']),
  groupSign: z.enum(['', ',', '.', ' ', "'"]),
  /** Sheet of a workbook. */
  sheet: z.string().max(200).nullable(),
  /** 1-based line of the header; 0 when there is none. */
  headerLine: z.int().min(0).max(1000),
});
export type ImportSettings = z.infer<typeof importSettings>;

export const importIssue = z.object({
  /** 1-based line of the file. */
  line: z.int(),
  column: z.string().nullable(),
  detail: z.string(),
  remedy: z.string(),
});
export type ImportIssue = z.infer<typeof importIssue>;

export const importPreviewBase = {
  importId: id,
  fileName: z.string(),
  format: z.enum(['csv', 'xlsx']),
  sheets: z.array(z.string()),
  settings: importSettings,
  columns: z.array(z.object({ index: z.int(), header: z.string(), sample: z.array(z.string()) })),
  totalRows: z.int(),
  refused: z.array(importIssue),
};

export const importParams = z.strictObject({ importId: id });

/** Fields of a characteristic that a column can fill. */
export const characteristicColumns = [
  'balloon',
  'sheet',
  'zone',
  'description',
  'kind',
  'nominal',
  'upperDeviation',
  'lowerDeviation',
  'tolerance',
  'lowerLimit',
  'upperLimit',
  'fitClass',
  'generalClass',
  'unit',
  'decimals',
  'class',
  'method',
  'attributeAllowed',
  'pieces',
  'geometricType',
  'diametral',
  'modifier',
  'datums',
  'feature',
  'sizeBalloon',
  'zeroBound',
  'generalFeature',
  'shorterLeg',
  'controlledBy',
  'note',
] as const;
export type CharacteristicColumn = (typeof characteristicColumns)[number];
export const characteristicMapping = z.record(z.enum(characteristicColumns), z.int().min(0).nullable());

export const remapCharacteristicsRequest = z
  .strictObject({
    settings: importSettings,
    mapping: z.partialRecord(z.enum(characteristicColumns), z.int().min(0).nullable()),
  })
  .meta({ id: 'RemapCharacteristicsRequest' });
export type RemapCharacteristicsRequest = z.infer<typeof remapCharacteristicsRequest>;

export const characteristicImportPreview = z
  .object({
    ...importPreviewBase,
    mapping: z.partialRecord(z.enum(characteristicColumns), z.int().nullable()),
    rows: z.array(
      z.object({
        line: z.int(),
        balloon: z.string(),
        description: z.string(),
        kind: characteristicKind,
        nominal: z.string().nullable(),
        lowerLimit: z.string().nullable(),
        upperLimit: z.string().nullable(),
        unit: z.string(),
        action: z.enum(['add', 'replace', 'same']),
      }),
    ),
    /** How many rows would be added, replaced or left. */
    counts: z.object({ add: z.int(), replace: z.int(), same: z.int(), refused: z.int() }),
  })
  .meta({ id: 'CharacteristicImportPreview' });
export type CharacteristicImportPreview = z.infer<typeof characteristicImportPreview>;

export const importConfirmed = z
  .object({ written: z.int(), unchanged: z.int(), skipped: z.int() })
  .meta({ id: 'ImportConfirmed' });
export type ImportConfirmed = z.infer<typeof importConfirmed>;

/** Wide: one row a characteristic, one column a piece (or turned). Long: one row a reading. */
export const readingMapping = z.discriminatedUnion('layout', [
  z.strictObject({
    layout: z.literal('long'),
    balloon: z.int().min(0),
    piece: z.int().min(0),
    value: z.int().min(0),
    stream: z.int().min(0).nullable().default(null),
    unit: z.int().min(0).nullable().default(null),
  }),
  z.strictObject({
    layout: z.literal('wide'),
    /** Column holding the balloon numbers (rows are characteristics), or the pieces' labels (rows are pieces). */
    rowsAre: z.enum(['characteristics', 'pieces']),
    key: z.int().min(0),
    /** Column index to the label it stands for: a piece's label, or a balloon number. */
    columns: z.record(z.string().regex(/^\d+$/), z.string().max(200)),
    stream: z.int().min(0).nullable().default(null),
  }),
]);
export type ReadingMapping = z.infer<typeof readingMapping>;

export const remapReadingsRequest = z
  .strictObject({
    settings: importSettings,
    mapping: readingMapping,
    /** Unit of the file's values where neither header nor column says so: none takes the drawing's. */
    unit: z.string().max(20).nullable().default(null),
    /** Stream for pieces not yet in the package. */
    newPiecesStreamId: id.nullable().default(null),
  })
  .meta({ id: 'RemapReadingsRequest' });
export type RemapReadingsRequest = z.input<typeof remapReadingsRequest>;

export const readingImportPreview = z
  .object({
    ...importPreviewBase,
    mapping: readingMapping.nullable(),
    unit: z.string().nullable(),
    newPiecesStreamId: id.nullable(),
    counts: z.object({
      readings: z.int(),
      same: z.int(),
      conflicts: z.int(),
      refused: z.int(),
      newPieces: z.int(),
    }),
    newPieces: z.array(z.string()),
    /** First rows of what would be written. */
    sample: z.array(
      z.object({
        line: z.int(),
        balloon: z.string(),
        piece: z.string(),
        text: z.string(),
        unit: z.string(),
        converted: z.string().nullable(),
      }),
    ),
    conflicts: z.array(
      z.object({
        key: z.string(),
        line: z.int(),
        balloon: z.string(),
        piece: z.string(),
        now: z.string(),
        inFile: z.string(),
      }),
    ),
  })
  .meta({ id: 'ReadingImportPreview' });
export type ReadingImportPreview = z.infer<typeof readingImportPreview>;

export const confirmReadingImportRequest = z
  .strictObject({
    /** For values already there: keep all, take all from the file, or take those named by key. */
    conflicts: z.discriminatedUnion('choice', [
      z.strictObject({ choice: z.literal('keep') }),
      z.strictObject({ choice: z.literal('replace') }),
      z.strictObject({ choice: z.literal('some'), replace: z.array(z.string().max(120)).max(20_000) }),
    ]),
  })
  .meta({ id: 'ConfirmReadingImportRequest' });
export type ConfirmReadingImportRequest = z.infer<typeof confirmReadingImportRequest>;
