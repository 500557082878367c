import type { MeasureFile } from '../session/measure-file.ts';
import type { MeasuredFile } from '../session/measured-file.ts';
import type { RenderedFile } from './render-entry.ts';

/** More than any session has; what is beyond is measured again. */
const mostRemembered = 2000;

/**
 * Measures what repairs make only once, however often somebody changes their mind: the same
 * operations on the same files make the same file, whatever it is called. Dropped files are
 * passed on, they are measured once anyway.
 */
export function rememberRenders(measureFile: MeasureFile): MeasureFile {
  const known = new Map<string, MeasuredFile>();
  return async (file, options) => {
    if (!('entry' in file)) return measureFile(file, options);
    const key = keyOf(file as RenderedFile);
    const remembered = key === null ? undefined : known.get(key);
    if (remembered) return { ...remembered, path: file.path };
    const measured = await measureFile(file, options);
    const [oldest] = known.keys();
    if (known.size >= mostRemembered && oldest !== undefined) known.delete(oldest);
    if (key !== null && measured.measures && !measured.measures.changedWhileRead) {
      known.set(key, measured);
    }
    return measured;
  };
}

/** null where it is not known what the sources hold. */
function keyOf({ entry, tracks }: RenderedFile): string | null {
  if (tracks.some(({ crc32 }) => crc32 === null)) return null;
  const sources = tracks.map(({ file, crc32 }) => [file.path, file.size, crc32]);
  return JSON.stringify([sources, entry.operations, entry.rewriteAsWav]);
}
