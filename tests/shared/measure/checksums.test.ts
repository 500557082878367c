import { spawnSync } from 'node:child_process';
import { xxhash128 } from 'hash-wasm';
import { describe, expect, it } from 'vitest';
import { sampleBytes, writeTestAiff, writeTestWave } from '../../support/audio-writer.ts';
import { measureBytes, measureInPieces, noise, newMeters } from '../../support/measuring.ts';
import { readTrack } from '../../support/reading.ts';

/** CRC-32 of each line's bytes, in hexadecimal, as Python's zlib has it. */
function pythonCrc32(files: readonly Uint8Array[]): string[] {
  const program =
    'import sys,zlib\nfor line in sys.stdin: print("%08x" % zlib.crc32(bytes.fromhex(line.strip())))';
  const input = files.map((file) => Buffer.from(file).toString('hex')).join('\n');
  return spawnSync('python3', ['-c', program], { input, encoding: 'utf8', maxBuffer: 1 << 28 })
    .stdout.trim()
    .split('\n');
}

function wholeNumbers(frames: number, bits: number, seed = 1): number[] {
  const random = noise(seed);
  return Array.from({ length: frames }, () => Math.round(random() * (2 ** (bits - 1) - 1)));
}

const rate = { sampleRateHz: 48_000, encoding: 'pcm' } as const;

describe('the CRC-32 of a file', () => {
  it("is that of Python's zlib at every length", async () => {
    const lengths = [
      ...Array.from({ length: 80 }, (_, i) => i + 1),
      2380,
      2400,
      2401,
      9001,
      99_999,
    ];
    const files = lengths.map((frames) =>
      writeTestWave({ ...rate, bits: 16, channels: [wholeNumbers(frames, 16, frames)] }),
    );
    const ours: string[] = [];
    for (const file of files) ours.push((await measureBytes(file)).crc32);
    expect(ours).toEqual(pythonCrc32(files));
  }, 30_000);

  it('takes in what lies behind the sample data, however it arrives', async () => {
    const file = writeTestWave({
      ...rate,
      bits: 24,
      channels: [wholeNumbers(5000, 24)],
      before: [{ id: 'odd ', bytes: new Uint8Array(13).fill(1) }],
      after: [{ id: 'LIST', bytes: new Uint8Array(70_001).fill(2) }],
      trailing: new Uint8Array(9).fill(3),
    });
    const reading = await readTrack(file);
    const pieces = Array.from({ length: 9000 }, (_, i) => i % 23);
    const { measures } = measureInPieces(await newMeters(), file, reading, pieces);
    expect([measures.crc32]).toEqual(pythonCrc32([file]));
  });
});

describe('the hash of the audio', () => {
  it('is the XXH3-128 of the data at every length', async () => {
    // Every way of the algorithm has its own lengths: up to 240 bytes, and around its blocks.
    const frames = [
      ...Array.from({ length: 260 }, (_, i) => i + 1),
      ...[1023, 1024, 1025, 1055, 1056, 1057, 1087, 1088, 2048, 2049, 3071, 4096, 5000, 31_337],
    ];
    for (const bits of [8, 16, 24, 32]) {
      const unequal: number[] = [];
      for (const length of frames) {
        const samples = { ...rate, bits, channels: [wholeNumbers(length, bits, length)] };
        const { audioHash } = await measureBytes(writeTestWave(samples));
        // hash-wasm as the other implementation.
        if (audioHash !== (await xxhash128(sampleBytes(samples, 'le', true)))) unequal.push(length);
      }
      expect(unequal, `${bits} bits`).toEqual([]);
    }
  }, 30_000);

  it('is one of each channel, and of several channels the hash of their hashes', async () => {
    for (const count of [2, 3, 6]) {
      const channels = Array.from({ length: count }, (_, c) => wholeNumbers(3000, 24, c + 5));
      const measures = await measureBytes(writeTestWave({ ...rate, bits: 24, channels }));
      const expected = await Promise.all(
        channels.map((channel) =>
          xxhash128(sampleBytes({ ...rate, bits: 24, channels: [channel] }, 'le', true)),
        ),
      );
      expect(measures.channelHashes).toEqual(expected);
      expect(measures.audioHash).toBe(await xxhash128(Buffer.from(expected.join(''), 'hex')));
    }
  });

  it.each([8, 16, 24, 32])('is the same in any container, %i bits', async (bits) => {
    const samples = {
      ...rate,
      bits,
      channels: [wholeNumbers(700, bits), wholeNumbers(700, bits, 2)],
    };
    const extra = [{ id: 'bext', bytes: new Uint8Array(602) }];
    const files = [
      writeTestWave(samples),
      writeTestWave({ ...samples, form: 'RF64', before: extra }),
      writeTestWave({ ...samples, channelMask: 3, after: extra }),
      writeTestAiff(samples),
    ];
    const hashes = new Set<string>();
    for (const file of files) hashes.add((await measureBytes(file)).audioHash);
    expect(hashes.size).toBe(1);
  });
});
