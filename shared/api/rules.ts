import { z } from 'zod';
import { houseRulesSchema } from '../rules/house-rules.ts';
import { defineEndpoint } from './endpoint.ts';
import { momentSchema, slugSchema } from './fields.ts';
import { pageQuerySchema, pageSchema } from './page.ts';

/** SHA-256 in lower-case hexadecimal of the rules as canonical JSON. */
export const rulesHashSchema = z.string().regex(/^[0-9a-f]{64}$/);

/** Editions are numbered 1, 2, 3 … in each studio. */
export const editionNumberSchema = z.number().int().min(1).max(1_000_000);

export const editionSummarySchema = z.strictObject({
  number: editionNumberSchema,
  publishedAt: momentSchema,
  /** What is different from the edition before, in the engineer's words; empty for the first. */
  changeSummary: z.string(),
  rulesHash: rulesHashSchema,
});
export type EditionSummary = z.output<typeof editionSummarySchema>;

export const editionSchema = editionSummarySchema.extend({
  studio: z.strictObject({ slug: slugSchema, name: z.string() }),
  rules: houseRulesSchema,
});
export type Edition = z.output<typeof editionSchema>;

/** A studio's published editions, newest first. For everybody, visitors too. */
export const listEditions = defineEndpoint({
  method: 'GET',
  path: '/api/rules/:slug/editions',
  params: z.strictObject({ slug: slugSchema }),
  query: pageQuerySchema,
  response: pageSchema(editionSummarySchema),
});

/** One published edition, or the `latest`. For everybody, visitors too. */
export const getEdition = defineEndpoint({
  method: 'GET',
  path: '/api/rules/:slug/editions/:number',
  params: z.strictObject({
    slug: slugSchema,
    number: z.union([z.literal('latest'), z.coerce.number().pipe(editionNumberSchema)]),
  }),
  response: editionSchema,
});
