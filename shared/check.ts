import type { DroppedFile } from './bytes/byte-source.ts';
import type { Comparison } from './compare/comparison.ts';
import { judgeSession, type Judgement } from './judge/judge-session.ts';
import type { ChecksumEngine } from './pack/checksums.ts';
import { packFiles, type Package } from './pack/pack-entries.ts';
import { listPackedFiles } from './pack/packing-list.ts';
import { followComparison, followRepairs, keepUnpacked } from './repair/follow-repairs.ts';
import { droppedTracks, measureEntries } from './repair/measure-entries.ts';
import { planRepairs } from './repair/plan-repairs.ts';
import { keepsSamples } from './repair/render-entry.ts';
import type { ChosenRepair, RepairPlan } from './repair/repair-plan.ts';
import type { CheckReport } from './report/check-report.ts';
import type { HouseRules } from './rules/house-rules.ts';
import { compareFiles } from './session/compare-files.ts';
import { judgedFiles } from './session/judged-files.ts';
import { measureAll, type MeasureAllOptions } from './session/measure-all.ts';
import type { MeasureFile } from './session/measure-file.ts';
import type { MeasuredFile } from './session/measured-file.ts';
import type { SessionInformation } from './session/session-information.ts';

/*
 * The whole story. A dropped folder is read and measured, compared and judged: the findings. The
 * repairs somebody chose make a plan; what they change is measured and judged again; all of it is
 * reported (report/build-report.ts) and packed. Everything between two steps is plain data, so a
 * step can run in another thread. Measuring is handed in, because it happens in workers in the
 * browser and in this thread on the command line.
 */

export type CheckInput = {
  files: readonly DroppedFile[];
  rules: HouseRules;
  information: SessionInformation;
  measureFile: MeasureFile;
};

/** What was found out about files, in the order of their paths. */
export type SessionCheck = {
  files: MeasuredFile[];
  comparison: Comparison;
  judgement: Judgement;
};

/** Reads, measures, compares and judges what was dropped. */
export async function checkSession(
  { files, rules, information, measureFile }: CheckInput,
  options: MeasureAllOptions = {},
): Promise<SessionCheck> {
  const measured = await measureAll(files, measureFile, options);
  const comparison = await compareFiles(measured, files, options.signal);
  return judgeCheck({ files: measured, comparison }, rules, information);
}

/** Judges what is measured already: after a change of rules, roles, names or answers. */
export function judgeCheck(
  { files, comparison }: Pick<SessionCheck, 'files' | 'comparison'>,
  rules: HouseRules,
  information: SessionInformation,
): SessionCheck {
  const judgement = judgeSession({ files: judgedFiles(files), comparison }, rules, information);
  return { files, comparison, judgement };
}

/** The plan for the chosen repairs, and what is found in its entries (in its order). */
export type RepairedSession = { plan: RepairPlan; after: SessionCheck };

/** Plans the chosen repairs, measures what they change, judges what will be packed. */
export async function repairSession(
  { files, rules, information, measureFile }: CheckInput,
  check: SessionCheck,
  chosen: readonly ChosenRepair[],
  options: MeasureAllOptions = {},
): Promise<RepairedSession> {
  const plan = planRepairs({ ...check, chosen, rules, information });
  const dropped = droppedTracks(files, check.files);
  const measured = await measureEntries(plan, dropped, measureFile, options);
  const comparison = plan.entries.every(keepsSamples)
    ? followComparison(check.comparison, plan)
    : await compareFiles(measured.files, measured.sources, options.signal);
  const after = judgeCheck(
    { files: measured.files, comparison },
    rules,
    followRepairs(information, plan),
  );
  return {
    plan,
    after: { ...after, judgement: keepUnpacked(after.judgement, check.judgement, plan) },
  };
}

export type PackInput = {
  files: readonly DroppedFile[];
  check: Pick<SessionCheck, 'files'>;
  repaired: RepairedSession;
  report: CheckReport;
  trackSheet: Uint8Array;
  checksums: ChecksumEngine;
  signal?: AbortSignal | undefined;
};

/** The package as a zip of known length, ready to be streamed wherever it shall go. */
export async function packSession(input: PackInput): Promise<Package> {
  const { check, repaired, report, checksums } = input;
  const files = await listPackedFiles({
    ...input,
    plan: repaired.plan,
    measured: check.files,
    packed: repaired.after.files,
  });
  return packFiles(report.package.folderName, files, checksums);
}
