import { z } from 'zod';
import { comparisonSchema } from '../compare/comparison.ts';
import { findingSchema, levels, repairKinds } from '../findings/finding.ts';
import { judgedReadingSchema } from '../judge/judged-session.ts';
import { measuresSchema } from '../measure/measures.ts';
import { leftOutSchema, operationSchema } from '../repair/repair-plan.ts';
import { fileRoles, sessionInformationSchema } from '../session/session-information.ts';
import { trackFormatSchema } from '../wave/track-format.ts';

/** Raised when the report's shape changes; older reports are migrated on reading. */
export const reportSchemaVersion = 1;

/** A stored report never exceeds this. */
export const maxReportBytes = 2 * 1024 * 1024;

/** The worst level that remains: `ready` when nothing is left but notes. */
export const verdicts = ['ready', 'look', 'must-fix'] as const;

/** A finding about one file stands with its file, so it does not repeat the path. */
const fileFindingSchema = findingSchema.omit({ files: true, perFile: true });

export const reportFileSchema = z.strictObject({
  path: z.string().describe('Relative to the dropped folder, with `/`.'),
  bytes: z.number().int().nonnegative(),
  role: z.enum(fileRoles),
  reading: judgedReadingSchema.describe(
    'What the reader made of it; with format and measures this is what the judge needs.',
  ),
  format: trackFormatSchema
    .nullable()
    .describe('null for what is not measured (other audio, notes, unreadable).'),
  measures: measuresSchema.nullable(),
  group: z
    .string()
    .nullable()
    .describe('Group id of the naming table; null if no instrument was recognised.'),
  proposedName: z
    .string()
    .nullable()
    .describe('Without extension; null where no name can be proposed.'),
  findings: z.array(fileFindingSchema),
});
export type ReportFile = z.infer<typeof reportFileSchema>;

/** One file of the package. Beside its audio it says what was done to it, and to what. */
export const reportEntrySchema = z.strictObject({
  from: z
    .array(z.string())
    .min(1)
    .max(2)
    .describe('Paths in the dropped folder; two where left and right were joined.'),
  to: z.string().describe('Path in the package folder.'),
  repairs: z
    .array(z.enum(repairKinds))
    .describe('What was done, in the order of doing; empty for a copy under the same name.'),
  operations: z.array(operationSchema),
  bytes: z.number().int().nonnegative(),
  crc32: z
    .string()
    .regex(/^[0-9a-f]{8}$/)
    .nullable()
    .describe('CRC-32 of the packed file, 8 hex digits; null for what was not measured'),
  format: trackFormatSchema
    .nullable()
    .describe('Only where a repair made other audio of it; else those of its source hold.'),
  measures: measuresSchema.nullable(),
});
export type ReportEntry = z.infer<typeof reportEntrySchema>;

/** What was left away so that the report stays within its size; each step includes the ones before. */
export const shortenings = ['nothing', 'places', 'measures', 'files'] as const;

export const checkReportSchema = z.strictObject({
  schema: z.literal(reportSchemaVersion),
  measureVersion: z.number().int(),
  judgeVersion: z.number().int(),
  rulesHash: z
    .string()
    .regex(/^[0-9a-f]{64}$/)
    .describe('SHA-256 over the canonical JSON of the rules that judged, 64 hex digits.'),
  engine: z.enum(['wasm', 'oracle']).describe('Which meters ran: `wasm` or `oracle`.'),
  verdict: z.enum(verdicts).describe('Of what is packed.'),
  verdictBeforeRepairs: z
    .enum(verdicts)
    .describe('Before any repair was taken; equal to verdict where none was.'),
  information: sessionInformationSchema,
  files: z.array(reportFileSchema).describe('As they were dropped, with what was found in them.'),
  session: z.strictObject({
    sampleRateHz: z.number().int().nullable(),
    bits: z.number().int().nullable(),
    frames: z.number().int().nullable(),
    startsProven: z
      .boolean()
      .describe('Whether it is proven that all tracks begin at the same moment.'),
    findings: z.array(findingSchema),
    comparison: comparisonSchema,
  }),
  package: z.strictObject({
    folderName: z.string(),
    entries: z.array(reportEntrySchema),
    leftOut: z.array(leftOutSchema),
    findings: z
      .array(findingSchema)
      .describe('What is still found once the repairs are made; `files` are paths in the package.'),
    comparison: comparisonSchema.describe('Of the packed files, by their paths in the package.'),
  }),
  counts: z
    .record(z.enum(levels), z.number().int().nonnegative())
    .describe('Findings that remain, by level.'),
  shortened: z.enum(shortenings).describe('What was left away to keep the report small'),
});
export type CheckReport = z.infer<typeof checkReportSchema>;
