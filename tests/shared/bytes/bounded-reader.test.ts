import { describe, expect, it } from 'vitest';
import { boundedReader, maxHeaderReadBytes } from '#shared/bytes/bounded-reader.ts';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { countingSource } from '../../support/counting-source.ts';

const bytes = Uint8Array.from({ length: 300_000 }, (_, i) => (i * 7) % 251);

describe('the bounded reader', () => {
  it('asks once for neighbouring fields', async () => {
    const source = countingSource(bytesSource(bytes));
    const reader = boundedReader(source, 4096);
    for (let at = 100; at < 4000; at += 8) {
      expect(await reader.read(at, 8)).toEqual(bytes.subarray(at, at + 8));
    }
    expect(source.counts).toEqual({ reads: 1, bytes: 4096, largest: 4096 });
  });

  it('gives fewer bytes at the end and none beyond it', async () => {
    const reader = boundedReader(bytesSource(bytes));
    expect(await reader.read(299_995, 10)).toEqual(bytes.subarray(299_995));
    expect(await reader.read(300_000, 10)).toHaveLength(0);
    expect(await reader.readUpTo(299_990, 100, 5)).toEqual(bytes.subarray(299_990, 299_995));
  });

  it('fetches long contents in allowed reads, cut at the limit', async () => {
    const source = countingSource(bytesSource(bytes));
    const reader = boundedReader(source);
    expect(await reader.readUpTo(10, 250_000, 200_000)).toEqual(bytes.subarray(10, 200_010));
    expect(source.counts.largest).toBe(maxHeaderReadBytes);
    await expect(reader.read(0, maxHeaderReadBytes + 1)).rejects.toThrow(RangeError);
  });

  it('keeps what it gave when the source uses its buffer again', async () => {
    const buffer = new Uint8Array(4);
    const reusing = {
      ...bytesSource(bytes),
      read: (offset: number, length: number) => {
        buffer.set(bytes.subarray(offset, offset + length));
        return Promise.resolve(buffer.subarray(0, length));
      },
    };
    const reader = boundedReader(reusing, 4);
    const first = await reader.read(0, 4);
    await reader.read(1000, 4);
    expect(first).toEqual(bytes.subarray(0, 4));
  });
});
