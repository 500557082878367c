import type { AppError, AppErrorCode } from '#shared/errors.ts';

type Words = { path: string; text: (key: string) => string };

const sentences: Partial<Record<AppErrorCode, (words: Words) => string>> = {
  'no-access': ({ path, text }) => noAccess(path, text('reason')),
  'nothing-to-check': ({ path }) => `There is no audio in ${path}.`,
  'disk-full': ({ path }) =>
    `The disk is full: ${path} could not be written, and nothing of it was kept.`,
  'file-changed': ({ path }) =>
    `${path} changed after it was checked, so no package was written. Check again.`,
  'already-taken': ({ path }) =>
    `${path} is one of the files that are checked. Give the package another name.`,
  'zip-refused': ({ path, text }) => {
    const reason = text('reason');
    if (reason === 'not-a-zip' && path !== '') return `${path} is neither a folder nor a zip.`;
    const entry = text('entry') === '' ? '' : `, at ${printable(text('entry'))}`;
    return `The zip cannot be opened safely: ${zipReasons[reason] ?? reason}${entry}.`;
  },
  'engine-failed': ({ text }) => `The meters could not be loaded: ${text('reason')}`,
  cancelled: () => 'Stopped.',
};

const zipReasons: Record<string, string> = {
  'not-a-zip': 'its list of files is missing, so it is cut short or damaged',
  'damaged-directory': 'its list of files is damaged or cut short',
  'several-parts': 'it is one of several parts',
  'too-many-entries': 'it holds more files than any session has',
  'overlapping-entries': 'its files overlap, as in a zip made to do harm',
  'too-large': 'it would unpack to far more than it is',
  'damaged-entry': 'it is damaged',
};

/** An expected failure as one sentence for whoever typed the command. */
export function sayError({ code, details }: AppError): string {
  const text = (key: string): string => {
    const value = details[key];
    return typeof value === 'string' ? value : '';
  };
  const sentence = sentences[code];
  return sentence
    ? sentence({ path: printable(text('path')), text })
    : `The check could not run (${code}).`;
}

function noAccess(path: string, reason: string): string {
  if (reason === 'ENOENT' || reason === 'ENOTDIR') return `There is no ${path}.`;
  if (reason === 'EACCES' || reason === 'EPERM') return `There is no permission to use ${path}.`;
  if (reason === 'EROFS') return `${path} cannot be written: the disk is read-only.`;
  if (reason === 'EISDIR') return `${path} is a folder, not a file.`;
  return `${path} could not be opened${reason === '' ? '' : ` (${reason})`}.`;
}

/** Names can hold anything; a terminal must not be steered by one. */
export function printable(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/gu, (character) => {
    const code = character.codePointAt(0) ?? 0;
    return code === 0x200d || code === 0x200c
      ? character
      : `\\u{${code.toString(16).padStart(4, '0')}}`;
  });
}
