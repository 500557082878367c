import type { InstrumentGroup, NamingRules } from '../rules/naming-rules.ts';
import { findExportMarks, findSongWords, type ExportMark } from './export-marks.ts';
import { foldName } from './fold-name.ts';
import { lexiconOf, type Lexicon } from './lexicon.ts';
import type { ParsedName } from './parsed-name.ts';
import { readFolder, type FolderHint } from './read-folder.ts';
import { readWords, type Word } from './read-words.ts';
import { resolveWords, type NameFrame } from './resolve-words.ts';
import { bareName, nameRuns, type Range } from './split-name.ts';
import { followsOrder } from './token-order.ts';

/** What is known of the song; its words in a name say nothing about the part. */
export type SongWords = { artist: string | null; title: string | null };

const nothingKnown: SongWords = { artist: null, title: null };

function groupWords(naming: NamingRules, group: InstrumentGroup): string[] {
  const text = naming.groupStyle === 'letter' ? group.letter : group.label;
  return foldName(text)
    .split(/[^\p{L}\p{N}]+/u)
    .filter(Boolean);
}

type GroupCandidate = { group: InstrumentGroup; range: Range };

/** Where a group of the table could be written, by its letter or its label. */
export function groupCandidates(name: string, naming: NamingRules): GroupCandidate[] {
  const pieces = nameRuns(name).filter((run) => run.isWord);
  const folded = pieces.map((piece) => foldName(piece.text));
  const candidates: GroupCandidate[] = [];
  for (const group of naming.groups) {
    const words = groupWords(naming, group);
    if (words.length === 0) continue;
    folded.forEach((_, index) => {
      if (!words.every((word, offset) => folded[index + offset] === word)) return;
      const first = pieces[index];
      const last = pieces[index + words.length - 1];
      if (first && last) {
        candidates.push({ group, range: { start: first.start, end: last.end } });
      }
    });
  }
  return candidates;
}

type Reading = {
  name: string;
  naming: NamingRules;
  lexicon: Lexicon;
  song: SongWords;
  folder: FolderHint;
  marks: readonly ExportMark[];
};

function read(
  reading: Reading,
  group: GroupCandidate | null,
): { words: Word[]; marks: ExportMark[] } {
  const range = group?.range;
  // `V 2 Pluck` has a group and a number in front, no second version.
  const own = range
    ? reading.marks.filter((mark) => mark.start >= range.end || mark.end <= range.start)
    : [...reading.marks];
  const masks = range ? [...own, range] : own;
  const first = readWords(reading.name, reading.lexicon.tries, masks);
  const songMarks = findSongWords(first.text, reading.song);
  if (songMarks.length === 0) return { words: first.words, marks: own };
  const again = readWords(reading.name, reading.lexicon.tries, [...masks, ...songMarks]);
  return { words: again.words, marks: [...own, ...songMarks] };
}

function resolve(reading: Reading, group: GroupCandidate | null, frame: NameFrame): ParsedName {
  const { words, marks } = read(reading, group);
  return resolveWords(words, marks, reading, frame, group);
}

/** Numbers as they could be the running number of a convention that does not begin with it. */
function numberCandidates(reading: Reading, group: GroupCandidate | null): number[] {
  const { words } = read(reading, group);
  return words
    .filter((word) => word.digits !== null)
    .map((word) => word.start)
    .reverse();
}

/**
 * Reads a name by the convention first, where the convention has a group or a number to look for:
 * the first reading that has every piece in its place and the group that its instrument belongs to.
 */
function readByConvention(reading: Reading): ParsedName | null {
  const { tokens } = reading.naming;
  const searchGroup = tokens.includes('group');
  const searchNumber = tokens.indexOf('number') > 0;
  if (!searchGroup && !searchNumber) return null;
  const groups = searchGroup ? groupCandidates(reading.name, reading.naming) : [null];
  for (const group of groups) {
    const numbers = searchNumber ? numberCandidates(reading, group) : [null];
    for (const numberStart of numbers) {
      const parsed = resolve(reading, group, { numberStart });
      if (parsed.instrument === null) continue;
      if (group && parsed.groupId !== group.group.id) continue;
      if (followsOrder(parsed.spans, tokens)) return parsed;
    }
  }
  return null;
}

/**
 * Reads what a file name says: running number, group, instrument, details, side, take, role, and
 * what is left over. `path` may have folders before the name; they help where the name alone says
 * little, and then only to a guess. Never throws, whatever the characters.
 *
 * A wrong answer given as certain would be worse than none: `certain` needs an instrument written
 * in full or by an abbreviation that means one thing, and nothing in the name that speaks against.
 */
export function parseName(
  path: string,
  naming: NamingRules,
  song: SongWords = nothingKnown,
): ParsedName {
  const name = bareName(path);
  const lexicon = lexiconOf(naming.groups);
  const reading: Reading = {
    name,
    naming,
    lexicon,
    song,
    folder: readFolder(path, lexicon),
    marks: findExportMarks(name),
  };
  return readByConvention(reading) ?? resolve(reading, null, { numberStart: null });
}
