import { z } from 'zod';

/**
 * What bounded second reads found out about two files against each other. Plain data, stored
 * with the report, so that a change of rules needs no byte. It knows no thresholds: a pair is
 * listed where there is anything to say, and the judge decides what it means.
 */

/** The second file is the first one but for gain, shift and polarity. */
export const matchSchema = z.strictObject({
  first: z.string(),
  second: z.string(),
  /** Gain of the second over the first that matches them best, dB. */
  gainDb: z.number(),
  /** How many frames later the second has it; negative: earlier. */
  shiftFrames: z.number().int(),
  /** The second is the first upside down. */
  inverted: z.boolean(),
  /** What is left after matching, under the louder of both, dB (60: the difference is 60 dB down). */
  differenceUnderDb: z.number().nonnegative(),
});
export type Match = z.infer<typeof matchSchema>;

/** Two mono files whose names say left and right. */
export const sidesSchema = z.strictObject({
  left: z.string(),
  right: z.string(),
  /** Largest correlation within 10 ms, 0 to 1. */
  correlation: z.number().min(0).max(1),
  /** Correlation of their loudness over time in steps of 5 ms, -1 to 1. */
  loudnessCorrelation: z.number().min(-1).max(1),
});
export type Sides = z.infer<typeof sidesSchema>;

/**
 * A file of another length: whether its notes begin with those of the others when all begin
 * together, or when all end together (0: not at all, 1: always).
 */
export const alignmentSchema = z.strictObject({
  path: z.string(),
  /** The session's length minus this file's. */
  lackingFrames: z.number().int(),
  agreementFromStart: z.number().min(0).max(1),
  agreementFromEnd: z.number().min(0).max(1),
});
export type Alignment = z.infer<typeof alignmentSchema>;

export const comparisonSchema = z.strictObject({
  matches: z.array(matchSchema),
  sides: z.array(sidesSchema),
  /** Left out where all files have one length. */
  alignments: z.array(alignmentSchema).optional(),
});
export type Comparison = z.infer<typeof comparisonSchema>;

/** For sessions that were not compared (one file, or only their headers read). */
export function emptyComparison(): Comparison {
  return { matches: [], sides: [] };
}
