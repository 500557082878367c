import { checkPortability } from '../../naming/portability.ts';
import { found, type FileCheck } from '../check.ts';
import { namingInForce } from '../naming-in-force.ts';

type End = 'dot-at-end' | 'space-at-end' | 'space-at-start' | 'hyphen-at-start' | 'dot-at-start';

/** Characters that some file systems refuse, or that the rules do not allow. */
export const nameCharacters: FileCheck = ({ name, path }, { rules }) => {
  const fileName = path.slice(path.lastIndexOf('/') + 1);
  const characters = new Set<string>();
  const ends = new Set<End>();
  for (const issue of checkPortability(fileName)) {
    switch (issue.code) {
      case 'forbidden-characters':
      case 'control-characters':
      case 'invisible-characters':
        for (const character of issue.found) characters.add(character);
        break;
      case 'ends-with-dot-or-space':
        ends.add(fileName.endsWith('.') ? 'dot-at-end' : 'space-at-end');
        break;
      case 'starts-with-space':
        ends.add('space-at-start');
        break;
      case 'starts-with-hyphen':
        ends.add('hyphen-at-start');
        break;
      case 'hidden':
        ends.add('dot-at-start');
        break;
      case 'reserved-name':
      case 'too-long':
      case 'empty':
        break;
    }
  }
  if (!name.explanation.ok && namingInForce(rules)) {
    for (const { reason, args } of name.explanation.failures) {
      if (reason !== 'characters') continue;
      for (const character of String(args.found)) characters.add(character);
    }
  }
  if (characters.size + ends.size === 0) return null;
  return found(
    'name-characters',
    { name: name.stem, characters: [...characters].map(visible), ends: [...ends] },
    name.proposedName === null ? { repairs: [] } : {},
  );
};

/** What cannot be seen is written by its number in Unicode. */
function visible(character: string): string {
  return /^[\p{C}\p{Z}\p{M}]$/u.test(character)
    ? `U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`
    : character;
}
