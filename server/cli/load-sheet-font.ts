import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { LoadSheetFont } from '#shared/pack/track-sheet/sheet-fonts.ts';

const { resolve } = createRequire(import.meta.url);

/** Plex Mono has no Greek. */
const monoSubsets = ['latin', 'latin-ext', 'cyrillic', 'cyrillic-ext', 'vietnamese'];

/** The fonts of the installed packages. */
export const loadSheetFont: LoadSheetFont = async (face, subset) => {
  const [family = '', weight = ''] = face.split('-');
  if (family === 'mono' && !monoSubsets.includes(subset)) return null;
  const plex = `ibm-plex-${family}`;
  return readFile(resolve(`@fontsource/${plex}/files/${plex}-${subset}-${weight}-normal.woff`));
};
