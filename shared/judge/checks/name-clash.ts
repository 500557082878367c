import { clashKey } from '../../naming/fold-name.ts';
import { belongsToSession } from '../belongs-to-session.ts';
import { found, type CheckedFile, type SessionCheck } from '../check.ts';

/**
 * Names that are one on a disk that ignores case and the way accents are written. In one folder
 * one file overwrites the other somewhere; from different folders they meet in the package, where
 * all files lie side by side.
 */
export const nameClash: SessionCheck = ({ files }) => {
  const groups = new Map<string, CheckedFile[]>();
  for (const file of files.filter(belongsToSession)) {
    const key = clashKey(file.name.stem);
    groups.set(key, [...(groups.get(key) ?? []), file]);
  }
  return [...groups.values()]
    .filter((group) => group.length > 1)
    .map((group) => {
      const paths = group.map(({ path }) => path);
      const folders = new Set(
        paths.map((path) => clashKey(path.slice(0, path.lastIndexOf('/') + 1))),
      );
      return found(
        'name-clash',
        { name: group[0]?.name.stem ?? '' },
        { files: paths, ...(folders.size === paths.length ? { level: 'look' } : {}) },
      );
    });
};
