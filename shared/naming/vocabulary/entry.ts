/**
 * The vocabulary is data: lists of forms in one string, separated by commas. A form may offer
 * alternatives in brackets, `lead (vox|vocal)`, and may say what detail it implies, `sub kick
 * +Sub`. A space in a form also matches `_`, `-`, a change of case, or nothing; a plural `s` of
 * instruments is understood. Everything is common practice of the trade, no source.
 */
export type InstrumentEntry = {
  /** As Flightcase writes it, words apart: `Lead Vocal`. Unique, and itself a form. */
  written: string;
  /** For names that would be too long: `LV`. Itself a form. */
  short: string;
  /** Whole words of several languages and abbreviations that anybody reads the same way. */
  forms: string;
  /** Misspelt: understood, but not good enough for a name that follows a convention. */
  misspelt?: string;
  /** Mean this most of the time: good for a guess, never for certainty. */
  unsure?: string;
  /** Names a whole group as well: gives way to any other instrument of its own nature. */
  general?: true;
  /** Beside another instrument it only describes that one, in this written form. */
  detail?: string;
};

export type DetailEntry = { written: string; short: string; forms: string };
