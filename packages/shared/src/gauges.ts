import { z } from 'zod';
import { calendarDate, decimalText, id, optionalShortText, shortText, version } from './primitives.ts';
import { unitSymbol } from './characteristics.ts';
import { page, pageQuery } from './pagination.ts';

export const gaugeRequest = z
  .strictObject({
    code: shortText.max(60),
    kind: shortText,
    resolution: decimalText.nullable().default(null),
    unit: unitSymbol.default('mm'),
    calibratedOn: calendarDate.nullable().default(null),
    dueOn: calendarDate.nullable().default(null),
    certificate: optionalShortText.default(''),
  })
  .meta({ id: 'GaugeRequest' });
export type GaugeRequest = z.input<typeof gaugeRequest>;

export const gaugeResponse = z
  .object({
    id,
    code: z.string(),
    kind: z.string(),
    resolution: z.string().nullable(),
    unit: unitSymbol,
    calibratedOn: calendarDate.nullable(),
    dueOn: calendarDate.nullable(),
    certificate: z.string(),
    version,
  })
  .meta({ id: 'Gauge' });
export type GaugeResponse = z.infer<typeof gaugeResponse>;
export const gaugeListQuery = z.strictObject({
  ...pageQuery,
  q: z.string().trim().max(100).optional(),
  sort: z.enum(['code', '-code', 'dueOn', '-dueOn']).default('code'),
});
export const gaugeListResponse = page(gaugeResponse).meta({ id: 'GaugeList' });
