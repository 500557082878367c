import { z } from 'zod';
import { checkReportSchema, reportSchemaVersion, type CheckReport } from './check-report.ts';

/**
 * One step a version: takes a report of that version, as JSON, to the next. A change of shape
 * adds its step here and raises `reportSchemaVersion`; steps are never changed afterwards.
 */
type Migration = (report: Record<string, unknown>) => Record<string, unknown>;
const migrations: ReadonlyMap<number, Migration> = new Map();

export type ReportReading =
  | { report: CheckReport }
  /** Written by a later version of Flightcase, or not a report at all. */
  | { problem: 'newer' | 'not-a-report'; issues: { path: string; message: string }[] };

/** Reads a report of any version from parsed JSON and brings it to today's shape. */
export function readReport(json: unknown, steps = migrations): ReportReading {
  const version = z.looseObject({ schema: z.number().int().positive() }).safeParse(json);
  if (!version.success) return notAReport(version.error);
  let report: Record<string, unknown> = version.data;
  if (version.data.schema > reportSchemaVersion) return { problem: 'newer', issues: [] };
  for (let from = version.data.schema; from < reportSchemaVersion; from++) {
    const step = steps.get(from);
    if (!step) throw new Error(`no step leads from report schema ${from} onwards`);
    report = { ...step(report), schema: from + 1 };
  }
  const parsed = checkReportSchema.safeParse(report);
  return parsed.success ? { report: parsed.data } : notAReport(parsed.error);
}

function notAReport(error: z.ZodError): ReportReading {
  return {
    problem: 'not-a-report',
    issues: error.issues.map(({ path, message }) => ({ path: path.join('.'), message })),
  };
}

/** The report's shape for other programs, as JSON Schema (draft 2020-12). */
export function reportJsonSchema(): object {
  return {
    title: `Flightcase check report, schema ${reportSchemaVersion}`,
    description:
      'What a check found. Levels are dBFS re full scale, silence is null. Frames are samples per channel, ranges half open. Paths use /.',
    ...z.toJSONSchema(checkReportSchema, { io: 'output' }),
  };
}
