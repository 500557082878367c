import { measureAll } from '#shared/session/measure-all.ts';
import type { MeasuredFile } from '#shared/session/measured-file.ts';
import { fileOnDisk } from '../browser/file-source.ts';
import type { FileToRead } from '../workers/file-to-read.ts';
import type { MeasurePool } from '../workers/measure-pool.ts';
import type { ReadingProgress } from './bench-state.ts';

/** How often progress and what is found so far are told, in milliseconds. */
const progressMs = 100;
const previewMs = 250;
/** Large sessions take long to show: this many times as long passes before they are shown again. */
const previewPause = 4;

export type MeasureFilesOptions = {
  signal: AbortSignal;
  onMeasured: (file: FileToRead, measured: MeasuredFile) => void;
  onProgress: (progress: ReadingProgress) => void;
  /** From time to time, when more files may be measured; never again before it is done. */
  onPreview: () => Promise<void>;
};

/** Measures files in the pool; answers how many bytes they have. Throws AppError as the pool does. */
export async function measureFiles(
  files: readonly FileToRead[],
  pool: MeasurePool,
  { signal, onMeasured, onProgress, onPreview }: MeasureFilesOptions,
): Promise<number> {
  const startedAt = performance.now();
  const byPath = new Map(files.map((file) => [file.path, file]));
  const current = new Map<string, number>();
  let previewing = false;
  let previewFrom = 0;
  let progressAt = 0;
  let bytes = 0;
  // What is shown meanwhile must neither stop the reading nor take much of its time.
  const preview = async (startedAt: number): Promise<void> => {
    await onPreview().catch(() => undefined);
    const now = performance.now();
    previewFrom = now + Math.max(previewMs, previewPause * (now - startedAt));
    previewing = false;
  };
  await measureAll(
    files.map(({ path, file, size }) => ({ ...fileOnDisk(path, file), size })),
    async ({ path }, options) => {
      const file = byPath.get(path)!;
      current.set(path, 0);
      const measured = await pool.measure(file, {
        signal: options.signal,
        onProgress: (readBytes) => {
          options.onBytes?.(readBytes - (current.get(path) ?? 0));
          current.set(path, readBytes);
        },
      });
      current.delete(path);
      onMeasured(file, measured);
      return measured;
    },
    {
      atOnce: pool.size,
      signal,
      onProgress: (progress) => {
        bytes = progress.bytes;
        const now = performance.now();
        if (now - progressAt > progressMs) {
          progressAt = now;
          onProgress({ ...progress, startedAt, current: new Map(current) });
        }
        if (!previewing && now >= previewFrom) {
          previewing = true;
          void preview(now);
        }
      },
    },
  );
  return bytes;
}
