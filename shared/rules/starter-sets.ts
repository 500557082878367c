import type { GroupNature, InstrumentGroup, NamingRules } from './naming-rules.ts';
import { houseRulesSchema, houseRulesSchemaVersion, type HouseRules } from './house-rules.ts';

/**
 * The nine groups every starter set begins with, in the order in which a mix is usually built:
 * drums first, effects last (common practice, no source).
 */
export const starterGroups: readonly InstrumentGroup[] = (
  [
    ['drums', 'D', 'Drums'],
    ['percussion', 'P', 'Percussion'],
    ['bass', 'B', 'Bass'],
    ['guitars', 'G', 'Guitars'],
    ['keys', 'K', 'Keys'],
    ['synths', 'S', 'Synths'],
    ['orchestra', 'O', 'Orchestral'],
    ['vocals', 'V', 'Vocals'],
    ['effects', 'X', 'Effects'],
  ] satisfies [GroupNature, string, string][]
).map(([nature, letter, label], colour) => ({
  id: nature,
  nature,
  letter,
  label,
  colour,
  words: [],
}));

/** What no file can show and most mixing engineers ask (common practice, no source). */
export const defaultConfirmations: HouseRules['confirm'] = [
  {
    id: 'mix-bus-bypassed',
    text: 'Everything on the mix bus was switched off for the export: no limiter, no compressor, no equaliser.',
  },
  {
    id: 'mix-rides-removed',
    text: 'Volume rides made for the rough mix are removed; moves that belong to the music stay.',
  },
  { id: 'editing-done', text: 'Editing and tuning are finished.' },
  { id: 'takes-chosen', text: 'Every part is one chosen take; no spare takes are in the folder.' },
  { id: 'arrangement-final', text: 'The arrangement is final.' },
];

function startFrom(names: NamingRules, rest: Record<string, unknown>): HouseRules {
  return houseRulesSchema.parse({ schema: houseRulesSchemaVersion, names, ...rest });
}

const plainNames: NamingRules = {
  tokens: ['instrument', 'detail', 'side'],
  separator: ' ',
  case: 'title',
  groupStyle: 'letter',
  numberDigits: 2,
  maximumLength: 40,
  characters: 'portable',
  groups: [...starterGroups],
};

export const starterNames = ['numbered', 'group-letter', 'plain'] as const;
export type StarterName = (typeof starterNames)[number];

/**
 * Complete house rules to begin from. They differ in how a name is put together: `01 Kick In`,
 * `D Kick In`, `Kick In`.
 */
export const starterSets: Readonly<Record<StarterName, HouseRules>> = {
  numbered: startFrom(
    { ...plainNames, tokens: ['number', ...plainNames.tokens] },
    { confirm: defaultConfirmations },
  ),
  'group-letter': startFrom(
    { ...plainNames, tokens: ['group', ...plainNames.tokens] },
    { confirm: defaultConfirmations },
  ),
  plain: startFrom(plainNames, { confirm: defaultConfirmations }),
};

/**
 * Used where nobody's rules apply. It keeps to what is true of any delivery: nobody published a
 * naming convention, a bit depth or a list of things to bring, so none of these can be broken
 * badly. Names are still proposed, in plain form.
 */
export const defaultRules: HouseRules = startFrom(
  { ...plainNames, case: 'as-is', maximumLength: 80, characters: 'unicode' },
  {
    bring: {
      roughMix: 'welcome',
      orderOfImportance: 'not-needed',
      notes: 'not-needed',
      tempo: 'welcome',
    },
    levels: { 'name-breaks-rule': { level: 'off' }, 'bit-depth-low': { level: 'look' } },
  },
);
