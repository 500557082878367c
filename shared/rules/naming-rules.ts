import { z } from 'zod';

/** The parts a name is put together from. */
export const nameTokens = ['number', 'group', 'instrument', 'detail', 'side'] as const;
export type NameToken = (typeof nameTokens)[number];

/**
 * How an instrument group behaves, whatever it is called and lettered: levels of findings and the
 * vocabulary's words hang on this.
 */
export const groupNatures = [
  'drums',
  'percussion',
  'bass',
  'guitars',
  'keys',
  'synths',
  'orchestra',
  'vocals',
  'effects',
] as const;
export type GroupNature = (typeof groupNatures)[number];

export const instrumentGroupSchema = z.strictObject({
  id: z
    .string()
    .regex(/^[a-z0-9-]{1,40}$/, 'must be small letters, digits and hyphens, 40 at most'),
  nature: z.enum(groupNatures),
  /** Stands for the group in a name: `D`. Letters and digits, so that it is one word of a name. */
  letter: z.string().regex(/^[\p{L}\p{N}]{1,4}$/u, 'must be one to four letters or digits'),
  /** Whole word: `Drums`. */
  label: z
    .string()
    .max(40)
    .regex(/[\p{L}\p{N}]/u, 'must have a letter or a digit'),
  /** Position in the palette, 0 to 11; the interface chooses the colours. */
  colour: z.number().int().min(0).max(11),
  /** Words of the engineer's own that belong here, beside the vocabulary's. */
  words: z.array(z.string().min(1).max(40)).max(200),
});
export type InstrumentGroup = z.infer<typeof instrumentGroupSchema>;

export const namingSchema = z.strictObject({
  /** In order; each at most once; `instrument` always. */
  tokens: z
    .array(z.enum(nameTokens))
    .min(1)
    .max(nameTokens.length)
    .refine((tokens) => tokens.includes('instrument') && new Set(tokens).size === tokens.length, {
      message: 'must have every token at most once, and the instrument always',
    }),
  separator: z.enum([' ', '_', '-', '.']),
  case: z.enum(['title', 'upper', 'lower', 'as-is']),
  /** Whether the group is written as its letter or as its label. */
  groupStyle: z.enum(['letter', 'word']),
  /** Digits of a running number: 2 gives 01. */
  numberDigits: z.number().int().min(1).max(4),
  /** Longest name in characters, without extension. */
  maximumLength: z.number().int().min(8).max(200),
  /** `portable`: letters, digits, space and . _ - of ASCII; `unicode`: any letter that files may carry. */
  characters: z.enum(['portable', 'unicode']),
  /** In the order in which files are sorted and numbered. */
  groups: z.array(instrumentGroupSchema).min(1).max(40),
});
export type NamingRules = z.infer<typeof namingSchema>;
