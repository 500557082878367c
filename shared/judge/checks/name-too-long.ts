import { checkPortability, longestNameBytes } from '../../naming/portability.ts';
import { found, type FileCheck } from '../check.ts';

/** Longer than the rules allow, or than some file systems take. */
export const nameTooLong: FileCheck = ({ name, path }, { rules }) => {
  const characters = [...name.stem].length;
  const tooManyBytes = checkPortability(fileNameOf(path)).some(({ code }) => code === 'too-long');
  if (characters <= rules.names.maximumLength && !tooManyBytes) return null;
  return found(
    'name-too-long',
    {
      name: name.stem,
      characters,
      maximumCharacters: Math.min(rules.names.maximumLength, longestNameBytes),
    },
    name.proposedName === null ? { repairs: [] } : {},
  );
};

function fileNameOf(path: string): string {
  return path.slice(path.lastIndexOf('/') + 1);
}
