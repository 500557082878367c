import { createXXHash64, type IHasher } from 'hash-wasm';
import { AppError } from '#shared/errors.ts';

type Written = { bytes: number; verified: boolean };
type Report = (progress: { step: 'writing' | 'verifying'; bytes: number }) => void;

/**
 * Streams blocks into a file somebody picked, then reads it back and compares. The browser writes
 * beside the file and puts it in place when it is closed, so a save that stops leaves what was
 * there before. Throws AppError `disk-full`, `no-access`, `cancelled`.
 */
export async function writeToPickedFile(
  handle: FileSystemFileHandle,
  blocks: AsyncIterable<Uint8Array>,
  signal: AbortSignal,
  report: Report,
): Promise<Written> {
  const hasher = await createXXHash64();
  const written = await write(handle, blocks, hasher.init(), signal, report);
  const wanted = hasher.digest('hex');
  const file = await handle.getFile();
  const found = await readBack(file, hasher.init(), signal, report);
  return { bytes: written, verified: file.size === written && found === wanted };
}

async function write(
  handle: FileSystemFileHandle,
  blocks: AsyncIterable<Uint8Array>,
  hasher: IHasher,
  signal: AbortSignal,
  report: Report,
): Promise<number> {
  const file = await handle.createWritable().catch(refused);
  let bytes = 0;
  try {
    for await (const block of blocks) {
      signal.throwIfAborted();
      hasher.update(block);
      // A copy: the stream may use the block's memory again while the browser still writes.
      await file.write(new Uint8Array(block)).catch(refused);
      bytes += block.length;
      report({ step: 'writing', bytes });
    }
    await file.close().catch(refused);
    return bytes;
  } catch (cause) {
    await file.abort().catch(() => undefined);
    throw cause;
  }
}

async function readBack(
  file: File,
  hasher: IHasher,
  signal: AbortSignal,
  report: Report,
): Promise<string> {
  const reader = file.stream().getReader();
  let bytes = 0;
  for (;;) {
    signal.throwIfAborted();
    const block = await reader.read();
    if (block.done) return hasher.digest('hex');
    hasher.update(block.value);
    bytes += block.value.length;
    report({ step: 'verifying', bytes });
  }
}

function refused(cause: unknown): never {
  const name = cause instanceof DOMException ? cause.name : '';
  if (name === 'QuotaExceededError') throw new AppError('disk-full');
  if (['NotAllowedError', 'NoModificationAllowedError', 'NotFoundError'].includes(name)) {
    throw new AppError('no-access', { reason: name });
  }
  throw cause;
}
