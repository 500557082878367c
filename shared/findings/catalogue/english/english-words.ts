import type { LanguageWords } from '../words.ts';
import { completenessWords } from './completeness.ts';
import { fileAndFormatWords } from './file-and-format.ts';
import { nameWords } from './names.ts';
import { signalWords } from './signal.ts';
import { startAndLengthWords } from './start-and-length.ts';

/** Every sentence about findings in English. */
export const englishWords: LanguageWords = {
  ...fileAndFormatWords,
  ...startAndLengthWords,
  ...signalWords,
  ...nameWords,
  ...completenessWords,
};
