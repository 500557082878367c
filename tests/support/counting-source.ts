import type { ByteSource } from '#shared/bytes/byte-source.ts';

export type ReadCounts = {
  reads: number;
  bytes: number;
  /** The largest single read, in bytes. */
  largest: number;
};

/** A source that keeps account of what is asked of it; streaming counts block by block. */
export function countingSource(source: ByteSource): ByteSource & { counts: ReadCounts } {
  const counts: ReadCounts = { reads: 0, bytes: 0, largest: 0 };
  const count = (length: number) => {
    counts.reads += 1;
    counts.bytes += length;
    counts.largest = Math.max(counts.largest, length);
  };
  return {
    size: source.size,
    counts,
    read(offset, length) {
      count(length);
      return source.read(offset, length);
    },
    async *stream(offset, signal) {
      for await (const block of source.stream(offset, signal)) {
        count(block.length);
        yield block;
      }
    },
  };
}

/** A source whose bytes are given at some places and zero everywhere else; any size costs nothing. */
export function sparseSource(
  size: number,
  pieces: readonly { offset: number; bytes: Uint8Array }[],
): ByteSource {
  const read = (offset: number, length: number) => {
    const bytes = new Uint8Array(Math.max(0, Math.min(length, size - offset)));
    for (const piece of pieces) {
      const from = Math.max(offset, piece.offset);
      const to = Math.min(offset + bytes.length, piece.offset + piece.bytes.length);
      if (from < to) {
        const part = piece.bytes.subarray(from - piece.offset, to - piece.offset);
        bytes.set(part, from - offset);
      }
    }
    return Promise.resolve(bytes);
  };
  return {
    size,
    read,
    async *stream(offset, signal) {
      for (let at = offset; at < size; at += 1 << 20) {
        signal?.throwIfAborted();
        yield await read(at, 1 << 20);
      }
    },
  };
}
