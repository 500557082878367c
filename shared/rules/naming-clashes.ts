import { foldName } from '../naming/fold-name.ts';
import type { NamingRules } from './naming-rules.ts';

/** Two groups of a naming table that cannot be told apart. `first` and `second` index `groups`. */
export type NamingClash = {
  kind: 'id' | 'letter' | 'label' | 'word';
  text: string;
  first: number;
  second: number;
};

/**
 * What in the table of groups is given twice: an id, a letter, a label, or a word in two groups.
 * Compared as names are: without regard to case, accents and Unicode form. A table with clashes
 * can be kept as a draft, but not published: the convention could not be read back.
 */
export function namingClashes(groups: NamingRules['groups']): NamingClash[] {
  const clashes: NamingClash[] = [];
  const seen = new Map<string, number>();
  const note = (kind: NamingClash['kind'], text: string, index: number) => {
    const key = `${kind} ${kind === 'id' ? text : foldName(text)}`;
    const first = seen.get(key);
    if (first === undefined) seen.set(key, index);
    else if (first !== index) clashes.push({ kind, text, first, second: index });
  };
  groups.forEach((group, index) => {
    note('id', group.id, index);
    note('letter', group.letter, index);
    note('label', group.label, index);
    for (const word of group.words) note('word', word, index);
  });
  return clashes;
}
