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
  /** Relative to the dropped folder, with `/`. */
  path: z.string(),
  bytes: z.number().int().nonnegative(),
  role: z.enum(fileRoles),
  /** What the reader made of it; with format and measures this is what the judge needs. */
  reading: judgedReadingSchema,
  /** null for what is not measured (other audio, notes, unreadable). */
  format: trackFormatSchema.nullable(),
  measures: measuresSchema.nullable(),
  /** Group id of the naming table; null if no instrument was recognised. */
  group: z.string().nullable(),
  /** Without extension; null where no name can be proposed. */
  proposedName: z.string().nullable(),
  findings: z.array(fileFindingSchema),
});
export type ReportFile = z.infer<typeof reportFileSchema>;

/** One file of the package. Beside its audio it says what was done to it, and to what. */
export const reportEntrySchema = z.strictObject({
  /** Paths in the dropped folder; two where left and right were joined. */
  from: z.array(z.string()).min(1).max(2),
  /** Path in the package folder. */
  to: z.string(),
  /** What was done, in the order of doing; empty for a copy under the same name. */
  repairs: z.array(z.enum(repairKinds)),
  operations: z.array(operationSchema),
  bytes: z.number().int().nonnegative(),
  /** CRC-32 of the packed file, 8 hex digits; null for what was not measured (notes, pictures). */
  crc32: z
    .string()
    .regex(/^[0-9a-f]{8}$/)
    .nullable(),
  /** Only where a repair made other audio of it; else those of its source hold. */
  format: trackFormatSchema.nullable(),
  measures: measuresSchema.nullable(),
});
export type ReportEntry = z.infer<typeof reportEntrySchema>;

/** What was left away so that the report stays within its size; each step includes the ones before. */
export const shortenings = ['nothing', 'places', 'measures', 'files'] as const;

export const checkReportSchema = z.strictObject({
  schema: z.literal(reportSchemaVersion),
  measureVersion: z.number().int(),
  judgeVersion: z.number().int(),
  /** SHA-256 over the canonical JSON of the rules that judged, 64 hex digits. */
  rulesHash: z.string().regex(/^[0-9a-f]{64}$/),
  /** Which meters ran: `wasm` or `oracle`. */
  engine: z.enum(['wasm', 'oracle']),
  /** Of what is packed. */
  verdict: z.enum(verdicts),
  /** Before any repair was taken; equal to verdict where none was. */
  verdictBeforeRepairs: z.enum(verdicts),
  information: sessionInformationSchema,
  /** As they were dropped, with what was found in them. */
  files: z.array(reportFileSchema),
  session: z.strictObject({
    sampleRateHz: z.number().int().nullable(),
    bits: z.number().int().nullable(),
    frames: z.number().int().nullable(),
    /** Whether it is proven that all tracks begin at the same moment. */
    startsProven: z.boolean(),
    findings: z.array(findingSchema),
    comparison: comparisonSchema,
  }),
  package: z.strictObject({
    folderName: z.string(),
    entries: z.array(reportEntrySchema),
    leftOut: z.array(leftOutSchema),
    /** What is still found once the repairs are made; `files` are paths in the package. */
    findings: z.array(findingSchema),
    /** Of the packed files, by their paths in the package. */
    comparison: comparisonSchema,
  }),
  /** Findings that remain, by level. */
  counts: z.record(z.enum(levels), z.number().int().nonnegative()),
  shortened: z.enum(shortenings),
});
export type CheckReport = z.infer<typeof checkReportSchema>;
