import type { DroppedFile } from '../bytes/byte-source.ts';
import type { MeasureFile } from './measure-file.ts';
import type { MeasuredFile } from './measured-file.ts';

export type MeasureProgress = {
  /** The file whose turn it is, or that was just finished. */
  path: string;
  filesDone: number;
  files: number;
  bytesDone: number;
  bytes: number;
};

export type MeasureAllOptions = {
  /** Files measured at a time: as many as there are threads to do it. */
  atOnce?: number;
  signal?: AbortSignal;
  onProgress?: (progress: MeasureProgress) => void;
};

/**
 * Measures files, several at a time, in the order of their paths (by code units, so that no
 * language setting changes anything). Rejects with the signal's reason after an abort.
 */
export async function measureAll(
  files: readonly DroppedFile[],
  measureFile: MeasureFile,
  { atOnce = 1, signal, onProgress }: MeasureAllOptions,
): Promise<MeasuredFile[]> {
  const sorted = [...files].sort((a, b) => (a.path < b.path ? -1 : a.path > b.path ? 1 : 0));
  const measured: MeasuredFile[] = [];
  const bytes = sorted.reduce((sum, { size }) => sum + size, 0);
  let bytesDone = 0;
  let filesDone = 0;
  let next = 0;
  const tell = (path: string) =>
    onProgress?.({ path, filesDone, files: sorted.length, bytesDone, bytes });

  async function work(): Promise<void> {
    while (next < sorted.length) {
      signal?.throwIfAborted();
      const index = next++;
      const file = sorted[index]!;
      tell(file.path);
      let readBytes = 0;
      measured[index] = await measureFile(file, {
        signal,
        onBytes: (more) => {
          readBytes += more;
          bytesDone += more;
          tell(file.path);
        },
      }).catch((error: unknown) => {
        // The others finish the file they have and start no new one.
        next = sorted.length;
        throw error;
      });
      // What was not read (another format, a damaged file) counts as done all the same.
      bytesDone += Math.max(0, file.size - readBytes);
      filesDone += 1;
      tell(file.path);
    }
  }
  await Promise.all(Array.from({ length: Math.max(1, atOnce) }, work));
  return measured;
}
