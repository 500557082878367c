import type { ByteSource, DroppedFile } from '#shared/bytes/byte-source.ts';
import { AppError } from '#shared/errors.ts';

/**
 * A dropped file as a ByteSource. Works in workers and on the page; only workers should read.
 * A file that was moved, deleted or overwritten since it was dropped throws `no-access`.
 */
export function fileSource(file: File, path: string): ByteSource {
  return {
    size: file.size,
    async read(offset, length) {
      try {
        return new Uint8Array(await file.slice(offset, offset + length).arrayBuffer());
      } catch (cause) {
        throw asAppError(cause, path);
      }
    },
    async *stream(offset, signal) {
      // The default reader: byte-stream readers were seen to hang in Chromium.
      const reader = (offset === 0 ? file : file.slice(offset)).stream().getReader();
      try {
        for (;;) {
          signal?.throwIfAborted();
          const block = await reader.read();
          if (block.done) return;
          yield block.value;
        }
      } catch (cause) {
        throw signal?.aborted ? cause : asAppError(cause, path);
      } finally {
        // Closes the file also when the reading stopped half way.
        await reader.cancel().catch(() => undefined);
      }
    },
  };
}

function asAppError(cause: unknown, path: string): unknown {
  const unreadable = cause instanceof DOMException && cause.name !== 'AbortError';
  return unreadable ? new AppError('no-access', { path, reason: cause.name }) : cause;
}

/** A dropped file as the core knows it. Nothing stays open between reads, so closing is free. */
export function fileOnDisk(path: string, file: File): DroppedFile {
  return {
    path,
    size: file.size,
    open: () =>
      Promise.resolve({ ...fileSource(file, path), close: () => Promise.resolve(undefined) }),
  };
}
