import { AppError } from '#shared/errors.ts';
import { offerDownload } from '../workers/offer-download.ts';
import type { PackOutput, PackProgress } from '../workers/session-api.ts';
import type { Bench } from './bench.ts';

type SaveOptions = { signal: AbortSignal; onProgress: (progress: PackProgress) => void };

/** Whether the browser lets a page write into a file that somebody picked. */
export function hasSavePicker(): boolean {
  return 'showSaveFilePicker' in window;
}

/**
 * Asks where to save. Must be the first thing a click does: some seconds later the browser no
 * longer counts the click. Null when the person closed the picker.
 */
export async function pickZip(fileName: string): Promise<FileSystemFileHandle | null> {
  try {
    return await window.showSaveFilePicker({
      suggestedName: fileName,
      types: [{ description: 'Zip', accept: { 'application/zip': ['.zip'] } }],
    });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') return null;
    throw cause;
  }
}

/**
 * Writes the zip into the picked file, or, without one, as a download. Never more than a few
 * blocks are in memory. Throws AppError `disk-full`, `file-changed`, `no-access`, `cancelled`.
 */
export async function saveZip(
  bench: Bench,
  handle: FileSystemFileHandle | null,
  { signal, onProgress }: SaveOptions,
): Promise<PackOutput> {
  const { fileName, bytes } = await bench.prepare();
  const worker = await bench.sessionWorker();
  if (handle) return worker.call('pack', { kind: 'picked-file', handle }, { signal, onProgress });
  const channel = new MessageChannel();
  const finished = await offerDownload({ fileName, bytes, port: channel.port2 });
  try {
    return await worker.call(
      'pack',
      { kind: 'port', port: channel.port1 },
      { signal, onProgress, transfer: [channel.port1] },
    );
  } catch (cause) {
    // The browser's own download list has a cancel button too.
    throw cause instanceof Error && cause.name === 'ReaderStopped'
      ? new AppError('cancelled')
      : cause;
  } finally {
    finished();
  }
}
