import { safeRepairKinds, type Finding, type RepairKind } from '../findings/finding.ts';
import type { ChosenRepair } from './repair-plan.ts';

/** The repair of one finding, as it is chosen without saying anything more. */
export function chooseRepair(finding: Finding, repair: RepairKind): ChosenRepair {
  return { repair, code: finding.code, files: finding.files };
}

/** What may be taken in one go: repairs that cannot change how anything sounds. */
export function safeRepairs(findings: readonly Finding[]): ChosenRepair[] {
  return findings.flatMap((finding) =>
    finding.repairs
      .filter((repair) => safeRepairKinds.includes(repair))
      .map((repair) => chooseRepair(finding, repair)),
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
