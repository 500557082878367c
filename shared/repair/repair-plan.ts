import { z } from 'zod';
import { repairKinds } from '../findings/finding.ts';

const frames = z.number().int();

/**
 * What is done to a file on its way into the zip, in source frames, always in this order:
 * channels, high-pass, gain, fade, move or pad, encode. Files on disk are never touched.
 */
export const operationSchema = z.discriminatedUnion('kind', [
  /** One channel of one source becomes the whole output (split, keep one side). */
  z.strictObject({ kind: z.literal('take-channel'), channel: z.number().int().nonnegative() }),
  /** First source left, second right. */
  z.strictObject({ kind: z.literal('join') }),
  z.strictObject({ kind: z.literal('high-pass'), cutoffHz: z.number().positive() }),
  z.strictObject({ kind: z.literal('gain'), gainDb: z.number() }),
  /** From silence (in), to silence (out), or across a join (cross), over [startFrame, endFrame). */
  z.strictObject({
    kind: z.literal('fade'),
    shape: z.enum(['in', 'out', 'cross']),
    startFrame: frames.nonnegative(),
    endFrame: frames.nonnegative(),
    channel: z.number().int().nonnegative().nullable(),
  }),
  /** Later (positive: silence in front) or earlier (negative: frames dropped from the front). */
  z.strictObject({ kind: z.literal('move'), byFrames: frames }),
  /** Silence at the end until the output has this many frames. */
  z.strictObject({ kind: z.literal('pad'), toFrames: frames.nonnegative() }),
]);
export type Operation = z.infer<typeof operationSchema>;

export const entryFolders = ['', 'Rough mix', 'References', 'Notes'] as const;

/** One file of the zip that comes from one or two dropped files. */
export const plannedEntrySchema = z.strictObject({
  /** Paths in the dropped folder; two for a join (left, right). */
  from: z.array(z.string()).min(1).max(2),
  /** Path inside the package folder, with extension. */
  to: z.string(),
  folder: z.enum(entryFolders),
  /** Empty: the bytes are copied as they are (but for metadata that must not travel). */
  operations: z.array(operationSchema),
  /** Written as a WAV file whatever the container of the source was. */
  rewriteAsWav: z.boolean(),
});
export type PlannedEntry = z.infer<typeof plannedEntrySchema>;

/** A repair somebody chose. `files` as in the finding it answers. */
export const chosenRepairSchema = z.strictObject({
  repair: z.enum(repairKinds),
  code: z.string(),
  files: z.array(z.string()).min(1),
  /** Which side to keep, how much gain, how far to move: only where the repair leaves a choice. */
  channel: z.number().int().nonnegative().optional(),
  gainDb: z.number().optional(),
  byFrames: frames.optional(),
  startFrame: frames.nonnegative().optional(),
});
export type ChosenRepair = z.infer<typeof chosenRepairSchema>;

/** A dropped file that is not packed, and why. */
export const leftOutSchema = z.strictObject({
  path: z.string(),
  reason: z.enum(['junk', 'not-packable', 'chosen', 'duplicate']),
});
export type LeftOut = z.infer<typeof leftOutSchema>;

/** Every dropped file is in an entry or left out. */
export const repairPlanSchema = z.strictObject({
  entries: z.array(plannedEntrySchema),
  leftOut: z.array(leftOutSchema),
});
export type RepairPlan = z.infer<typeof repairPlanSchema>;
