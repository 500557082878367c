import type { GroupNature, InstrumentGroup } from '../rules/naming-rules.ts';
import type { FileRole } from '../session/session-information.ts';
import { foldName } from './fold-name.ts';
import type { LeftoverKind, Side } from './parsed-name.ts';
import { bass } from './vocabulary/bass.ts';
import { details } from './vocabulary/details.ts';
import { drums } from './vocabulary/drums.ts';
import { effects } from './vocabulary/effects.ts';
import type { DetailEntry, InstrumentEntry } from './vocabulary/entry.ts';
import { guitars } from './vocabulary/guitars.ts';
import { keys } from './vocabulary/keys.ts';
import { orchestra } from './vocabulary/orchestra.ts';
import { leftoverWords, roleWords, sideWords, takeWords } from './vocabulary/other-words.ts';
import { percussion } from './vocabulary/percussion.ts';
import { synths } from './vocabulary/synths.ts';
import { vocals } from './vocabulary/vocals.ts';

export type Instrument = {
  written: string;
  short: string;
  nature: GroupNature;
  /** Position in the vocabulary: the order in which parts of one group are listed. */
  rank: number;
  general: boolean;
  detail: string | null;
};

export type Standing = 'sure' | 'unsure' | 'misspelt';

export type Meaning =
  | { kind: 'instrument'; instrument: Instrument; standing: Standing; adds: string | null }
  | { kind: 'detail'; detail: DetailEntry }
  | { kind: 'side'; side: Side }
  | { kind: 'role'; role: FileRole; sure: boolean }
  | { kind: 'take' }
  | { kind: 'ordinal'; value: number }
  | { kind: 'leftover'; leftover: LeftoverKind };

/** A way to write something: its letters without spaces, and where words may be apart. */
export type Form = {
  letters: string;
  /** Offsets in `letters` at which a new word begins. */
  breaks: readonly number[];
  meanings: Meaning[];
  /** Whether it surely means something, and whether it can be a side. */
  sure: boolean;
  side: boolean;
};

export type TrieNode = { next: Map<number, TrieNode>; forms: Form[] };

export function emptyTrie(): TrieNode {
  return { next: new Map(), forms: [] };
}

/** `a (b|c) d` -> `a b d`, `a c d`; one level of brackets, any number of them. */
function expand(pattern: string): string[] {
  const match = /\(([^()]*)\)/.exec(pattern);
  if (!match) return [pattern];
  const before = pattern.slice(0, match.index);
  const after = pattern.slice(match.index + match[0].length);
  return (match[1] ?? '').split('|').flatMap((choice) => expand(before + choice + after));
}

function formsOf(list: string | undefined): { words: string[]; adds: string | null }[] {
  if (list === undefined) return [];
  return list.split(',').flatMap((item) => {
    const [pattern = '', adds] = item.split('+');
    return expand(pattern.trim()).map((form) => ({
      words: foldName(form).split(/\s+/).filter(Boolean),
      adds: adds?.trim() ?? null,
    }));
  });
}

const strength: Readonly<Record<Standing, number>> = { sure: 2, misspelt: 1, unsure: 0 };

function merge(form: Form, meaning: Meaning): void {
  const index = form.meanings.findIndex((known) => {
    if (known.kind !== meaning.kind) return false;
    return known.kind === 'instrument' && meaning.kind === 'instrument'
      ? known.instrument === meaning.instrument
      : known.kind !== 'leftover' && known.kind !== 'role';
  });
  const known = form.meanings[index];
  if (known === undefined) form.meanings.push(meaning);
  else if (
    known.kind === 'instrument' &&
    meaning.kind === 'instrument' &&
    strength[meaning.standing] > strength[known.standing]
  ) {
    form.meanings[index] = meaning;
  }
}

/** Adds one way of writing something; the same way twice keeps all its meanings. */
export function addForm(root: TrieNode, words: readonly string[], meaning: Meaning): void {
  const letters = words.join('');
  if (letters === '') return;
  let node = root;
  for (let i = 0; i < letters.length; i++) {
    const code = letters.charCodeAt(i);
    let next = node.next.get(code);
    if (!next) {
      next = emptyTrie();
      node.next.set(code, next);
    }
    node = next;
  }
  const breaks: number[] = [];
  let offset = 0;
  for (const word of words.slice(0, -1)) breaks.push((offset += word.length));
  let form = node.forms.find((known) => known.breaks.join() === breaks.join());
  if (form) merge(form, meaning);
  else node.forms.push((form = { letters, breaks, meanings: [meaning], sure: false, side: false }));
  if (meaning.kind !== 'instrument' || meaning.standing === 'sure') form.sure = true;
  if (meaning.kind === 'side') form.side = true;
}

function addInstrument(root: TrieNode, entry: InstrumentEntry, instrument: Instrument): void {
  const add = (list: string | undefined, standing: Standing) => {
    for (const { words, adds } of formsOf(list)) {
      const meaning: Meaning = { kind: 'instrument', instrument, standing, adds };
      addForm(root, words, meaning);
      const last = words.at(-1) ?? '';
      if (last.length >= 2 && /[a-rt-z0-9]$/.test(last)) {
        addForm(root, [...words.slice(0, -1), `${last}s`], meaning);
      }
    }
  };
  const unsure = new Set(formsOf(entry.unsure).map(({ words }) => words.join(' ')));
  for (const name of [entry.written, entry.short]) {
    add(name, unsure.has(foldName(name)) ? 'unsure' : 'sure');
  }
  add(entry.forms, 'sure');
  add(entry.misspelt, 'misspelt');
  add(entry.unsure, 'unsure');
}

