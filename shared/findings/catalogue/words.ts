import type { Finding, FindingCode } from '../finding.ts';
import type { ArgumentsOf } from './definitions.ts';
import type { ArgumentFormat } from './format-arguments.ts';

/** A finding in words a tired musician understands. */
export type FindingWords = {
  /** A few words for a list: `Clipped in 14 places`. */
  title: string;
  /** What it is. */
  what: string;
  /** Why it matters in the mix. */
  why: string;
  /** How to mend it. */
  how: string;
};

/** What sentences may need beside the arguments. */
export type About = Pick<Finding, 'files' | 'places' | 'level' | 'repairs'>;

/** The sentences of one code in one language. */
export type CodeWords<Code extends FindingCode> = {
  words(args: ArgumentsOf<Code>, format: ArgumentFormat, about: About): FindingWords;
  /**
   * The title where many files share one line: `12 files are clipped`. Left out for what is only
   * ever said about several files or the session.
   */
  several?(count: number): string;
};

/** All sentences in one language. */
export type LanguageWords = { [Code in FindingCode]: CodeWords<Code> };
