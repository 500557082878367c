import type { Finding } from '../findings/finding.ts';
import { apart } from '../findings/shared-line.ts';
import type { CheckReport, ReportFile } from './check-report.ts';

/** How a file of the later report stands to the earlier one. */
export type FileChange = {
  path: string;
  /** Path in the earlier report; null where the file is new. */
  formerPath: string | null;
  /** `renamed`: same audio under another name. `changed`: same name with other audio. */
  change: 'same' | 'renamed' | 'changed' | 'new';
};

/** What became of the findings about dropped files from one check to the next. */
export type ReportComparison = {
  files: FileChange[];
  /** Paths of files that are not there any more, under no name. */
  gone: string[];
  /** Findings of the later report that the earlier one did not have. */
  fresh: Finding[];
  /** Findings of the earlier report that are not there any more. */
  mended: Finding[];
  /** As the later report has them. */
  remaining: Finding[];
};

/** All findings about what was dropped; those about one file name it. */
export function droppedFindings({ files, session }: CheckReport): Finding[] {
  return [
    ...files.flatMap(({ path, findings }) =>
      findings.map((finding) => ({ ...finding, files: [path] })),
    ),
    ...session.findings,
  ];
}

/**
 * Sets two checks of one song against each other. A file is the same by its name, else by its
 * audio; a finding is the same by its code and the files it is about. A line that stands for many
 * files counts as a finding of each of them, so that it can be mended file by file.
 */
export function compareReports(before: CheckReport, after: CheckReport): ReportComparison {
  const files = followFiles(before.files, after.files);
  const formerPaths = new Map(files.map(({ path, formerPath }) => [path, formerPath ?? path]));
  const kept = new Set(files.map(({ formerPath }) => formerPath));

  const earlier = keyed(before, (path) => path);
  const later = keyed(after, (path) => formerPaths.get(path) ?? path);
  return {
    files,
    gone: before.files.map(({ path }) => path).filter((path) => !kept.has(path)),
    fresh: [...later].filter(([key]) => !earlier.has(key)).map(([, finding]) => finding),
    mended: [...earlier].filter(([key]) => !later.has(key)).map(([, finding]) => finding),
    remaining: [...later].filter(([key]) => earlier.has(key)).map(([, finding]) => finding),
  };
}

function followFiles(before: readonly ReportFile[], after: readonly ReportFile[]): FileChange[] {
  const byPath = new Map(before.map((file) => [file.path, file]));
  const paths = new Set(after.map(({ path }) => path));
  const unclaimed = new Map<string, string>();
  for (const { path, measures } of before) {
    if (measures && !paths.has(path)) unclaimed.set(measures.audioHash, path);
  }
  return after.map(({ path, bytes, measures }) => {
    const former = byPath.get(path);
    if (former) {
      const same = measures
        ? measures.audioHash === former.measures?.audioHash
        : bytes === former.bytes;
      return { path, formerPath: path, change: same ? 'same' : 'changed' };
    }
    const renamed = measures && unclaimed.get(measures.audioHash);
    if (!renamed) return { path, formerPath: null, change: 'new' };
    unclaimed.delete(measures.audioHash);
    return { path, formerPath: renamed, change: 'renamed' };
  });
}

/** Findings by what makes them the same one; `name` says under which name a file is known. */
function keyed(report: CheckReport, name: (path: string) => string): Map<string, Finding> {
  const findings = new Map<string, Finding>();
  for (const finding of droppedFindings(report).flatMap(apart)) {
    const files = finding.files.map(name).sort();
    findings.set(JSON.stringify([finding.code, finding.channel, files]), finding);
  }
  return findings;
}
