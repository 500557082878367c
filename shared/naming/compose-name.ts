import type { InstrumentGroup, NameToken, NamingRules } from '../rules/naming-rules.ts';
import { plainLetter } from './fold-name.ts';
import type { Side } from './parsed-name.ts';
import { nameRuns } from './split-name.ts';

/** What a name says, ready to be written under a convention. */
export type NameParts = {
  number: number | null;
  group: InstrumentGroup | null;
  /** Written form, words apart. */
  instrument: string;
  ordinal: number | null;
  /** Written forms in the order in which they stand. */
  details: readonly string[];
  side: Side | null;
};

export function padNumber(number: number, naming: NamingRules): string {
  return String(number).padStart(naming.numberDigits, '0');
}

/** The group as the convention writes it, before case: its letter or its label. */
export function groupText(group: InstrumentGroup, naming: NamingRules): string {
  return naming.groupStyle === 'letter' ? group.letter : group.label;
}

function sideText(side: Side | null): string {
  if (side === null) return '';
  return side === 'stereo' ? 'Stereo' : side;
}

/** Words of a text that a convention may use: letters and digits, plain ones if it must. */
export function wordsOf(text: string, naming: NamingRules): string[] {
  let kept = '';
  for (const character of text.normalize('NFC')) {
    kept += naming.characters === 'portable' ? plainLetter(character) : character;
  }
  return nameRuns(kept)
    .filter((run) => run.isWord)
    .map((run) => run.text.replace(/['’]/g, ''))
    .filter(Boolean);
}

/** A word in the case of the convention. Written forms keep their own capitals in `title`. */
export function inCase(word: string, naming: NamingRules): string {
  switch (naming.case) {
    case 'upper':
      return word.toUpperCase();
    case 'lower':
      return word.toLowerCase();
    case 'title': {
      const [first = ''] = word;
      return first.toUpperCase() + word.slice(first.length);
    }
    case 'as-is':
      return word;
  }
}

const written = new WeakMap<NamingRules, Map<string, readonly string[]>>();
const mostWritten = 5000;

/** The words of a text as they stand in a name. The same few texts recur in every name. */
function writeWords(text: string, naming: NamingRules): readonly string[] {
  let known = written.get(naming);
  if (!known) written.set(naming, (known = new Map<string, readonly string[]>()));
  let words = known.get(text);
  if (!words) {
    words = wordsOf(text, naming).map((word) => inCase(word, naming).normalize('NFC'));
    if (known.size >= mostWritten) known.clear();
    known.set(text, words);
  }
  return words;
}

/** A name, and the same without its running number: what it says of the part. */
export type ComposedName = { name: string; body: string };

/**
 * Writes a name under a convention, without extension. Where the convention has no place for a
 * side it stands with the details, and where it has none for details, with the instrument.
 */
export function composeName(parts: NameParts, naming: NamingRules): ComposedName {
  const { tokens, separator } = naming;
  const name: string[] = [];
  const body: string[] = [];
  const add = (text: string) => {
    for (const word of writeWords(text, naming)) {
      name.push(word);
      body.push(word);
    }
  };
  const sidePlace = sidePlaceOf(tokens);
  for (const token of tokens) {
    if (token === 'number') {
      if (parts.number !== null) name.push(padNumber(parts.number, naming));
    } else if (token === 'group') {
      if (parts.group) add(groupText(parts.group, naming));
    } else if (token === 'instrument') {
      add(parts.instrument);
      if (parts.ordinal !== null) add(String(parts.ordinal));
    } else if (token === 'detail') {
      for (const detail of parts.details) add(detail);
    }
    if (token === sidePlace) add(sideText(parts.side));
  }
  return { name: name.join(separator), body: body.join(separator) };
}

function sidePlaceOf(tokens: readonly NameToken[]): NameToken {
  if (tokens.includes('side')) return 'side';
  return tokens.includes('detail') ? 'detail' : 'instrument';
}
