import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import type { ParsedName } from '#shared/naming/parsed-name.ts';
import { nameTokens, type NamingRules } from '#shared/rules/naming-rules.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';

/** One row of fixtures/names: a file name and what an assistant would read in it. */
export type NameCase = {
  name: string;
  nature?: string;
  instrument?: string;
  ordinal?: number;
  detail?: string[];
  side?: string;
  role?: string;
  take?: number;
  number?: number;
  artist?: string;
  title?: string;
};

export function readNameCases(file: 'seen' | 'held-back'): NameCase[] {
  const text = readFileSync(
    new URL(`../../../fixtures/names/${file}.json`, import.meta.url),
    'utf8',
  );
  return JSON.parse(text) as NameCase[];
}

/** The part of a reading that the tables give. */
export function readingOf(parsed: ParsedName) {
  const { nature, instrument, ordinal, detail, side, role, take, number } = parsed;
  return { nature, instrument, ordinal, detail, side, role, take, number };
}

export function expectedReading(row: NameCase) {
  return {
    nature: row.nature ?? null,
    instrument: row.instrument ?? null,
    ordinal: row.ordinal ?? null,
    detail: row.detail ?? [],
    side: row.side ?? null,
    role: row.role ?? 'track',
    take: row.take ?? null,
    number: row.number ?? null,
  };
}

export const noSong = { artist: null, title: null, names: {}, roles: {} };

export const plain = starterSets.plain.names;
export const numbered = starterSets.numbered.names;
export const grouped = starterSets['group-letter'].names;

const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ'.split('');

/** Conventions as engineers could set them up, also odd ones: any tokens in any order. */
export const conventions: fc.Arbitrary<NamingRules> = fc
  .record({
    order: fc.shuffledSubarray([...nameTokens], { minLength: 1 }),
    separator: fc.constantFrom<NamingRules['separator']>(' ', '_', '-', '.'),
    case: fc.constantFrom<NamingRules['case']>('title', 'upper', 'lower', 'as-is'),
    groupStyle: fc.constantFrom<NamingRules['groupStyle']>('letter', 'word'),
    numberDigits: fc.integer({ min: 1, max: 4 }),
    maximumLength: fc.integer({ min: 24, max: 80 }),
    characters: fc.constantFrom<NamingRules['characters']>('portable', 'unicode'),
    groups: fc.shuffledSubarray([...plain.groups], { minLength: plain.groups.length }),
    letters: fc.shuffledSubarray(letters, { minLength: plain.groups.length }),
  })
  .map(({ order, groups, letters: chosen, ...rest }) => ({
    ...rest,
    tokens: order.includes('instrument') ? order : [...order, 'instrument'],
    groups: groups.map((group, index) => ({ ...group, letter: chosen[index] ?? group.letter })),
  }));
