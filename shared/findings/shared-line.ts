import type { Finding } from './finding.ts';

/** A line that stands for many files, as the findings those files would have alone. */
export function apart(finding: Finding): Finding[] {
  const { perFile, ...line } = finding;
  return perFile
    ? perFile.map(({ path, ...own }) => ({ ...line, ...own, files: [path] }))
    : [finding];
}
