/** Latin letters that decompose to nothing simpler, and what people type instead of them. */
const plainLetters: Readonly<Record<string, string>> = {
  ß: 'ss',
  æ: 'ae',
  œ: 'oe',
  ø: 'o',
  ð: 'd',
  þ: 'th',
  ł: 'l',
  đ: 'd',
  ħ: 'h',
  ı: 'i',
};

/** Whether a text has only characters that Unicode forms and accents cannot change. */
export function isAscii(text: string): boolean {
  for (let i = 0; i < text.length; i++) if (text.charCodeAt(i) > 127) return false;
  return true;
}

const marks = /\p{M}/gu;

/**
 * One character as it is compared: compatibility forms (full width, ligatures) made plain, lower
 * case, without accents. May be empty (a lone mark) or longer than the input.
 */
export function foldCharacter(character: string): string {
  const code = character.charCodeAt(0);
  if (character.length === 1 && code < 128) {
    return code >= 65 && code <= 90 ? String.fromCharCode(code + 32) : character;
  }
  const bare = character.normalize('NFKD').replace(marks, '').toLowerCase();
  let folded = '';
  for (const letter of bare) folded += plainLetters[letter] ?? letter;
  return folded;
}

/** One character in plain ASCII letters with its case kept; '' where there is none for it. */
export function plainLetter(character: string): string {
  const code = character.charCodeAt(0);
  if (character.length === 1 && code < 128) return character;
  const folded = foldCharacter(character);
  const plain = folded.replace(/[^ -~]/g, '');
  const isUpper = character !== character.toLowerCase();
  if (!isUpper) return plain;
  return plain.charAt(0).toUpperCase() + plain.slice(1);
}

/** A text as it is compared: see foldCharacter. */
export function foldName(text: string): string {
  if (isAscii(text)) return text.toLowerCase();
  let folded = '';
  for (const character of text) folded += foldCharacter(character);
  return folded;
}

/**
 * The form in which two file names are the same file on a disk that ignores case: NFC, then full
 * case folding as far as ECMAScript has it (upper, then lower, so that ß equals SS).
 */
export function clashKey(name: string): string {
  if (isAscii(name)) return name.toLowerCase();
  return name.normalize('NFC').toUpperCase().toLowerCase().normalize('NFC');
}
