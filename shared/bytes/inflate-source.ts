import type { ByteSource, OpenByteSource } from './byte-source.ts';

/**
 * Deflate makes at most 1,032 bytes of one (its longest match costs two bits), and a decompressor
 * may hold all that one piece makes: small pieces keep even a bomb in bounds.
 */
const smallestPieceBytes = 1024;
const largestPieceBytes = 32 * 1024;
const wantedOutputBytes = 512 * 1024;

/** The first bytes are asked for again and again: header, then time stamp, then markers. */
const keptHeadBytes = 64 * 1024;

export type DeflatedPart = {
  source: ByteSource;
  /** Where the deflated bytes lie in the source. */
  offset: number;
  packedBytes: number;
  /** What the zip claims; never believed, only held against what comes out. */
  unpackedBytes: number;
  /** The error to throw when the bytes are damaged or more come out than claimed. */
  refuse: (reason: 'damaged-entry' | 'larger-than-declared') => Error;
};

/**
 * Deflated bytes as a source of what they unpack to. Nothing is stored: reading goes on from
 * where the last read ended, reading further back starts over. Memory stays around a megabyte.
 * Closing lets go of the place reading has come to; the source stays the caller's.
 */
export function inflateSource(part: DeflatedPart): OpenByteSource {
  let head = new Uint8Array(0);
  let cursor: Cursor | null = null;
  let queue: Promise<unknown> = Promise.resolve();

  async function readNow(offset: number, length: number): Promise<Uint8Array> {
    const end = Math.min(offset + length, part.unpackedBytes);
    if (end <= offset) return new Uint8Array(0);
    if (end <= head.length) return head.slice(offset, end);
    if (!cursor || offset < cursor.start) {
      await cursor?.blocks.return();
      cursor = { blocks: inflate(part), block: new Uint8Array(0), start: 0 };
    }
    const bytes = new Uint8Array(end - offset);
    let filled = 0;
    while (filled < bytes.length) {
      const at = offset + filled - cursor.start;
      if (at < cursor.block.length) {
        const piece = cursor.block.subarray(at, at + bytes.length - filled);
        bytes.set(piece, filled);
        filled += piece.length;
        continue;
      }
      const start = cursor.start + cursor.block.length;
      const next = await cursor.blocks.next();
      if (next.done) break;
      cursor.block = next.value;
      cursor.start = start;
      if (start === head.length && head.length < keptHeadBytes) {
        head = joined(head, next.value.subarray(0, keptHeadBytes - head.length));
      }
    }
    return bytes.subarray(0, filled);
  }

  return {
    size: part.unpackedBytes,
    read(offset, length) {
      // One after the other: there is a single place in the stream.
      const answer = queue.then(() => readNow(offset, length));
      queue = answer.catch(() => undefined);
      return answer;
    },
    async *stream(offset, signal) {
      let at = 0;
      for await (const block of inflate(part, signal)) {
        const skip = Math.max(0, offset - at);
        at += block.length;
        if (skip < block.length) yield skip > 0 ? block.subarray(skip) : block;
      }
    },
    async close() {
      await queue;
      await cursor?.blocks.return();
      cursor = null;
    },
  };
}

/** Where reading has come to: the block that begins at `start`, and what follows it. */
type Cursor = {
  blocks: AsyncGenerator<Uint8Array, void, void>;
  block: Uint8Array;
  start: number;
};

/**
 * Everything that comes out, block by block, counted. The platform's own decompressor works some
 * ten times faster than one in JavaScript. A block is the reader's to keep.
 */
async function* inflate(
  part: DeflatedPart,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  const { writable, readable } = new DecompressionStream('deflate-raw');
  const writer = writable.getWriter();
  const reader = readable.getReader();
  let fed = 0;
  let unpacked = 0;
  let sourceFailure: unknown;

  async function feed(): Promise<void> {
    let left = part.packedBytes;
    for await (const packed of part.source.stream(part.offset, signal)) {
      const usable = packed.subarray(0, left);
      left -= usable.length;
      for (let at = 0; at < usable.length;) {
        const growth = Math.max(1, unpacked / Math.max(1, fed));
        const wanted = Math.floor(wantedOutputBytes / growth);
        const pieceBytes =
          fed < largestPieceBytes
            ? smallestPieceBytes
            : Math.max(smallestPieceBytes, Math.min(largestPieceBytes, wanted));
        // A copy: the decompressor may look at it after the source has reused its buffer.
        const piece = usable.slice(at, at + pieceBytes);
        at += piece.length;
        fed += piece.length;
        // Waits until it is taken, because not every platform limits what waits in between. Closed
        // from the other end: what is wrong, or enough, is known there.
        if (!(await writer.write(piece).then(yes, no))) return;
      }
      if (left === 0) break;
    }
    await writer.close().catch(no);
  }

  const feeding = feed().catch(async (error: unknown) => {
    sourceFailure = error;
    await writer.abort(error).catch(no);
  });
  try {
    for (;;) {
      signal?.throwIfAborted();
      const { done, value } = await reader.read().catch((error: unknown) => {
        // What the source throws reaches the reader as it is; everything else is the data's fault.
        throw error === sourceFailure ? error : part.refuse('damaged-entry');
      });
      if (done || !value) break;
      unpacked += value.length;
      if (unpacked > part.unpackedBytes) throw part.refuse('larger-than-declared');
      yield value;
    }
    if (unpacked < part.unpackedBytes) throw part.refuse('damaged-entry');
  } finally {
    await reader.cancel().catch(no);
    await feeding;
  }
}

const yes = (): boolean => true;
const no = (): boolean => false;

function joined(a: Uint8Array, b: Uint8Array): Uint8Array<ArrayBuffer> {
  const both = new Uint8Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return both;
}