const byNature: Readonly<Record<GroupNature, readonly InstrumentEntry[]>> = {
  drums,
  percussion,
  bass,
  guitars,
  keys,
  synths,
  orchestra,
  vocals,
  effects,
};

/** Every instrument of the vocabulary by its written form. */
export const instruments: ReadonlyMap<string, Instrument> = new Map(
  Object.entries(byNature).flatMap(([nature, entries]) =>
    entries.map((entry, rank): [string, Instrument] => [
      entry.written,
      {
        written: entry.written,
        short: entry.short,
        nature: nature as GroupNature,
        rank,
        general: entry.general ?? false,
        detail: entry.detail ?? null,
      },
    ]),
  ),
);

/** Every detail by its written form, with its place in the order of details. */
export const detailRanks: ReadonlyMap<string, { entry: DetailEntry; rank: number }> = new Map(
  details.map((entry, rank) => [entry.written, { entry, rank }]),
);

const ordinalWords: readonly string[] = [
  '1st, first, i',
  '2nd, second, ii, zweite',
  '3rd, iii',
  '4th, fourth, iv',
];

function buildVocabulary(): TrieNode {
  const root = emptyTrie();
  for (const entries of Object.values(byNature)) {
    for (const entry of entries) {
      const instrument = instruments.get(entry.written);
      if (instrument) addInstrument(root, entry, instrument);
    }
  }
  const add = (list: string, meaning: Meaning) => {
    for (const { words } of formsOf(list)) addForm(root, words, meaning);
  };
  for (const detail of details) {
    add(`${detail.written}, ${detail.short}, ${detail.forms}`, { kind: 'detail', detail });
  }
  for (const [side, list] of Object.entries(sideWords)) {
    add(list, { kind: 'side', side: side as Side });
  }
  for (const { role, sure, forms } of roleWords) add(forms, { kind: 'role', role, sure });
  add(takeWords, { kind: 'take' });
  for (const [leftover, list] of Object.entries(leftoverWords)) {
    add(list, { kind: 'leftover', leftover: leftover as LeftoverKind });
  }
  ordinalWords.forEach((list, index) => add(list, { kind: 'ordinal', value: index + 1 }));
  return root;
}

let vocabulary: TrieNode | undefined;

/** The vocabulary, built at the first use. */
export function vocabularyTrie(): TrieNode {
  vocabulary ??= buildVocabulary();
  return vocabulary;
}

/** The vocabulary together with the words of one table of groups. */
export type Lexicon = {
  /** Searched in this order; the words of the table's own first. */
  tries: readonly TrieNode[];
  /** Instruments that the table puts elsewhere than their nature says, by written form. */
  groupOf: (instrument: Instrument) => InstrumentGroup | null;
  find: (written: string) => Instrument | null;
};

const lexicons = new WeakMap<readonly InstrumentGroup[], Lexicon>();

function formsAt(root: TrieNode, letters: string): readonly Form[] {
  let node: TrieNode | undefined = root;
  for (let i = 0; node && i < letters.length; i++) node = node.next.get(letters.charCodeAt(i));
  return node?.forms ?? [];
}

function buildLexicon(groups: readonly InstrumentGroup[]): Lexicon {
  const own = emptyTrie();
  const placed = new Map<Instrument, InstrumentGroup>();
  const added = new Map<string, Instrument>();
  for (const group of groups) {
    group.words.forEach((word, rank) => {
      const words = foldName(word)
        .split(/[^\p{L}\p{N}]+/u)
        .filter(Boolean);
      const known = formsAt(vocabularyTrie(), words.join(''))
        .flatMap((form) => form.meanings)
        .find((meaning) => meaning.kind === 'instrument');
      if (known) {
        if (!placed.has(known.instrument)) placed.set(known.instrument, group);
        return;
      }
      const instrument: Instrument = {
        written: word,
        short: word,
        nature: group.nature,
        rank: 1000 + rank,
        general: false,
        detail: null,
      };
      placed.set(instrument, group);
      added.set(word, instrument);
      addForm(own, words, { kind: 'instrument', instrument, standing: 'sure', adds: null });
    });
  }
  return {
    tries: added.size > 0 ? [own, vocabularyTrie()] : [vocabularyTrie()],
    groupOf: (instrument) =>
      placed.get(instrument) ?? groups.find((group) => group.nature === instrument.nature) ?? null,
    find: (written) => added.get(written) ?? instruments.get(written) ?? null,
  };
}

/** The lexicon of a table of groups, kept as long as the table is. */
export function lexiconOf(groups: readonly InstrumentGroup[]): Lexicon {
  let lexicon = lexicons.get(groups);
  if (!lexicon) {
    lexicon = buildLexicon(groups);
    lexicons.set(groups, lexicon);
  }
  return lexicon;
}
