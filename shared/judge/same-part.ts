import type { FileName } from './file-names.ts';

/**
 * Two files of one instrument: sides of a pair, microphones, clean beside amp, a parallel copy.
 * What happens in both of them at the same time is one event, not two.
 */
export function sameInstrument(a: FileName, b: FileName): boolean {
  return a.instrument !== null && a.instrument === b.instrument;
}

/** Details that say which version of a part a file is, not which part. */
const versionDetails: ReadonlySet<string> = new Set(['Comp', 'Alt']);

/**
 * Equal for files that are called the same but for takes, counters and leftovers; null where the
 * part is not known.
 */
export function partKey({ instrument, ordinal, detail, side }: FileName): string | null {
  if (instrument === null) return null;
  const details = detail.filter((word) => !versionDetails.has(word));
  return JSON.stringify([instrument, ordinal, [...details].sort(), side]);
}

/** How many files there are of each part that is known. */
export function countParts(names: readonly FileName[]): Map<string, number> {
  const counts = new Map<string, number>();
  for (const name of names) {
    const key = partKey(name);
    if (key !== null) counts.set(key, (counts.get(key) ?? 0) + 1);
  }
  return counts;
}
