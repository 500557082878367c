import type { ArgumentsOf } from '../definitions.ts';
import type { names } from '../names.ts';
import type { LanguageWords } from '../words.ts';

export const nameWords: Pick<LanguageWords, keyof typeof names> = {
  'name-breaks-rule': {
    words: ({ name, faults, proposedName }, format) => ({
      title: 'Not named as the rules ask',
      what: `“${name}”: ${format.list(faults.slice(0, 3).map(faultWords), 'and')}.`,
      why: 'Where all names follow one pattern, files sort themselves and every part is found at once.',
      how:
        proposedName === null
          ? 'Give it a name that follows the pattern.'
          : `We can call it “${proposedName}” in the zip.`,
    }),
    several: (count) => `${count} files are not named as the rules ask`,
  },
  'name-unclear': {
    words: ({ name }) => ({
      title: 'What is this?',
      what: `“${name}” does not say which instrument or voice it is.`,
      why: 'Somebody has to listen to such a file to find out where it belongs.',
      how: 'Give it a name that says what plays: “Tambourine”, “Organ”, “Lead Vocal Double”.',
    }),
    several: (count) => `${count} files do not say what they are`,
  },
  'number-repeated': {
    words: ({ number }, format, { files }) => ({
      title: `Number ${number} ${files.length === 2 ? 'twice' : `${files.length} times`}`,
      what: `${format.files(files)} carry the same number.`,
      why: 'Numbers set the order of the tracks. Two alike leave it to chance.',
      how: 'We can number the files anew.',
    }),
  },
  'number-missing': {
    words: ({ numbers }, format) => ({
      title:
        numbers.length === 1
          ? `Number ${numbers[0]} is missing`
          : `${numbers.length} numbers are missing`,
      what: `There is no file with the number ${format.list(numbers.slice(0, 5).map(String), 'and')}${numbers.length > 5 ? ', and so on' : ''}.`,
      why: 'A gap can mean that a file was forgotten.',
      how: 'See whether a file is missing. If not, nothing has to be done.',
    }),
  },
  'name-too-long': {
    words: ({ name, characters, maximumCharacters }) => ({
      title: `Name of ${characters} characters`,
      what: `“${name}” is ${characters} characters long. The rules allow ${maximumCharacters}.`,
      why: 'Long names are cut off in a mixer, and what tells them apart is mostly at the end.',
      how: 'Shorten it to what plays and what tells it from the others.',
    }),
    several: (count) => `${count} names are too long`,
  },
  'name-characters': {
    words: ({ name, characters, ends }, format) => ({
      title: 'Characters that do not travel',
      what: `“${name}” has ${format.list(
        [
          ...characters.map((character) => `“${character}” in it`),
          ...ends.map((end) => endWords[end]),
        ],
        'and',
      )}.`,
      why: 'Some computers refuse such a name, others change it on the way.',
      how: 'Use plain letters, digits, spaces and - _ . instead.',
    }),
    several: (count) => `${count} names have characters that do not travel`,
  },
  'name-reserved': {
    words: ({ name }) => ({
      title: 'A name that some computers keep for themselves',
      what: `“${name}” is the name of a device on some computers.`,
      why: 'There the file cannot be saved.',
      how: 'Give it another name.',
    }),
    several: (count) => `${count} names cannot be used on some computers`,
  },
  'name-clash': {
    words: (_args, format, { files }) => ({
      title: `One name for ${files.length} files`,
      what: `${format.files(files)} differ only in capitals, accents or folders.`,
      why: 'On many computers they are the same name, so one file overwrites the other.',
      how: 'Rename one of them.',
    }),
  },
  'export-leftover': {
    words: ({ name, leftovers }, format) => ({
      title: 'Leftovers in the name',
      what: `${format.list(
        leftovers.map((leftover) => `“${leftover}”`),
        'and',
      )} in “${name}” ${leftovers.length === 1 ? 'says' : 'say'} nothing about the part.`,
      why: 'An export left it there. It makes the name longer and harder to read.',
      how: 'We can leave it out of the name in the zip.',
    }),
    several: (count) => `${count} names have leftovers of an export in them`,
  },
  'looks-like-takes': {
    words: ({ part, takes }, format, { files }) => ({
      title: `${takes} takes of ${part}`,
      what: `${format.files(files)} look like takes of one part.`,
      why: 'Which take is the right one is yours to choose. Played together they blur the part.',
      how: 'Keep the chosen take and leave the others out. If all of them shall play, say that it is on purpose.',
    }),
  },
};

const endWords: Record<ArgumentsOf<'name-characters'>['ends'][number], string> = {
  'dot-at-end': 'a full stop at the end',
  'space-at-end': 'a space at the end',
  'space-at-start': 'a space at the start',
  'hyphen-at-start': 'a hyphen at the start',
  'dot-at-start': 'a full stop at the start, which hides it',
};

type Fault = ArgumentsOf<'name-breaks-rule'>['faults'][number];

const tokenWords: Record<Fault['token'], string> = {
  number: 'number',
  group: 'group',
  instrument: 'instrument',
  detail: 'detail',
  side: 'side',
  name: 'name',
};

/** What is wrong with a name, put so that it follows on the name. */
function faultWords({ token, reason, found, expected }: Fault): string {
  const part = tokenWords[token];
  const wanted =
    expected === '' ? '' : token === 'number' ? `, such as “${expected}”` : ` (“${expected}”)`;
  switch (reason) {
    case 'missing':
      return `the ${part} is missing${wanted}`;
    case 'not-wanted':
      return `“${found}” has no place in the pattern`;
    case 'unknown':
      return 'no instrument is recognised';
    case 'wrong':
      return `“${found}” stands for another group${expected === '' ? '' : ` than “${expected}”`}`;
    case 'misspelt':
      return `“${found}” should read “${expected}”`;
    case 'digits':
      return `the number should be written “${expected}”`;
    case 'order':
      return `“${found}” stands in the wrong place`;
    case 'separator':
      return `words should be joined by ${expected === ' ' ? 'a space' : `“${expected}”`}`;
    case 'case':
      return `“${found}” should be written “${expected}”`;
    case 'leftover':
      return `“${found}” says nothing about the part`;
    case 'characters':
      return `“${found}” is not allowed`;
    case 'too-long':
      return 'it is too long';
  }
}
