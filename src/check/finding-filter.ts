import type { Finding, FindingCode, Level } from '#shared/findings/finding.ts';

/** Which findings are listed; null: whatever it is. */
export type FindingFilter = { level: Level | null; path: string | null; code: FindingCode | null };

export const noFilter: FindingFilter = { level: null, path: null, code: null };

export function isFiltered({ level, path, code }: FindingFilter): boolean {
  return level !== null || path !== null || code !== null;
}

/** Findings that fit every part of the filter. */
export function filterFindings(
  findings: readonly Finding[],
  { level, path, code }: FindingFilter,
): Finding[] {
  return findings.filter(
    (finding) =>
      (level === null || finding.level === level) &&
      (path === null || finding.files.includes(path)) &&
      (code === null || finding.code === code),
  );
}
