import type { Finding } from '#shared/findings/finding.ts';

/** Where the picture's marks lead: an id made of the finding's own key. */
export function anchorOf({ code, files }: Pick<Finding, 'code' | 'files'>): string {
  return `finding-${code}-${files.join('-').replace(/[^A-Za-z0-9]+/g, '-')}`;
}

/** The place of a finding in the picture: what "Show in the picture" leads to, and back. */
export function markOf(path: string, code: string): string {
  return `mark-${code}-${path.replace(/[^A-Za-z0-9]+/g, '-')}`;
}
