import { z } from 'zod';
import { findingCodes, levels } from '../findings/finding.ts';
import { namingSchema } from './naming-rules.ts';
import { thresholdsSchema } from './thresholds.ts';

/** Raised when the shape changes; older rules are migrated on reading. */
export const houseRulesSchemaVersion = 1;

const levelOrOff = z.enum([...levels, 'off']);

/** How pressing a finding is under these rules, also by instrument group, and why in own words. */
export const levelRuleSchema = z.strictObject({
  level: levelOrOff.optional(),
  /** Keys are group ids of the naming table. */
  byGroup: z.record(z.string(), levelOrOff).optional(),
  why: z.string().max(1000).optional(),
});
export type LevelRule = z.infer<typeof levelRuleSchema>;

const needSchema = z.enum(['required', 'welcome', 'not-needed']);

/**
 * How files must arrive, as one engineer wants them. Data only: the judge reads it, the editor
 * writes it, publishing freezes it. What a section leaves out has the default.
 */
export const houseRulesSchema = z.strictObject({
  schema: z.literal(houseRulesSchemaVersion),
  /** Shown above the rules: "How files must arrive at Harbour Lane". */
  title: z.string().max(200).default(''),
  format: z
    .strictObject({
      /** Allowed rates; empty: any, as long as all files agree. */
      sampleRatesHz: z.array(z.number().int().min(8000).max(768_000)).default([]),
      minimumBits: z.number().int().min(8).max(64).default(24),
    })
    .prefault({}),
  startAndLength: z
    .strictObject({
      /** Lengths that differ by no more than this are the same length. */
      lengthToleranceFrames: z.number().int().min(0).default(0),
    })
    .prefault({}),
  signal: thresholdsSchema.prefault({}),
  names: namingSchema,
  folder: z
    .strictObject({
      /** Tokens {artist} {title} {tempo}; a token that is not known takes its separator along. */
      template: z.string().min(1).max(200).default('{artist} - {title} - {tempo} BPM'),
    })
    .prefault({}),
  bring: z
    .strictObject({
      roughMix: needSchema.default('required'),
      /** The order of importance can stand in for the rough mix. */
      orderInsteadOfRoughMix: z.boolean().default(false),
      references: z.number().int().min(0).max(20).default(0),
      orderOfImportance: needSchema.default('welcome'),
      notes: needSchema.default('welcome'),
      tempo: needSchema.default('required'),
      /** Group ids whose processed parts must come with the clean signal beside them. */
      diFor: z.array(z.string()).default([]),
      dryFor: z.array(z.string()).default([]),
      untunedFor: z.array(z.string()).default([]),
    })
    .prefault({}),
  /** What no file can show; the artist ticks each. */
  confirm: z
    .array(
      z.strictObject({
        id: z
          .string()
          .regex(/^[a-z0-9-]{1,40}$/, 'must be small letters, digits and hyphens, 40 at most'),
        text: z.string().min(1).max(300),
      }),
    )
    .max(30)
    .default([]),
  /** Free notes, Markdown. */
  notes: z.string().max(20_000).default(''),
  /** Only what differs from the default levels. */
  levels: z.partialRecord(z.enum(findingCodes), levelRuleSchema).default({}),
});
export type HouseRules = z.infer<typeof houseRulesSchema>;
