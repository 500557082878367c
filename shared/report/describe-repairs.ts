import type { RepairKind } from '../findings/finding.ts';
import { fileNameOf, splitExtension } from '../naming/safe-names.ts';
import type { Operation, PlannedEntry, RepairPlan } from '../repair/repair-plan.ts';
import type { MeasuredFile } from '../session/measured-file.ts';

/** What was done to the files of each entry, as repairs are called, in the order of doing. */
export function describeRepairs(
  { entries }: Pick<RepairPlan, 'entries'>,
  files: readonly MeasuredFile[],
): RepairKind[][] {
  const readings = new Map(files.map(({ path, reading }) => [path, reading]));
  const made = new Map<string, number>();
  for (const path of entries.flatMap(({ from }) => from)) {
    made.set(path, (made.get(path) ?? 0) + 1);
  }
  return entries.map((entry) => {
    const [first = ''] = entry.from;
    const reading = readings.get(first);
    const wasAiff = reading?.kind === 'track' && /^aif/.test(reading.format.container);
    const repairs = new Set<RepairKind>();
    if (entry.from.length === 1 && isRenamed(first, entry)) repairs.add('rename');
    if (entry.rewriteAsWav && wasAiff) repairs.add('rewrite-container');
    const oneOfSeveral = (made.get(first) ?? 0) > 1;
    for (const { kind } of entry.operations) repairs.add(repairOf(kind, oneOfSeveral));
    return [...repairs];
  });
}

/** Another ending alone comes with being rewritten. */
function isRenamed(path: string, { to, rewriteAsWav }: PlannedEntry): boolean {
  const was = fileNameOf(path);
  const is = fileNameOf(to);
  return rewriteAsWav ? splitExtension(was).base !== splitExtension(is).base : was !== is;
}

function repairOf(kind: Operation['kind'], oneOfSeveral: boolean): RepairKind {
  if (kind === 'take-channel') return oneOfSeveral ? 'split' : 'keep-one-side';
  if (kind === 'pad') return 'add-silence';
  return kind;
}
