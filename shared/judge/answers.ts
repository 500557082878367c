import type { Finding } from '../findings/finding.ts';
import type { AnswerKind, SessionInformation } from '../session/session-information.ts';

/**
 * Under which path an answer to a finding is kept: the file it is about; the first of the files a
 * finding about several names; null for what concerns the whole session, and for a line that
 * stands for many files at once.
 */
export function answerPath(finding: Pick<Finding, 'files' | 'perFile'>): string | null {
  if (finding.perFile) return null;
  return finding.files[0] ?? null;
}

export type AnswerBook = (code: string, path: string | null) => AnswerKind | null;

/** Looks answers up by code and path; the last one given counts. */
export function answerBook(answers: SessionInformation['answers']): AnswerBook {
  const book = new Map<string, AnswerKind>();
  const key = (code: string, path: string | null): string => `${code} ${path ?? ''}`;
  for (const { code, path, answer } of answers) book.set(key(code, path), answer);
  return (code, path) => book.get(key(code, path)) ?? null;
}
