import type { Comparison } from '#shared/compare/comparison.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { JudgedFile } from '#shared/judge/judged-session.ts';
import { judgeSession } from '#shared/judge/judge-session.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import { measuredFile, session, type BuiltFile } from '../measure-builders.ts';

/** A session to be judged: five good tracks, and what is added to them. */
export type JudgedCase = {
  add?: JudgedFile[];
  /** Instead of the five good tracks. */
  instead?: JudgedFile[];
  comparison?: Partial<Comparison>;
  rules?: HouseRules;
  information?: Partial<SessionInformation>;
};

/** What is expected of a finding; what is left out is not compared. */
export type ExpectedFinding = Pick<Finding, 'code' | 'level' | 'files' | 'args'> & Partial<Finding>;

/** One code: how it comes about, and its twin in which it does not. */
export type FindingCase = {
  defect: JudgedCase;
  /** Everything that is found, in order: findings of files first, then the session's. */
  found: ExpectedFinding[];
  clean: JudgedCase;
  /** Other findings the clean twin has. */
  foundInClean?: ExpectedFinding[];
};

/** Names of good tracks, each of another nature. */
export const goodNames = [
  'Kick In.wav',
  'Bass DI.wav',
  'Electric Guitar.wav',
  'Piano.wav',
  'Lead Vocal.wav',
];

export function goodTracks(file: BuiltFile = {}): JudgedFile[] {
  return goodNames.map((path) => measuredFile({ ...file, path }));
}

/** Rules that ask for nothing to be brought, so that only what is looked at is found. */
export const quietRules: HouseRules = {
  ...defaultRules,
  bring: { ...defaultRules.bring, roughMix: 'not-needed', tempo: 'not-needed' },
};

export function judgeCase({ add = [], instead, comparison, rules, information }: JudgedCase) {
  return judgeSession(
    session([...(instead ?? goodTracks()), ...add], comparison),
    rules ?? quietRules,
    { ...emptySessionInformation(), ...information },
  );
}

/** All findings of a case: those of files in their order, then the session's. */
export function findingsOf(judged: JudgedCase): Finding[] {
  const judgement = judgeCase(judged);
  return [...judgement.files.flatMap((file) => file.findings), ...judgement.session.findings];
}
