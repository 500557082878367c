import type { Comparison } from '../compare/comparison.ts';
import { apart } from '../findings/shared-line.ts';
import { allFindings } from '../judge/all-findings.ts';
import type { Judgement } from '../judge/judge-session.ts';
import { countLevels, verdictOf } from '../judge/verdict.ts';
import type { SessionInformation } from '../session/session-information.ts';
import type { RepairPlan } from './repair-plan.ts';
import { fileNameOf, splitExtension } from '../naming/safe-names.ts';

/**
 * What was said about the dropped files, said about the entries they became: paths are those in
 * the package. What was left out is no longer spoken of.
 */
export function followRepairs(
  information: SessionInformation,
  plan: RepairPlan,
): SessionInformation {
  const became = new Map<string, string[]>();
  for (const { from, to } of plan.entries) {
    for (const path of from) became.set(path, [...(became.get(path) ?? []), to]);
  }
  const follow = (path: string): string[] => became.get(path) ?? [];
  const { tempo } = information;
  const folderRoles = { 'Rough mix': 'rough-mix', References: 'reference', Notes: 'note' } as const;
  return {
    ...information,
    tempo:
      tempo?.kind === 'map' ? { kind: 'map', path: follow(tempo.path)[0] ?? tempo.path } : tempo,
    roles: Object.fromEntries([
      ...Object.entries(information.roles).flatMap(([path, role]) =>
        follow(path).map((to) => [to, role] as const),
      ),
      ...plan.entries.flatMap(({ to, folder }) =>
        folder === '' ? [] : [[to, folderRoles[folder]] as const],
      ),
    ]),
    names: Object.fromEntries(
      plan.entries
        .filter(({ from }) => from.some((path) => information.names[path]))
        .map(({ to }) => [to, splitExtension(fileNameOf(to)).base]),
    ),
    orderOfImportance: information.orderOfImportance
      ? [...new Set(information.orderOfImportance.flatMap(follow))]
      : null,
    answers: information.answers.flatMap((answer) =>
      answer.path === null ? [answer] : follow(answer.path).map((path) => ({ ...answer, path })),
    ),
  };
}

/** The comparison of the dropped files, said about entries whose samples are all untouched. */
export function followComparison(comparison: Comparison, plan: RepairPlan): Comparison {
  const became = new Map(plan.entries.flatMap(({ from, to }) => from.map((path) => [path, to])));
  return {
    matches: comparison.matches.flatMap((match) => {
      const first = became.get(match.first);
      const second = became.get(match.second);
      return first && second ? [{ ...match, first, second }] : [];
    }),
    sides: comparison.sides.flatMap((sides) => {
      const left = became.get(sides.left);
      const right = became.get(sides.right);
      return left && right ? [{ ...sides, left, right }] : [];
    }),
    ...(comparison.alignments && {
      alignments: comparison.alignments.flatMap((alignment) => {
        const path = became.get(alignment.path);
        return path ? [{ ...alignment, path }] : [];
      }),
    }),
  };
}

/**
 * What was found in files that cannot be packed stays open: a track that is damaged or compressed
 * is missing in the package, and nothing in the package says so. Their names no longer matter.
 */
export function keepUnpacked(
  after: Judgement,
  before: Judgement,
  { leftOut }: Pick<RepairPlan, 'leftOut'>,
): Judgement {
  const unpacked = new Set(
    leftOut.filter(({ reason }) => reason === 'not-packable').map(({ path }) => path),
  );
  const kept = allFindings(before)
    .flatMap(apart)
    .filter(
      ({ files, repairs }) =>
        files.length > 0 &&
        files.every((path) => unpacked.has(path)) &&
        !repairs.includes('rename'),
    );
  if (kept.length === 0) return after;
  const session = { ...after.session, findings: [...after.session.findings, ...kept] };
  const findings = allFindings({ files: after.files, session });
  return { ...after, session, verdict: verdictOf(findings), counts: countLevels(findings) };
}
