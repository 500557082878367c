import { foldCharacter } from './fold-name.ts';

/** How two neighbouring letters stand to each other. */
export const glued = 0;
/** A change of case, of script, or between letters and digits. */
export const soft = 1;
/** Anything that is neither letter nor digit stands between them. */
export const hard = 2;

export type Range = { start: number; end: number };

/**
 * A name as it is read: letters and digits only, folded, each with its place in the name.
 * `boundary[i]` says what stands before letter i; it has one more element than there are letters.
 */
export type NameText = {
  name: string;
  letters: string;
  starts: number[];
  ends: number[];
  boundary: number[];
};

const audioExtension =
  /\.(?:wav|wave|bwf|rf64|w64|aif|aiff|aifc|flac|mp3|mp4|m4a|aac|ogg|oga|opus|wma|caf)$/i;

/** The last path segment in NFC without the extension of an audio file. */
export function bareName(path: string): string {
  const segment = path.slice(path.lastIndexOf('/') + 1).normalize('NFC');
  const bare = segment.replace(audioExtension, '');
  return bare === '' ? segment : bare;
}

const letterOrDigit = /[\p{L}\p{N}]/u;
const upperCase = /\p{Lu}/u;
const digit = /\p{Nd}/u;
const lowerCase = /\p{Ll}/u;

type CharacterClass = 'upper' | 'lower' | 'digit' | 'other';

function classOf(character: string): CharacterClass {
  if (digit.test(character)) return 'digit';
  if (upperCase.test(character)) return 'upper';
  if (lowerCase.test(character)) return 'lower';
  return 'other';
}

function isSoft(before: CharacterClass, here: CharacterClass, after: CharacterClass): boolean {
  if (before === here) {
    // The last capital of a run belongs to the word that follows: OH|Left, but not OHs.
    return here === 'upper' && after === 'lower';
  }
  if (before === 'upper' && here === 'lower') return false;
  return true;
}

type SourceCharacter = { text: string; start: number; end: number; kind: CharacterClass };

function readCharacters(name: string, masks: readonly Range[]): (SourceCharacter | null)[] {
  const characters: (SourceCharacter | null)[] = [];
  let start = 0;
  for (const text of name) {
    const end = start + text.length;
    const masked = masks.some((mask) => start >= mask.start && start < mask.end);
    if (masked || !(letterOrDigit.test(text) || /\p{M}/u.test(text))) {
      // An apostrophe is part of its word: mic'd.
      if (masked || (text !== "'" && text !== '’')) characters.push(null);
    } else if (letterOrDigit.test(text)) {
      characters.push({ text, start, end, kind: classOf(text) });
    } else {
      const last = characters.at(-1);
      if (last) last.end = end;
    }
    start = end;
  }
  return characters;
}

/** Splits a bare name; what `masks` cover (offsets in the name) is read as a gap. */
export function splitName(name: string, masks: readonly Range[] = []): NameText {
  const characters = readCharacters(name, masks);
  const text: NameText = { name, letters: '', starts: [], ends: [], boundary: [] };
  let before: CharacterClass | null = null;
  characters.forEach((character, index) => {
    if (character === null) {
      before = null;
      return;
    }
    const folded = foldCharacter(character.text).replace(/[^\p{L}\p{N}]/gu, '');
    for (let i = 0; i < folded.length; i++) {
      const following = characters[index + 1]?.kind ?? 'other';
      if (i > 0) text.boundary.push(glued);
      else if (before === null) text.boundary.push(hard);
      else {
        const plural = following === 'lower' && isPluralOfCapitals(characters, index);
        text.boundary.push(!plural && isSoft(before, character.kind, following) ? soft : glued);
      }
      text.letters += folded[i];
      text.starts.push(character.start);
      text.ends.push(character.end);
    }
    before = character.kind;
  });
  text.boundary.push(hard);
  return text;
}

/** Whether a capital is followed by one small s that ends the word: the H of OHs. */
function isPluralOfCapitals(characters: (SourceCharacter | null)[], index: number): boolean {
  const next = characters[index + 1];
  return next?.text === 's' && characters[index + 2]?.kind !== 'lower';
}
