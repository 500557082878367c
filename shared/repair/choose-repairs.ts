import { safeRepairKinds, type Finding, type RepairKind } from '../findings/finding.ts';
import type { ChosenRepair } from './repair-plan.ts';

/** The repair of one finding, as it is chosen without saying anything more. */
export function chooseRepair(finding: Finding, repair: RepairKind): ChosenRepair {
  return { repair, code: finding.code, files: finding.files };
}

/** Sides this close in level are the same sound in the middle: nothing is lost by keeping one. */
const samePanDb = 0.05;

/** What may be taken in one go: repairs that cannot change how anything sounds. */
export function safeRepairs(findings: readonly Finding[]): ChosenRepair[] {
  return findings.flatMap((finding) =>
    finding.repairs
      .filter((repair) => safeRepairKinds.includes(repair) && !changesPan(finding, repair))
      .map((repair) => chooseRepair(finding, repair)),
  );
}

/** A part that sounds on one side, or louder there, would move to the middle. */
function changesPan(finding: Finding, repair: RepairKind): boolean {
  if (repair !== 'keep-one-side') return false;
  const allArgs = finding.perFile?.map(({ args }) => args) ?? [finding.args];
  return allArgs.some(
    ({ gainDb }) => !(typeof gainDb === 'number' && Math.abs(gainDb) <= samePanDb),
  );
}

/**
 * What is done without being asked, because the package holds mono and stereo WAV files and the
 * samples stay the same: other containers are rewritten, files of many channels are split.
 */
export function unaskedRepairs(findings: readonly Finding[]): ChosenRepair[] {
  return safeRepairs(findings).filter(({ repair }) =>
    ['rewrite-container', 'split'].includes(repair),
  );
}
