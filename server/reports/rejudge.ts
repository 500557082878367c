import { judgeSession, judgeVersion } from '#shared/judge/judge-session.ts';
import type { JudgedFile } from '#shared/judge/judged-session.ts';
import { measureVersion } from '#shared/measure/measures.ts';
import { allFindings } from '#shared/judge/all-findings.ts';
import { followRepairs, keepUnpacked } from '#shared/repair/follow-repairs.ts';
import { entryFolders, type RepairPlan } from '#shared/repair/repair-plan.ts';
import type { CheckReport, ReportEntry } from '#shared/report/check-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { Finding } from '#shared/findings/finding.ts';

/** More files than this are not judged on a server that others wait for. */
const maxFiles = 1000;

/** What the server finds in the measures of a report: in what was dropped, in what is packed. */
export type Rejudgement = { dropped: Finding[]; packed: Finding[] };

/**
 * Judges the measures of a report with the given rules, as the sender's program should have
 * done. Null when nothing could be proved by it: the report was made by another version of
 * measures or judge, measures were left away to keep it small, or it has too many files.
 */
export function rejudge(report: CheckReport, rules: HouseRules): Rejudgement | null {
  if (report.measureVersion !== measureVersion || report.judgeVersion !== judgeVersion) return null;
  if (report.shortened !== 'nothing') return null;
  if (report.files.length > maxFiles || report.package.entries.length > maxFiles) return null;

  const { files, session, information } = report;
  const dropped = judgeSession({ files, comparison: session.comparison }, rules, information);
  const plan = planOf(report);
  const packed = judgeSession(
    {
      files: packedFiles(report),
      comparison: report.package.comparison ?? session.comparison,
    },
    rules,
    followRepairs(information, plan),
  );
  return {
    dropped: allFindings(dropped),
    packed: allFindings(keepUnpacked(packed, dropped, plan)),
  };
}

/** The entries as files: where no repair made other audio, they are what their source is. */
function packedFiles({ files, package: { entries } }: CheckReport): JudgedFile[] {
  const dropped = new Map(files.map((file) => [file.path, file]));
  return entries.flatMap((entry) => {
    const source = dropped.get(entry.from[0] ?? '');
    return source ? [packedFile(entry, source)] : [];
  });
}

function packedFile(entry: ReportEntry, source: JudgedFile): JudgedFile {
  const { to: path, bytes, format, crc32 } = entry;
  if (format && entry.measures) {
    const reading = { kind: 'track' as const, promisedFrames: format.frames };
    return { path, bytes, reading, format, measures: entry.measures };
  }
  const measures = source.measures && {
    ...source.measures,
    fileBytes: bytes,
    crc32: crc32 ?? source.measures.crc32,
  };
  return { path, bytes, reading: source.reading, format: source.format, measures };
}

/** The plan behind the package, as far as following it needs it. */
function planOf({ package: { entries, leftOut } }: CheckReport): RepairPlan {
  return {
    entries: entries.map(({ from, to, operations }) => ({
      ...{ from, to, operations },
      folder: entryFolders.find((folder) => folder !== '' && to.startsWith(`${folder}/`)) ?? '',
      rewriteAsWav: false,
    })),
    leftOut,
  };
}
