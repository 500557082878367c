import type { Finding } from '#shared/findings/finding.ts';
import type { AnswerKind, SessionInformation } from '#shared/session/session-information.ts';

type Answers = SessionInformation['answers'];

/** What buttons say and reports show. */
export const answerWords: Record<AnswerKind, string> = {
  'on-purpose': 'On purpose',
  'all-there-is': 'All there is',
  'cannot-export-again': 'Cannot export again',
};

/** The answers with this one given, changed or (null) taken back. */
export function answered(before: Answers, finding: Finding, answer: AnswerKind | null): Answers {
  const { code } = finding;
  // A line about one file is answered for that file, any other for the whole session.
  const path = finding.files.length === 1 && !finding.perFile ? (finding.files[0] ?? null) : null;
  const others = before.filter((given) => given.code !== code || given.path !== path);
  return answer === null ? others : [...others, { code, path, answer }];
}
