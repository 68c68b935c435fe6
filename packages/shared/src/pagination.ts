import { z } from 'zod';

export const maximumPageSize = 200;

/** Keyset page: `cursor` is opaque and comes from the page before. */
export const pageQuery = {
  cursor: z.string().max(500).optional(),
  limit: z.coerce.number().int().min(1).max(maximumPageSize).default(50),
};

export const page = <Item extends z.ZodType>(item: Item) =>
  z.object({ items: z.array(item), nextCursor: z.string().nullable() });

export interface Page<Item> {
  items: Item[];
  nextCursor: string | null;
}
