import type { InstrumentGroup, NamingRules } from '../rules/naming-rules.ts';
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

/**
 * Writes a name under a convention, without extension. Where the convention has no place for a
 * side it stands with the details, and where it has none for details, with the instrument.
 */
export function composeName(parts: NameParts, naming: NamingRules): string {
  const { tokens } = naming;
  const details = [...parts.details];
  const instrument = [parts.instrument, parts.ordinal === null ? '' : String(parts.ordinal)];
  if (!tokens.includes('side')) {
    (tokens.includes('detail') ? details : instrument).push(sideText(parts.side));
  }
  const texts = tokens.flatMap((token): string[] => {
    switch (token) {
      case 'number':
        return parts.number === null ? [] : [padNumber(parts.number, naming)];
      case 'group':
        return parts.group ? [groupText(parts.group, naming)] : [];
      case 'instrument':
        return instrument;
      case 'detail':
        return details;
      case 'side':
        return [sideText(parts.side)];
    }
  });
  return texts
    .flatMap((text) => wordsOf(text, naming))
    .map((word) => inCase(word, naming))
    .join(naming.separator)
    .normalize('NFC');
}
