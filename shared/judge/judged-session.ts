import { z } from 'zod';
import { comparisonSchema } from '../compare/comparison.ts';
import { measuresSchema } from '../measure/measures.ts';
import { trackFormatSchema, unreadableReasons } from '../wave/track-format.ts';

/**
 * What the reader made of a file. `track` comes with format and measures, everything else without.
 */
export const judgedReadingSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('track'),
    /** Whole frames the header promises; null where it promises nothing (streamed headers). */
    promisedFrames: z.number().int().nonnegative().nullable(),
  }),
  z.strictObject({
    kind: z.literal('unreadable'),
    reason: z.enum(unreadableReasons),
    /** From the start of the file. */
    byteOffset: z.number().int().nonnegative(),
  }),
  z.strictObject({
    kind: z.literal('other-audio'),
    /** As people call it: `MP3`, `FLAC`. */
    formatName: z.string(),
    lossy: z.boolean(),
  }),
  /** Lyrics, MIDI, pictures: travels along, is not checked. */
  z.strictObject({ kind: z.literal('not-audio') }),
]);
export type JudgedReading = z.infer<typeof judgedReadingSchema>;

/**
 * Everything the judge knows about one file: plain data, no bytes. What a name means is not in
 * it, because that depends on the rules, and neither is a role, because people change it: both
 * are worked out anew each time. A file of a stored report can be handed over as it is.
 */
export const judgedFileSchema = z.object({
  /** Relative to the dropped folder, with `/`; unique in the session. */
  path: z.string(),
  bytes: z.number().int().nonnegative(),
  reading: judgedReadingSchema,
  /** Both null unless `reading.kind` is `track`. */
  format: trackFormatSchema.nullable(),
  measures: measuresSchema.nullable(),
});
export type JudgedFile = z.infer<typeof judgedFileSchema>;

export const judgedSessionSchema = z.object({
  files: z.array(judgedFileSchema),
  /** What second reads found out about files against each other. */
  comparison: comparisonSchema,
});
export type JudgedSession = z.infer<typeof judgedSessionSchema>;
