import type { LeftoverKind } from '../../naming/parsed-name.ts';
import { found, type CheckedFile, type CheckedSession, type FileCheck } from '../check.ts';
import { partKey } from '../same-part.ts';

const leftBehind: ReadonlySet<LeftoverKind> = new Set([
  'copy',
  'counter',
  'export-word',
  'version',
  'date',
  'format',
]);

/** Words, copy numbers and dates that an export adds and that say nothing about the part. */
export const exportLeftover: FileCheck = (file, session) => {
  const { leftovers, stem, instrument, proposedName } = file.name;
  if (instrument === null) return null;
  const told = countTells(file, session);
  const words = leftovers
    .filter(({ kind }) => leftBehind.has(kind) && !(kind === 'counter' && told))
    .map(({ text }) => text);
  if (words.length === 0) return null;
  return found(
    'export-leftover',
    { name: stem, leftovers: words },
    proposedName === null ? { repairs: [] } : {},
  );
};

/** A counter that tells this file from another of the same part is no leftover. */
function countTells({ name }: CheckedFile, { filesOfPart }: CheckedSession): boolean {
  return name.counter !== null && (filesOfPart.get(partKey(name) ?? '') ?? 0) > 1;
}
