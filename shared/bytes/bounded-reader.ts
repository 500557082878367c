import type { ByteSource } from './byte-source.ts';

/** No read of a header asks its source for more than this. */
export const maxHeaderReadBytes = 64 * 1024;

/**
 * Reads small pieces of a large file without ever holding more than one window of it: the bytes
 * read last are kept, and a request that lies inside them costs nothing.
 */
export type BoundedReader = {
  readonly size: number;
  /**
   * `length` bytes (at most maxHeaderReadBytes) at `offset`; fewer where the file ends. The bytes
   * stay valid. Throws what the source throws.
   */
  read(offset: number, length: number): Promise<Uint8Array>;
  /** Like read() for contents of any length, cut at `limit` bytes and fetched in allowed reads. */
  readUpTo(offset: number, length: number, limit: number): Promise<Uint8Array>;
};

/** `windowBytes` is read at least, so that neighbouring fields come with the first of them. */
export function boundedReader(source: ByteSource, windowBytes = 4096): BoundedReader {
  let windowOffset = 0;
  let window = new Uint8Array(0);

  async function read(offset: number, length: number): Promise<Uint8Array> {
    if (length > maxHeaderReadBytes) throw new RangeError(`${length} bytes in one header read`);
    const end = Math.min(offset + length, source.size);
    if (end <= offset) return new Uint8Array(0);
    if (offset < windowOffset || end > windowOffset + window.length) {
      const wanted = Math.min(Math.max(length, windowBytes), source.size - offset);
      // A copy: what a source hands out may be a view of a buffer it uses again.
      window = new Uint8Array(await source.read(offset, wanted));
      windowOffset = offset;
    }
    return window.subarray(offset - windowOffset, end - windowOffset);
  }

  async function readUpTo(offset: number, length: number, limit: number): Promise<Uint8Array> {
    const total = Math.max(0, Math.min(length, limit, source.size - offset));
    if (total <= maxHeaderReadBytes) return read(offset, total);
    const bytes = new Uint8Array(total);
    let filled = 0;
    while (filled < total) {
      const part = await read(offset + filled, Math.min(total - filled, maxHeaderReadBytes));
      if (part.length === 0) break;
      bytes.set(part, filled);
      filled += part.length;
    }
    return bytes.subarray(0, filled);
  }

  return { size: source.size, read, readUpTo };
}
