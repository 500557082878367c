import { foldName } from './fold-name.ts';
import type { Leftover, LeftoverKind } from './parsed-name.ts';
import { glued, type NameText } from './split-name.ts';

/** A piece of a name that is no word: a date, a tempo, a sample rate. `counter` where it counts. */
export type ExportMark = Leftover & { counter: number | null };

const rate = '(?:44[.,_]?1|48|88[.,_]?2|96|176[.,_]?4|192)';
const bits = '(?:16|24|32)';
const before = '(?<![\\p{L}\\p{N}])';
const after = '(?![\\p{L}\\p{N}])';

/** In the order in which they are looked for; what one took, the next does not see. */
const patterns: readonly {
  kind: LeftoverKind;
  pattern: RegExp;
  counts?: true;
  /** Cheap to ask, and false for most names. */
  when: RegExp;
}[] = [
  {
    kind: 'date',
    when: /(?:19|20)\d\d/,
    pattern:
      /(?<!\d)(?:19|20)\d\d[-_. ]?(?:0[1-9]|1[0-2])[-_. ]?(?:0[1-9]|[12]\d|3[01])(?:[T_ -]+\d\d[-.:h]?\d\d(?:[-.:]?\d\d)?)?(?!\d)/gu,
  },
  {
    kind: 'date',
    when: /(?:19|20)\d\d/,
    pattern:
      /(?<!\d)(?:0?[1-9]|[12]\d|3[01])[-_.](?:0?[1-9]|[12]\d|3[01])[-_.](?:19|20)\d\d(?!\d)/gu,
  },
  { kind: 'tempo', when: /bpm/i, pattern: /(?<!\d)\d{2,3}(?:[.,]\d{1,3})?[ _-]*bpm(?!\p{L})/giu },
  { kind: 'tempo', when: /bpm/i, pattern: /(?<!\p{L})bpm[ _=-]*\d{2,3}(?:[.,]\d{1,3})?(?!\d)/giu },
  {
    kind: 'format',
    when: /16|24|32|44|48|88|96|176|192/,
    pattern: new RegExp(
      `${before}${rate} ?k(?:hz)?(?:[ _./-]*${bits} ?(?:bits?|b|fp?|float)?)?${after}`,
      'giu',
    ),
  },
  {
    kind: 'format',
    when: /16|24|32|44|48|88|96|176|192/,
    pattern: new RegExp(
      `${before}${bits}[ _-]?(?:bits?|b|float|fp)(?:[ _./-]*(?:float|${rate} ?(?:k(?:hz)?)?))?${after}`,
      'giu',
    ),
  },
  {
    kind: 'format',
    when: /16|24|32|44|48|88|96|176|192/,
    pattern: new RegExp(
      `${before}(?:${bits}[_./x-]?${rate}|${rate}[_./x-]?${bits})${after}`,
      'giu',
    ),
  },
  {
    kind: 'key',
    when: /maj|min|dur|moll/,
    pattern: /(?<![\p{L}\p{N}])[A-G][#♯b♭]?[ _-]?(?:maj|min|major|minor|dur|moll)(?!\p{L})/gu,
  },
  { kind: 'key', when: /[#♯]/, pattern: /(?<![\p{L}\p{N}])[A-G][#♯]m?(?![\p{L}\p{N}])/gu },
  {
    kind: 'version',
    when: /v/i,
    pattern: /(?<![\p{L}\p{N}])v(?:er(?:sion)?)?[ ._-]?\d{1,3}(?:\.\d{1,2})?(?![\p{L}\p{N}])/giu,
  },
  { kind: 'counter', when: /[)\]}]/, pattern: /[([{] ?(\d{1,3}) ?[)\]}]/gu, counts: true },
];

/** What programs and habits write into a name besides words. Offsets in the bare name. */
export function findExportMarks(name: string): ExportMark[] {
  const marks: ExportMark[] = [];
  for (const { kind, pattern, counts, when } of patterns) {
    if (!when.test(name)) continue;
    for (const match of name.matchAll(pattern)) {
      const start = match.index;
      const end = start + match[0].length;
      const other = marks.find((mark) => start < mark.end && end > mark.start);
      if (other) {
        if (other.kind !== kind) continue;
        other.start = Math.min(other.start, start);
        other.end = Math.max(other.end, end);
        other.text = name.slice(other.start, other.end);
        continue;
      }
      marks.push({ kind, text: match[0], start, end, counter: counts ? Number(match[1]) : null });
    }
  }
  return marks;
}

function lettersOf(text: string): string {
  return foldName(text).replace(/[^\p{L}\p{N}]/gu, '');
}

/** Where a name repeats the artist or the title of the song; offsets in the bare name. */
export function findSongWords(
  text: NameText,
  song: { artist: string | null; title: string | null },
): ExportMark[] {
  const marks: ExportMark[] = [];
  for (const kind of ['artist', 'title'] as const) {
    const letters = lettersOf(song[kind] ?? '');
    if (letters.length < 3) continue;
    const at = text.letters.indexOf(letters);
    if (at < 0 || text.boundary[at] === glued) continue;
    if (text.boundary[at + letters.length] === glued) continue;
    const start = text.starts[at] ?? 0;
    const end = text.ends[at + letters.length - 1] ?? start;
    marks.push({ kind, text: text.name.slice(start, end), start, end, counter: null });
  }
  return marks;
}
