import { z } from 'zod';
import { answerKinds } from '../session/session-information.ts';

/** Every code there is; the catalogue (findings/catalogue) has its arguments and its words. */
export const findingCodes = [
  // file and format
  'unreadable',
  'cut-short',
  'changed-while-read',
  'not-wav',
  'lossy',
  'sample-rate-differs',
  'wrong-speed',
  'sample-rate-not-allowed',
  'bit-depth-low',
  'bit-depth-differs',
  'empty-bits',
  'too-many-channels',
  'dual-mono',
  'sides-cancel',
  'one-side-silent',
  'split-stereo',
  // start and length
  'length-differs',
  'start-differs',
  'not-consolidated',
  'tail-cut',
  // signal
  'clipped',
  'flat-tops',
  'over-full-scale',
  'between-sample-over',
  'above-ceiling',
  'starts-on-sound',
  'ends-on-sound',
  'dropout',
  'silent',
  'nearly-silent',
  'dc-offset',
  'same-audio',
  'polarity-twin',
  'not-a-number',
  // names
  'name-breaks-rule',
  'name-unclear',
  'number-repeated',
  'number-missing',
  'name-too-long',
  'name-characters',
  'name-reserved',
  'name-clash',
  'export-leftover',
  'looks-like-takes',
  // completeness
  'rough-mix-missing',
  'reference-missing',
  'order-missing',
  'notes-missing',
  'di-missing',
  'dry-missing',
  'untuned-missing',
  'tempo-missing',
] as const;
export type FindingCode = (typeof findingCodes)[number];

/** Levels, the most pressing first. */
export const levels = ['must-fix', 'look', 'note'] as const;
export type Level = (typeof levels)[number];

/** Changes Flightcase can make; repair/ carries them out. */
export const repairKinds = [
  'rename',
  'rewrite-container',
  'split',
  'join',
  'keep-one-side',
  'add-silence',
  'leave-out',
  'fade',
  'gain',
  'move',
  'high-pass',
] as const;
export type RepairKind = (typeof repairKinds)[number];

/** The repairs that may be taken in one go: they cannot change how anything sounds. */
export const safeRepairKinds: readonly RepairKind[] = [
  'rename',
  'rewrite-container',
  'split',
  'join',
  'keep-one-side',
  'add-silence',
];

/** A finding keeps at most this many places; `places` has the true number. */
export const maxFindingRanges = 200;

export const findingRangeSchema = z.strictObject({
  startFrame: z.number().int().nonnegative(),
  /** One past the last frame. */
  endFrame: z.number().int().nonnegative(),
  confidence: z.enum(['sure', 'likely']),
});
export type FindingRange = z.infer<typeof findingRangeSchema>;

const argumentSchema = z.union([
  z.number(),
  z.string(),
  z.boolean(),
  z.null(),
  z.array(z.number()).max(500),
  z.array(z.string()).max(500),
  /** Things with a few words each, such as what is wrong with a name. */
  z.array(z.record(z.string(), z.union([z.string(), z.number()]))).max(50),
]);

const argumentsSchema = z.record(z.string(), argumentSchema);

/** A line that stands for many files keeps at most this many places of each. */
export const maxSharedRanges = 20;

/**
 * One thing found. About one file (`files` has one path) or about several (a session finding).
 * `args` are the numbers and words its sentences need, typed a code at a time in the catalogue,
 * with units in their names.
 */
export const findingSchema = z.strictObject({
  code: z.enum(findingCodes),
  level: z.enum(levels),
  files: z.array(z.string()),
  /** 0-based; null where it concerns the whole file. */
  channel: z.number().int().nonnegative().nullable(),
  places: z.number().int().nonnegative(),
  ranges: z.array(findingRangeSchema).max(maxFindingRanges),
  args: argumentsSchema,
  /** Place in the house rules this comes from, dotted: `signal.ceilingDbfs`. */
  rule: z.string(),
  repairs: z.array(z.enum(repairKinds)),
  answer: z.enum(answerKinds).nullable(),
  /**
   * Only on a session line that stands for the same finding in at least half of the files: what
   * each of `files` would have said alone. `args` are then those of the worst of them, `places`
   * is the sum and `ranges` is empty.
   */
  perFile: z
    .array(
      z.strictObject({
        path: z.string(),
        channel: z.number().int().nonnegative().nullable(),
        places: z.number().int().nonnegative(),
        ranges: z.array(findingRangeSchema).max(maxSharedRanges),
        args: argumentsSchema,
      }),
    )
    .optional(),
});
export type Finding = z.infer<typeof findingSchema>;
