import { Inflate } from 'fflate';
import type { ByteSource } from './byte-source.ts';

/**
 * Deflate makes at most 1,032 bytes of one (its longest match costs two bits), so pieces this
 * small keep even a bomb's output in bounds; ordinary audio is given in larger ones.
 */
const smallestPieceBytes = 1024;
const largestPieceBytes = 64 * 1024;
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
 */
export function inflateSource(part: DeflatedPart): ByteSource {
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
  };
}

/** Where reading has come to: the block that begins at `start`, and what follows it. */
type Cursor = {
  blocks: AsyncGenerator<Uint8Array, void, void>;
  block: Uint8Array;
  start: number;
};

/** Everything that comes out, block by block, counted. */
async function* inflate(
  part: DeflatedPart,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array, void, void> {
  let out: Uint8Array[] = [];
  let unpacked = 0;
  const inflater = new Inflate((block) => out.push(block));
  let pieceBytes = smallestPieceBytes;
  let left = part.packedBytes;
  for await (const packed of part.source.stream(part.offset, signal)) {
    const usable = packed.subarray(0, left);
    for (let at = 0; at < usable.length;) {
      signal?.throwIfAborted();
      const piece = usable.slice(at, at + pieceBytes);
      at += piece.length;
      left -= piece.length;
      try {
        inflater.push(piece, left === 0);
      } catch {
        throw part.refuse('damaged-entry');
      }
      const made = out.reduce((sum, block) => sum + block.length, 0);
      unpacked += made;
      if (unpacked > part.unpackedBytes) throw part.refuse('larger-than-declared');
      const growth = Math.max(1, made / piece.length);
      pieceBytes = Math.max(
        smallestPieceBytes,
        Math.min(largestPieceBytes, Math.floor(wantedOutputBytes / growth)),
      );
      const blocks = out;
      out = [];
      for (const block of blocks) if (block.length > 0) yield block;
    }
    if (left === 0) break;
  }
  if (left > 0 || unpacked < part.unpackedBytes) throw part.refuse('damaged-entry');
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array<ArrayBuffer> {
  const both = new Uint8Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return both;
}
