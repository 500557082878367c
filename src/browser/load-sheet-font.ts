import type { LoadSheetFont } from '#shared/pack/track-sheet/sheet-fonts.ts';

/** Addresses of the WOFF files, by file name; only those a sheet needs are fetched. */
const addresses = Object.fromEntries(
  Object.entries(
    import.meta.glob<string>(
      [
        '/node_modules/@fontsource/ibm-plex-sans/files/ibm-plex-sans-*-{400,600}-normal.woff',
        '/node_modules/@fontsource/ibm-plex-mono/files/ibm-plex-mono-*-400-normal.woff',
      ],
      { query: '?url', import: 'default', eager: true },
    ),
  ).map(([path, url]) => [path.slice(path.lastIndexOf('/') + 1), url]),
);

/** Fetches a face of the track sheet from our own server. */
export const loadSheetFont: LoadSheetFont = async (face, subset) => {
  const [family, weight] = face.split('-');
  const address = addresses[`ibm-plex-${family!}-${subset}-${weight!}-normal.woff`];
  if (address === undefined) return null;
  const answer = await fetch(address);
  if (!answer.ok) throw new Error(`the font ${face} ${subset} could not be loaded`);
  return new Uint8Array(await answer.arrayBuffer());
};
