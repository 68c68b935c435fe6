import { z } from 'zod';
import { characteristicClass, characteristicKind, geometricSpec, unitSymbol } from './characteristics.ts';
import { calendarDate, id, longText, version } from './primitives.ts';
import { verdict } from './status.ts';

export const streamResponse = z
  .object({
    id,
    name: z.string(),
    sequence: z.int(),
    blocked: z.boolean(),
    blockedReason: z.string(),
    version,
  })
  .meta({ id: 'Stream' });
export type StreamResponse = z.infer<typeof streamResponse>;

export const pieceResponse = z
  .object({
    id,
    streamId: id,
    label: z.string(),
    sequence: z.int(),
    madeOn: calendarDate.nullable(),
    lot: z.string(),
    version,
  })
  .meta({ id: 'Piece' });
export type PieceResponse = z.infer<typeof pieceResponse>;

/** A characteristic as the measuring person needs it. */
export const sheetCharacteristic = z.object({
  id,
  sequence: z.int(),
  balloon: z.string(),
  sheet: z.string(),
  zone: z.string(),
  description: z.string(),
  kind: characteristicKind,
  class: characteristicClass,
  unit: unitSymbol,
  decimals: z.int(),
  nominal: z.string().nullable(),
  lowerLimit: z.string().nullable(),
  upperLimit: z.string().nullable(),
  naturalLower: z.boolean(),
  geometric: geometricSpec.nullable(),
  attributeAllowed: z.boolean(),
  method: z.string(),
  /** Pieces asked for in each stream. */
  pieces: z.int(),
});
export type SheetCharacteristic = z.infer<typeof sheetCharacteristic>;

/** Result of one characteristic in one stream. */
export const rowResult = z.object({
  characteristicId: id,
  streamId: id,
  /** Exact texts in the order of the stream's pieces; null is not measured. */
  readings: z.array(z.string().nullable()),
  /** One letter a reading: i in tolerance, o out, u undecided, n not measured, x no verdict, r refused text. */
  marks: z.string(),
  attribute: z.object({ checked: z.int(), failed: z.int() }).nullable(),
  gaugeId: id.nullable(),
  measuredOn: calendarDate.nullable(),
  note: z.string(),
  n: z.int(),
  minimum: z.string().nullable(),
  maximum: z.string().nullable(),
  mean: z.number().nullable(),
  standardDeviation: z.number().nullable(),
  outCount: z.int(),
  undecidedCount: z.int(),
  verdict,
  /** Zero while nothing has been stored for the row. */
  version: z.int().min(0),
});
export type RowResult = z.infer<typeof rowResult>;

export const measurementSheetQuery = z.strictObject({
  /** Sequence of the last characteristic already held. */
  after: z.coerce.number().int().min(0).default(0),
  limit: z.coerce.number().int().min(1).max(500).default(200),
});
export const measurementSheetResponse = z
  .object({
    streams: z.array(streamResponse),
    pieces: z.array(pieceResponse),
    characteristics: z.array(sheetCharacteristic),
    rows: z.array(rowResult),
    /** `after` of the next page; null at the end. */
    next: z.int().nullable(),
    total: z.int(),
    editable: z.boolean(),
  })
  .meta({ id: 'MeasurementSheet' });
export type MeasurementSheetResponse = z.infer<typeof measurementSheetResponse>;

/** A reading is kept exactly as typed; the server refuses what is not a decimal number and says why. */
export const readingText = z.string().trim().min(1).max(60);

export const saveReadingsRequest = z
  .strictObject({
    changes: z
      .array(
        z.strictObject({
          characteristicId: id,
          pieceId: id,
          text: readingText.nullable(),
          /** What stood there when the person typed: another value now is a conflict, not overwritten. */
          was: z.string().nullable(),
        }),
      )
      .min(1)
      .max(600_000),
    /** Write even where another value stands now. */
    overwrite: z.boolean().default(false),
  })
  .meta({ id: 'SaveReadingsRequest' });
export type SaveReadingsRequest = z.input<typeof saveReadingsRequest>;

export const saveReadingsResponse = z
  .object({
    rows: z.array(rowResult),
    conflicts: z.array(
      z.object({
        characteristicId: id,
        pieceId: id,
        now: z.string().nullable(),
        wanted: z.string().nullable(),
      }),
    ),
    refused: z.array(z.object({ characteristicId: id, pieceId: id, text: z.string(), reason: z.string() })),
  })
  .meta({ id: 'SaveReadingsResponse' });
export type SaveReadingsResponse = z.infer<typeof saveReadingsResponse>;

export const changeRowRequest = z
  .strictObject({
    gaugeId: id.nullable(),
    measuredOn: calendarDate.nullable(),
    note: longText,
    attribute: z
      .strictObject({ checked: z.int().min(1).max(100_000), failed: z.int().min(0).max(100_000) })
      .refine((counts) => counts.failed <= counts.checked, 'More pieces failed than were checked.')
      .nullable(),
  })
  .meta({ id: 'ChangeRowRequest' });
export type ChangeRowRequest = z.input<typeof changeRowRequest>;

/** Sets gauge and date of many rows at once. */
export const fillRowsRequest = z
  .strictObject({
    rows: z
      .array(z.strictObject({ characteristicId: id, streamId: id }))
      .min(1)
      .max(20_000),
    gaugeId: id.nullable().optional(),
    measuredOn: calendarDate.nullable().optional(),
  })
  .meta({ id: 'FillRowsRequest' });
export type FillRowsRequest = z.infer<typeof fillRowsRequest>;
export const rowsResponse = z.object({ rows: z.array(rowResult) }).meta({ id: 'Rows' });
