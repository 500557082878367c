import { levels, type Finding, type Level } from '../findings/finding.ts';

export type Verdict = 'ready' | 'look' | 'must-fix';

/**
 * A finding nobody has to do anything about any more. What is worth a look is settled once the
 * artist says that it is on purpose or that there is no more than this. A must-fix stays open
 * whatever the answer: only the engineer can accept it. `cannot-export-again` settles nothing, it
 * tells the engineer to look at what is there.
 */
export function isSettled({ level, answer }: Pick<Finding, 'level' | 'answer'>): boolean {
  if (level === 'note') return true;
  return level === 'look' && (answer === 'on-purpose' || answer === 'all-there-is');
}

/** The worst level that is not settled; `ready` when nothing but notes and answers is left. */
export function verdictOf(findings: readonly Pick<Finding, 'level' | 'answer'>[]): Verdict {
  const open = findings.filter((finding) => !isSettled(finding));
  if (open.some(({ level }) => level === 'must-fix')) return 'must-fix';
  return open.length > 0 ? 'look' : 'ready';
}

/** How many findings there are of each level, answered or not. */
export function countLevels(findings: readonly Pick<Finding, 'level'>[]): Record<Level, number> {
  const counts = Object.fromEntries(levels.map((level) => [level, 0])) as Record<Level, number>;
  for (const { level } of findings) counts[level] += 1;
  return counts;
}
