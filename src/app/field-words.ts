/** What kind of mistake zod saw: its issue code, such as `too_small`. */
export type MistakeKind = string;

/** The words for one field's mistakes. */
export type FieldWords = (kind: MistakeKind) => string;

export const emailWords: FieldWords = (kind) =>
  kind === 'too_big'
    ? 'This address is longer than addresses can be.'
    : 'Write a whole e-mail address, such as juno@velvet-tramline.example.';

export const newPasswordWords: FieldWords = (kind) => {
  if (kind === 'too_big') return 'Use at most 128 characters.';
  if (kind === 'custom') return 'Use at least five different characters.';
  return 'Use 12 characters or more. A short sentence works well.';
};

export const givenPasswordWords: FieldWords = (kind) =>
  kind === 'too_big' ? 'No password here is longer than 128 characters.' : 'Write your password.';

/** One line of text: a name, a title. */
export function lineWords(what: string, most: number): FieldWords {
  return (kind) => {
    if (kind === 'too_big') return `Keep it to ${String(most)} characters.`;
    if (kind === 'invalid_format') return 'Write it in one line, without special control signs.';
    return `Write ${what}.`;
  };
}

export const slugWords: FieldWords = (kind) => {
  if (kind === 'too_small') return 'Use 3 characters or more.';
  if (kind === 'too_big') return 'Use at most 40 characters.';
  return 'Use small letters a to z, digits, and single hyphens between them.';
};
