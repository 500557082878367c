import { foldCharacter, isAscii } from './fold-name.ts';

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

const wordCharacter = /\p{L}|\p{N}|\p{M}|['’]|\u200c|\u200d/u;

/** Character classes of ASCII, looked up rather than matched: names are read by the thousand. */
const asciiClasses: readonly (CharacterClass | null)[] = Array.from({ length: 128 }, (_, code) => {
  if (code >= 48 && code <= 57) return 'digit';
  if (code >= 65 && code <= 90) return 'upper';
  return code >= 97 && code <= 122 ? 'lower' : null;
});

function isWordCharacter(character: string): boolean {
  const code = character.charCodeAt(0);
  return code < 128 ? asciiClasses[code] != null || code === 39 : wordCharacter.test(character);
}

/** A stretch of a name: letters and digits, or what stands between two such stretches. */
export type NameRun = Range & { text: string; isWord: boolean };

/** Cuts a name where words begin and end: `Kick_In` -> `Kick`, `_`, `In`. */
export function nameRuns(name: string): NameRun[] {
  const runs: NameRun[] = [];
  let start = 0;
  for (const text of name) {
    const end = start + text.length;
    const isWord = isWordCharacter(text);
    const run = runs.at(-1);
    if (run?.isWord === isWord) {
      run.text += text;
      run.end = end;
    } else {
      runs.push({ text, start, end, isWord });
    }
    start = end;
  }
  return runs;
}

const letterOrDigit = /[\p{L}\p{N}]/u;
const upperCase = /\p{Lu}/u;
const digit = /\p{Nd}/u;
const lowerCase = /\p{Ll}/u;

type CharacterClass = 'upper' | 'lower' | 'digit' | 'other';

/** null: neither letter nor digit. */
function classOf(character: string): CharacterClass | null {
  const code = character.charCodeAt(0);
  if (code < 128) return asciiClasses[code] ?? null;
  if (!letterOrDigit.test(character)) return null;
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

function isMark(character: string): boolean {
  return character.charCodeAt(0) > 127 && /\p{M}/u.test(character);
}

function readCharacters(name: string, masks: readonly Range[]): (SourceCharacter | null)[] {
  const characters: (SourceCharacter | null)[] = [];
  let start = 0;
  for (const text of name) {
    const end = start + text.length;
    const at = start;
    const masked = masks.some((mask) => at >= mask.start && at < mask.end);
    const kind = masked ? null : classOf(text);
    if (kind !== null) {
      characters.push({ text, start, end, kind });
    } else if (!masked && isMark(text)) {
      const last = characters.at(-1);
      if (last) last.end = end;
    } else if (masked || (text !== "'" && text !== '’')) {
      // An apostrophe is part of its word: mic'd.
      characters.push(null);
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
    let folded = foldCharacter(character.text);
    if (!isAscii(character.text)) folded = folded.replace(/[^\p{L}\p{N}]/gu, '');
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
