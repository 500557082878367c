import type { PDFDocument, PDFFont } from 'pdf-lib';
import { unwrapWoff } from './unwrap-woff.ts';

/** Cuts of the typefaces the sheet is set in. */
export const sheetFaces = ['sans-400', 'sans-600', 'mono-400'] as const;
export type SheetFace = (typeof sheetFaces)[number];

/** The pieces a face comes in; most sheets need the first one only. */
export const fontSubsets = [
  'latin',
  'latin-ext',
  'greek',
  'cyrillic',
  'cyrillic-ext',
  'vietnamese',
] as const;
export type FontSubset = (typeof fontSubsets)[number];

/**
 * Loads a WOFF file of IBM Plex (never WOFF2: the PDF library then makes blank pages and says
 * nothing); null where the face has no such subset.
 */
export type LoadSheetFont = (face: SheetFace, subset: FontSubset) => Promise<Uint8Array | null>;

/** Where letters of a script are looked for, the commonest place first. */
const subsetsOf: [RegExp, FontSubset[]][] = [
  [/^[\p{ASCII}\u00a0-\u00ff\u2000-\u206f\u20ac\u2122\u2212]$/u, ['latin']],
  [/^\p{Script=Greek}$/u, ['greek']],
  [/^\p{Script=Cyrillic}$/u, ['cyrillic', 'cyrillic-ext']],
  [/^./u, ['latin', 'latin-ext', 'vietnamese', 'cyrillic']],
];

/** A stretch of text that one font can draw. */
export type TextRun = { text: string; font: PDFFont };

/** Text cut into runs, each with its font. */
export type SheetFonts = {
  runs(text: string, face: SheetFace): TextRun[];
  /** Whether any character had no font and was written as its number. */
  readonly hasEscapes: boolean;
};

/**
 * Embeds the fonts the given texts need, and no more: which letters are covered is asked of the
 * fonts themselves, because the library draws nothing for a letter it lacks.
 */
export async function embedSheetFonts(
  document: PDFDocument,
  texts: Iterable<string>,
  load: LoadSheetFont,
): Promise<SheetFonts> {
  const characters = new Set<string>();
  for (const text of texts) for (const character of clean(text)) characters.add(character);
  const fonts = new Map<SheetFace, Map<FontSubset, PDFFont>>();
  for (const face of sheetFaces) {
    const subsets = new Map<FontSubset, PDFFont>();
    for (const subset of neededSubsets(characters)) {
      const bytes = await load(face, subset);
      if (bytes) subsets.set(subset, await document.embedFont(unwrapWoff(bytes), { subset: true }));
    }
    fonts.set(face, subsets);
  }
  const covered = new Map<PDFFont, Set<number>>();
  let hasEscapes = false;

  const fontFor = (character: string, face: SheetFace): PDFFont | null => {
    const code = character.codePointAt(0) ?? 0;
    for (const font of fonts.get(face)?.values() ?? []) {
      let codes = covered.get(font);
      if (!codes) covered.set(font, (codes = new Set(font.getCharacterSet())));
      if (codes.has(code)) return font;
    }
    return null;
  };

  return {
    runs(text, face) {
      const runs: TextRun[] = [];
      const append = (piece: string, font: PDFFont) => {
        const last = runs.at(-1);
        if (last?.font === font) last.text += piece;
        else runs.push({ text: piece, font });
      };
      for (const character of clean(text)) {
        const font = fontFor(character, face);
        if (font) append(character, font);
        else {
          hasEscapes = true;
          for (const letter of escapeOf(character)) append(letter, fontFor(letter, face)!);
        }
      }
      return runs;
    },
    get hasEscapes() {
      return hasEscapes;
    },
  };
}

function neededSubsets(characters: ReadonlySet<string>): FontSubset[] {
  const needed = new Set<FontSubset>(['latin']);
  for (const character of characters) {
    const place = subsetsOf.find(([pattern]) => pattern.test(character));
    for (const subset of place?.[1] ?? []) needed.add(subset);
  }
  return fontSubsets.filter((subset) => needed.has(subset));
}

/** Composed, without what steers a terminal or a printer. */
function clean(text: string): string {
  return text.normalize('NFC').replace(/[\p{Cc}\p{Cf}]/gu, ' ');
}

/** How a letter without a font is written: `[U+D55C]`. */
function escapeOf(character: string): string {
  const code = character.codePointAt(0) ?? 0;
  return `[U+${code.toString(16).toUpperCase().padStart(4, '0')}]`;
}
