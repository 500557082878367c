import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { bytesSource, type ByteSource } from '#shared/bytes/byte-source.ts';
import { inflateSource } from '#shared/bytes/inflate-source.ts';
import { AppError } from '#shared/errors.ts';

/** Hardly compressible, so that many pieces go in and many blocks come out. */
const bytes = Buffer.from(
  Uint32Array.from({ length: 1 << 20 }, (_, i) => Math.imul(i + 1, 2654435761) ^ (i << 7)).buffer,
);
const packed = deflateRawSync(bytes, { level: 1 });

function partOf(source: ByteSource, packedBytes = packed.length, unpackedBytes = bytes.length) {
  const refuse = (reason: string) => new AppError('zip-refused', { reason, entry: 'a.wav' });
  return inflateSource({ source, offset: 0, packedBytes, unpackedBytes, refuse });
}

/** Streams from an array and tells whether somebody let it go. */
function watched(fail?: { after: number; error: unknown }) {
  const state = { open: 0, blocks: 0 };
  const source: ByteSource = {
    ...bytesSource(packed),
    // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
    async *stream(offset) {
      state.open += 1;
      try {
        for (let at = offset; at < packed.length; at += 10_000) {
          if (fail && at > fail.after) throw fail.error;
          state.blocks += 1;
          yield packed.subarray(at, at + 10_000);
        }
      } finally {
        state.open -= 1;
      }
    },
  };
  return { source, state };
}

async function readAll(source: ByteSource, signal?: AbortSignal): Promise<Buffer> {
  const blocks: Uint8Array[] = [];
  for await (const block of source.stream(0, signal)) blocks.push(block);
  return Buffer.concat(blocks);
}

describe('deflated bytes as a source', () => {
  it('are what zlib packed, from any place, in any order', async () => {
    const source = partOf(bytesSource(packed));
    expect((await readAll(source)).equals(bytes)).toBe(true);
    for (const offset of [4_000_000, 10, 2_000_000, 2_000_100, 1_999_000, 60_000, 4_194_300]) {
      const read = await source.read(offset, 5000);
      expect(bytes.subarray(offset, offset + 5000).equals(read)).toBe(true);
    }
    const together = await Promise.all([source.read(3_000_000, 9), source.read(5, 9)]);
    expect(together.map((read) => Buffer.from(read).toString('hex'))).toEqual([
      bytes.subarray(3_000_000, 3_000_009).toString('hex'),
      bytes.subarray(5, 14).toString('hex'),
    ]);
    const rest: Uint8Array[] = [];
    for await (const block of source.stream(4_190_001)) rest.push(block);
    expect(Buffer.concat(rest).equals(bytes.subarray(4_190_001))).toBe(true);
  });

  it('damaged in the middle are refused after what could be read', async () => {
    const damaged = Buffer.from(packed);
    damaged.fill(0xff, 1_000_000, 1_200_000);
    const refusal = { code: 'zip-refused', details: { reason: 'damaged-entry' } };
    const source = partOf(bytesSource(damaged));
    await expect(readAll(source)).rejects.toMatchObject(refusal);
    await expect(source.read(4_000_000, 10)).rejects.toMatchObject(refusal);
    // The beginning is still there.
    expect(bytes.subarray(0, 100).equals(await source.read(0, 100))).toBe(true);
  });

  it("the source's own failure reaches the reader as it is", async () => {
    const error = new AppError('no-access', { path: 'session.zip' });
    const { source, state } = watched({ after: 1_000_000, error });
    await expect(readAll(partOf(source))).rejects.toBe(error);
    expect(state.open).toBe(0);
  });

  it('stop when they are told to, and when nobody reads on', async () => {
    const stop = new AbortController();
    const { source, state } = watched();
    const reading = async () => {
      for await (const block of partOf(source).stream(0, stop.signal)) {
        if (block.length > 0) stop.abort(new Error('stopped'));
      }
    };
    await expect(reading()).rejects.toThrow('stopped');
    expect(state.open).toBe(0);
    for await (const block of partOf(source).stream(0)) {
      if (block.length > 0) break;
    }
    expect(state.open).toBe(0);
    // Neither ran on to the end of the 420 blocks: nothing piles up behind a slow reader.
    expect(state.blocks).toBeLessThan(100);
  });

  it('let go of their place when they are closed', async () => {
    const { source, state } = watched();
    const part = partOf(source);
    await part.read(200_000, 10);
    expect(state.open).toBe(1);
    await part.close();
    expect(state.open).toBe(0);
    expect(bytes.subarray(70_000, 70_010).equals(await part.read(70_000, 10))).toBe(true);
    await part.close();
  });
});
