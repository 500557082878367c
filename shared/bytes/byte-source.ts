/**
 * Bytes that can be read at any place without being loaded: a File in the browser, a file
 * handle in Node, an entry of a zip, an array in a test. The core sees nothing else.
 */
export type ByteSource = {
  /** Length in bytes when the source was opened. */
  readonly size: number;
  /**
   * Reads `length` bytes at `offset` (both in bytes). Returns fewer where the source ends
   * earlier, an empty array beyond its end. Throws AppError `no-access` when it cannot be read.
   */
  read(offset: number, length: number): Promise<Uint8Array>;
  /**
   * Streams from `offset` to the end in blocks of the source's own size. A block is only valid
   * until the next one is asked for. Throws like read(); stops at the next block on abort.
   */
  stream(offset: number, signal?: AbortSignal): AsyncIterable<Uint8Array>;
};

/** A source over bytes that are already in memory. */
export function bytesSource(bytes: Uint8Array): ByteSource {
  return {
    size: bytes.length,
    read: (offset, length) => Promise.resolve(bytes.subarray(offset, offset + length)),
    // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
    async *stream(offset, signal) {
      const blockBytes = 1 << 20;
      for (let at = offset; at < bytes.length; at += blockBytes) {
        signal?.throwIfAborted();
        yield bytes.subarray(at, at + blockBytes);
      }
    },
  };
}

/** A source that holds something of the system (a file handle) until it is closed. */
export type OpenByteSource = ByteSource & { close(): Promise<void> };

/** One file of whatever was dropped: a folder on disk, a list of browser files, a zip. */
export type DroppedFile = {
  /** Relative to the dropped folder, parts joined by `/`, never starting with one. */
  path: string;
  /** Length in bytes when it was listed. */
  size: number;
  /** Throws AppError `no-access` (or `zip-refused` for an entry of a zip). */
  open(): Promise<OpenByteSource>;
};
