/**
 * Contrast of two colours by WCAG 2.2: relative luminance and (L1 + 0.05) / (L2 + 0.05), with
 * the sRGB threshold 0.04045 of IEC 61966-2-1.
 */

/** Red, green and blue, 0 to 255. */
export type Rgb = readonly [number, number, number];

function linear(channel: number): number {
  const share = channel / 255;
  return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
}

/** 0 (black) to 1 (white). */
export function relativeLuminance([red, green, blue]: Rgb): number {
  return 0.2126 * linear(red) + 0.7152 * linear(green) + 0.0722 * linear(blue);
}

/** 1 (the same colour) to 21 (black on white); the order does not matter. */
export function contrastRatio(one: Rgb, other: Rgb): number {
  const a = relativeLuminance(one);
  const b = relativeLuminance(other);
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
}

/** Least contrast by WCAG 2.2: 1.4.3 for text, 1.4.11 for marks and the borders of controls. */
export const leastContrast = { text: 4.5, mark: 3 } as const;

export type ContrastPair = {
  /** Token names without the dashes. */
  ink: string;
  ground: string;
  need: keyof typeof leastContrast;
};

const grounds = ['paper', 'sheet', 'well', 'wash', 'must-wash', 'look-wash', 'note-wash'];

/** Every pair of tokens that meets on a page. A new use of a colour is added here first. */
export const contrastPairs: readonly ContrastPair[] = [
  ...['ink', 'ink-2', 'case', 'case-deep', 'must', 'look', 'note'].flatMap((ink) =>
    grounds.map((ground): ContrastPair => ({ ink, ground, need: 'text' })),
  ),
  { ink: 'on-case', ground: 'case', need: 'text' },
  { ink: 'on-case', ground: 'case-deep', need: 'text' },
  { ink: 'on-must', ground: 'must', need: 'text' },
  { ink: 'on-tape', ground: 'tape', need: 'text' },
  ...['edge', 'wave', 'case'].flatMap((ink) =>
    grounds.map((ground): ContrastPair => ({ ink, ground, need: 'mark' })),
  ),
];
