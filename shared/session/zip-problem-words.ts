import type { ZipProblemReason } from '../bytes/zip-source.ts';

/** Why an entry of a dropped zip was not taken in, put so that it follows on its name. */
export const zipProblemWords: Record<ZipProblemReason, string> = {
  'absolute-path': 'its name leads out of the folder',
  'parent-folder': 'its name leads out of the folder',
  'drive-letter': 'its name leads out of the folder',
  backslash: 'its name holds a backslash',
  'nul-in-name': 'it has no usable name',
  'no-name': 'it has no usable name',
  symlink: 'a link is not followed',
  'special-file': 'it is no ordinary file',
  encrypted: 'it is encrypted',
  'nested-zip': 'a zip within a zip is not opened',
  'unknown-compression': 'it is packed in a way that cannot be read here',
  'name-repeated': 'another file in the zip has the same name',
  'damaged-entry': 'the zip is damaged there',
};
