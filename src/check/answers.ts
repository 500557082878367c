import type { Finding } from '#shared/findings/finding.ts';
import { apart } from '#shared/findings/shared-line.ts';
import { answerPath } from '#shared/judge/answers.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
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
  const path = answerPath(finding);
  const others = before.filter((given) => given.code !== code || given.path !== path);
  return answer === null ? others : [...others, { code, path, answer }];
}

/** Answers to findings that are still there. */
export function answersStillAsked(answers: Answers, findings: readonly Finding[]): Answers {
  const asked = new Set(
    findings.flatMap((finding) =>
      [finding, ...apart(finding)].map((one) => `${one.code} ${answerPath(one) ?? ''}`),
    ),
  );
  return answers.filter(({ code, path }) => asked.has(`${code} ${path ?? ''}`));
}

/** Repairs of findings that are still there, alone or in a line that stands for many files. */
export function repairsStillOpen(
  chosen: readonly ChosenRepair[],
  findings: readonly Finding[],
): ChosenRepair[] {
  const found = new Set(
    findings.flatMap((finding) => [finding, ...apart(finding)]).map(keyOfRepaired),
  );
  return chosen.filter((repair) => found.has(keyOfRepaired(repair)));
}

function keyOfRepaired({ code, files }: { code: string; files: readonly string[] }): string {
  return [code, ...files].join('\n');
}
