import { WorkerLink } from './bridge.ts';
import type { FileToRead } from './file-to-read.ts';
import type { SampleApi } from './sample-api.ts';

/** Makes the sample session's files in a worker of its own. Throws AppError `cancelled`. */
export async function makeSampleFiles(signal: AbortSignal): Promise<FileToRead[]> {
  const link = new WorkerLink<SampleApi>(
    new Worker(new URL('./sample.worker.ts', import.meta.url), { type: 'module' }),
  );
  try {
    const files = await link.call('make', null, { signal });
    return files.map(({ path, file }) => ({ path, file, size: file.size }));
  } finally {
    link.close();
  }
}
