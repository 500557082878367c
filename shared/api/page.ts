import { z } from 'zod';

/** The most items a list answers with at once. */
export const maxPageItems = 100;

/**
 * Which page of a list: `cursor` is the `nextCursor` of the page before (opaque; leave it out
 * for the first page), `limit` the most items wanted, 1 to 100.
 */
export const pageQuerySchema = z.strictObject({
  cursor: z
    .string()
    .regex(/^[A-Za-z0-9_-]{1,200}$/)
    .optional(),
  limit: z.coerce.number().int().min(1).max(maxPageItems).default(50),
});
export type PageQuery = z.output<typeof pageQuerySchema>;

/** One page of a list; `nextCursor` is null on the last one. */
export function pageSchema<Item extends z.ZodType>(item: Item) {
  return z.strictObject({ items: z.array(item), nextCursor: z.string().nullable() });
}
