import type { SessionWorker } from '../workers/session-link.ts';
import type { ZipVerification } from './bench-state.ts';

type VerifyZipOptions = {
  signal?: AbortSignal | undefined;
  /** Told where the reading is, and once what came of it. */
  onChange: (verification: ZipVerification) => void;
};

/** Compares a zip with its own list of checksums, in the session worker. Never throws. */
export async function verifyZip(
  zip: File,
  openWorker: () => Promise<SessionWorker>,
  { signal, onChange }: VerifyZipOptions,
): Promise<void> {
  const { name: fileName, size: bytes } = zip;
  const tell = (bytesRead: number): void =>
    onChange({ fileName, step: 'reading', bytesRead, bytes });
  tell(0);
  try {
    const worker = await openWorker();
    const found = await worker.call('verifyZip', zip, { signal, onProgress: tell });
    onChange({ fileName, step: 'done', found });
  } catch (failure) {
    if (!signal?.aborted) onChange({ fileName, step: 'failed', failure });
  }
}
