import type { InstrumentGroup, NamingRules } from '../rules/naming-rules.ts';
import { wordsOf } from './compose-name.ts';
import { foldName } from './fold-name.ts';
import { detailRanks, type Instrument, type Lexicon } from './lexicon.ts';
import { sides, type Side } from './parsed-name.ts';
import type { FileToName } from './propose-names.ts';

/** A file on its way to a proper name: what it is, in the words of the vocabulary. */
export type Part = {
  file: FileToName;
  /** Position in the session. */
  index: number;
  entry: Instrument;
  /** How it is written: as the vocabulary does, or as names do that stay as they are. */
  instrument: string;
  group: InstrumentGroup | null;
  /** Position of the group in the naming table. */
  groupRank: number;
  ordinal: number | null;
  details: readonly string[];
  /** How many of the details, from the end, are words of the artist's own. */
  freeWords: number;
  side: Side | null;
};

const mostFreeWords = 3;

/** `Verse 2` -> `Verse`. */
export function detailBase(detail: string): string {
  return detail.replace(/ \d+$/, '');
}

function detailRank(detail: string): number {
  return detailRanks.get(detailBase(detail))?.rank ?? detailRanks.size;
}

/** Words that nobody knows but the band: a player, a colour. Single letters and digits say little. */
function freeWords(file: FileToName, naming: NamingRules, noise: ReadonlySet<string>): string[] {
  return file.parsed.leftovers
    .filter(({ kind, text }) => kind === 'unknown' && !noise.has(foldName(text)))
    .flatMap(({ text }) => wordsOf(text, naming))
    .filter((word) => [...word].length > 1 && /\p{L}/u.test(word))
    .slice(0, mostFreeWords);
}

/** null where no name can be made: no instrument, or no group where the convention writes one. */
export function partsOf(
  file: FileToName,
  index: number,
  naming: NamingRules,
  lexicon: Lexicon,
  noise: ReadonlySet<string>,
): Part | null {
  const { parsed } = file;
  const entry = parsed.instrument === null ? null : lexicon.find(parsed.instrument);
  if (!entry) return null;
  const group = lexicon.groupOf(entry);
  if (!group && naming.tokens.includes('group')) return null;
  const known = [...parsed.detail].sort((a, b) => detailRank(a) - detailRank(b));
  const free = freeWords(file, naming, noise);
  return {
    file,
    index,
    entry,
    instrument: entry.written,
    group,
    groupRank: group ? naming.groups.indexOf(group) : naming.groups.length,
    ordinal: parsed.ordinal,
    details: naming.tokens.includes('detail') ? [...known, ...free] : [],
    freeWords: naming.tokens.includes('detail') ? free.length : 0,
    side: parsed.side === 'stereo' ? null : parsed.side,
  };
}

/** The order of a track sheet: group, instrument, ordinal, details, side, then as delivered. */
export function compareParts(a: Part, b: Part): number {
  const byDetail = (): number => {
    const most = Math.max(a.details.length, b.details.length);
    for (let i = 0; i < most; i++) {
      const [left, right] = [a.details[i], b.details[i]];
      if (left === right) continue;
      if (left === undefined) return -1;
      if (right === undefined) return 1;
      return detailRank(left) - detailRank(right) || (left < right ? -1 : 1);
    }
    return 0;
  };
  const sideRank = (side: Side | null) => (side === null ? -1 : sides.indexOf(side));
  return (
    a.groupRank - b.groupRank ||
    a.entry.rank - b.entry.rank ||
    (a.ordinal ?? 0) - (b.ordinal ?? 0) ||
    byDetail() ||
    sideRank(a.side) - sideRank(b.side) ||
    a.index - b.index
  );
}

function shortDetail(detail: string): string {
  const base = detailBase(detail);
  const short = detailRanks.get(base)?.entry.short;
  return short === undefined ? detail : short + detail.slice(base.length);
}

/**
 * The same part in ever fewer letters: without words of the artist's own, then details shortened
 * from the last to the first, then the instrument, then details left out from the last to the
 * first. Number, ordinal and side always stay.
 */
export function* shorterParts(part: Part): Generator<Part> {
  yield part;
  if (part.instrument !== part.entry.written) yield { ...part, instrument: part.entry.written };
  const known = part.details.length - part.freeWords;
  for (let count = part.details.length - 1; count >= known; count--) {
    yield { ...part, details: part.details.slice(0, count) };
  }
  const details = part.details.slice(0, known);
  for (let at = known - 1; at >= 0; at--) {
    details[at] = shortDetail(details[at] ?? '');
    yield { ...part, details: [...details] };
  }
  const instrument = part.entry.short;
  yield { ...part, instrument, details: [...details] };
  for (let count = known - 1; count >= 0; count--) {
    yield { ...part, instrument, details: details.slice(0, count) };
  }
}
