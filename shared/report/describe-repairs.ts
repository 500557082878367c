import { safeRepairKinds, type RepairKind } from '../findings/finding.ts';
import { fileNameOf, splitExtension } from '../pack/safe-names.ts';
import type { Operation, PlannedEntry, RepairPlan } from '../repair/repair-plan.ts';
import type { MeasuredFile } from '../session/measured-file.ts';

/** What was done to the files of an entry, as repairs are called, in the order of doing. */
export function describeRepairs(
  entry: PlannedEntry,
  plan: RepairPlan,
  files: readonly MeasuredFile[],
): RepairKind[] {
  const repairs: RepairKind[] = [];
  const [first] = entry.from;
  if (entry.from.length === 1 && first && isRenamed(first, entry)) repairs.push('rename');
  const reading = files.find(({ path }) => path === first)?.reading;
  if (entry.rewriteAsWav && reading?.kind === 'track' && isAiff(reading.format.container)) {
    repairs.push('rewrite-container');
  }
  const siblings = plan.entries.filter(({ from }) => first && from.includes(first)).length;
  for (const { kind } of entry.operations) {
    const repair = repairOf(kind, siblings > 1);
    if (!repairs.includes(repair)) repairs.push(repair);
  }
  return repairs;
}

/** Another ending alone comes with being rewritten. */
function isRenamed(path: string, { to, rewriteAsWav }: PlannedEntry): boolean {
  const was = fileNameOf(path);
  const is = fileNameOf(to);
  return rewriteAsWav ? splitExtension(was).base !== splitExtension(is).base : was !== is;
}

const isAiff = (container: string): boolean => container === 'aiff' || container === 'aifc';

function repairOf(kind: Operation['kind'], oneOfSeveral: boolean): RepairKind {
  if (kind === 'take-channel') return oneOfSeveral ? 'split' : 'keep-one-side';
  if (kind === 'pad') return 'add-silence';
  return kind;
}

/** Whether a repair can be heard, so that it has to be said. */
export const isAudible = (repair: RepairKind): boolean => !safeRepairKinds.includes(repair);
