import { belongsToSession } from './belongs-to-session.ts';
import type { CheckedSession } from './check.ts';

/** Paths by running number; empty where the convention has no running number. */
export function filesByNumber({ files, rules }: CheckedSession): Map<number, string[]> {
  const byNumber = new Map<number, string[]>();
  if (!rules.names.tokens.includes('number')) return byNumber;
  for (const file of files.filter(belongsToSession)) {
    const { number } = file.name;
    if (number !== null) byNumber.set(number, [...(byNumber.get(number) ?? []), file.path]);
  }
  return byNumber;
}
