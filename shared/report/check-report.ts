import { z } from 'zod';
import { comparisonSchema } from '../compare/comparison.ts';
import { findingSchema, levels } from '../findings/finding.ts';
import { judgedReadingSchema } from '../judge/judged-session.ts';
import { measuresSchema } from '../measure/measures.ts';
import { operationSchema } from '../repair/repair-plan.ts';
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

export const checkReportSchema = z.strictObject({
  schema: z.literal(reportSchemaVersion),
  measureVersion: z.number().int(),
  judgeVersion: z.number().int(),
  /** SHA-256 over the canonical JSON of the rules that judged, 64 hex digits. */
  rulesHash: z.string().regex(/^[0-9a-f]{64}$/),
  /** Which meters ran: `wasm` or `oracle`. */
  engine: z.enum(['wasm', 'oracle']),
  verdict: z.enum(verdicts),
  /** Before any repair was taken; equal to verdict where none was. */
  verdictBeforeRepairs: z.enum(verdicts),
  information: sessionInformationSchema,
  files: z.array(reportFileSchema),
  session: z.strictObject({
    sampleRateHz: z.number().int().nullable(),
    bits: z.number().int().nullable(),
    frames: z.number().int().nullable(),
    /** Whether it is proven that all tracks begin at the same moment. */
    startsProven: z.boolean(),
    /** What second reads found out about files against each other: the judge's other input. */
    comparison: comparisonSchema,
    findings: z.array(findingSchema),
  }),
  package: z.strictObject({
    folderName: z.string(),
    entries: z.array(
      z.strictObject({
        from: z.array(z.string()),
        to: z.string(),
        repairs: z.array(z.string()),
        operations: z.array(operationSchema),
      }),
    ),
    leftOut: z.array(z.strictObject({ path: z.string(), reason: z.string() })),
  }),
  counts: z.record(z.enum(levels), z.number().int().nonnegative()),
});
export type CheckReport = z.infer<typeof checkReportSchema>;
