import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { rewriteHeader } from '#shared/wave/rewrite-header.ts';
import { trackFormatSchema } from '#shared/wave/track-format.ts';
import {
  bextChunk,
  cueChunks,
  infoChunk,
  ixmlChunk,
  sine,
  writeTestAiff,
  writeTestWave,
} from '../../support/audio-writer.ts';
import { countingSource } from '../../support/counting-source.ts';

/** The same files in every run (a multiply-with-carry of two words; any generator would do). */
function seededRandom(seed: number): (below: number) => number {
  let z = seed;
  let w = ~seed;
  return (below) => {
    z = (Math.imul(36969, z & 0xffff) + (z >>> 16)) | 0;
    w = (Math.imul(18000, w & 0xffff) + (w >>> 16)) | 0;
    return (((z << 16) + (w & 0xffff)) >>> 0) % below;
  };
}

const pcm16 = { sampleRateHz: 48000, encoding: 'pcm', bits: 16, channels: [sine(60, 16)] } as const;
const pcm24 = { ...pcm16, bits: 24, channels: [sine(31, 24), sine(31, 24, 5)] } as const;
const float = { ...pcm16, encoding: 'float', bits: 32, channels: [sine(20, 'float')] } as const;
const metadata = [
  bextChunk({ timeReference: 172_800_000n, version: 2, codingHistory: 'A=PCM,F=48000,W=24\r\n' }),
  ixmlChunk(
    '<SPEED><TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO>9</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO></SPEED>',
  ),
  infoChunk({ INAM: 'Kick In', IART: 'Juno Park' }),
  ...cueChunks([{ startFrame: 3, label: 'Verse' }]),
];
const seeds: readonly Buffer[] = [
  writeTestWave(pcm16),
  writeTestWave({ ...pcm24, channelMask: 3, before: metadata, after: metadata }),
  writeTestWave({ ...float, channelMask: 4, after: [{ id: 'PEAK', bytes: new Uint8Array(16) }] }),
  writeTestWave({ ...pcm24, form: 'RF64', after: metadata }),
  writeTestWave({ ...pcm16, form: 'BW64', before: metadata.slice(1) }),
  writeTestWave({
    ...pcm24,
    forgetPadBytes: true,
    before: [{ id: 'LIST', bytes: new Uint8Array(5) }],
  }),
  writeTestAiff({
    ...pcm24,
    after: [{ id: 'MARK', bytes: Buffer.from('000100010000000501410000', 'hex') }],
  }),
  writeTestAiff({ ...pcm16, compression: 'sowt', lead: 4 }),
  writeTestAiff({ ...float, compression: 'fl32' }),
];
/** What fields hold when something goes wrong. */
const extremes = [
  0, 1, 7, 0x7f, 0xff, 0x7fff, 0xffff, 0x7ffff000, 0x7fffffff, 0x80000000, 0xfffffffe, 0xffffffff,
];

function mutate(random: (below: number) => number): Buffer {
  let bytes = Buffer.from(seeds[random(seeds.length)]!);
  for (let i = 1 + random(4); i > 0; i--) {
    const at = random(bytes.length);
    switch (random(7)) {
      case 0:
        bytes[at] = random(256);
        break;
      case 1:
        bytes[at]! ^= 1 << random(8);
        break;
      case 2:
        if (at + 4 <= bytes.length) bytes.writeUInt32LE(extremes[random(extremes.length)]!, at);
        break;
      case 3:
        // Where sizes and formats stand, a word at a time.
        if (bytes.length > 80) bytes.writeUInt16LE(extremes[random(7)]!, 2 * random(38));
        break;
      case 4:
        bytes = bytes.subarray(0, at);
        break;
      case 5:
        bytes = Buffer.concat([
          bytes.subarray(0, at),
          Buffer.alloc(random(9), random(256)),
          bytes.subarray(at),
        ]);
        break;
      case 6: {
        const other = seeds[random(seeds.length)]!;
        bytes = Buffer.concat([bytes.subarray(0, at), other.subarray(random(other.length))]);
        break;
      }
    }
    if (bytes.length === 0) break;
  }
  return bytes;
}

const fileCount = 24_000;

describe('damaged headers', () => {
  it(`${fileCount} of them: an answer for each, small reads, places inside the file`, async () => {
    const random = seededRandom(20261201);
    const answers: Record<string, number> = {};
    for (let i = 0; i < fileCount; i++) {
      const bytes = mutate(random);
      const source = countingSource(bytesSource(bytes));
      // A third without a name, a third that does not claim to be audio.
      const reading = await readWave(source, ['kick.wav', '', 'kick.bin'][i % 3]);
      const answer = reading.kind === 'unreadable' ? reading.reason : reading.kind;
      answers[answer] = (answers[answer] ?? 0) + 1;
      expect(source.counts.largest).toBeLessThanOrEqual(65536);
      expect(source.counts.reads).toBeLessThan(200);
      if (reading.kind === 'unreadable') {
        expect(reading.byteOffset).toBeGreaterThanOrEqual(0);
        expect(reading.byteOffset).toBeLessThanOrEqual(bytes.length + 64);
      }
      if (reading.kind !== 'track') continue;
      const { format, layout, markers } = reading;
      trackFormatSchema.parse(format);
      expect(format.frames).toBeGreaterThan(0);
      expect(layout.dataBytes).toBe(format.frames * layout.bytesPerFrame);
      expect(layout.dataOffset + layout.dataBytes).toBeLessThanOrEqual(bytes.length);
      const isInside = layout.chunks.every(
        ({ contentOffset, contentBytes }) =>
          contentBytes >= 0 && contentOffset + contentBytes <= bytes.length,
      );
      expect(isInside && markers.every(({ startFrame }) => startFrame <= format.frames)).toBe(true);
      const moveByFrames = random(3) * 50 - 50;
      const frames = Math.max(1, format.frames + moveByFrames);
      const dataBytes = frames * layout.bytesPerFrame;
      await rewriteHeader({
        source,
        reading,
        format: { ...format, frames },
        dataBytes,
        moveByFrames,
      });
    }
    // The files are damaged in many ways and not beyond recognition.
    expect(answers['track']).toBeGreaterThan(fileCount / 10);
    for (const reason of [
      'header-cut-short',
      'no-format-chunk',
      'no-data-chunk',
      'no-audio-in-data',
    ]) {
      expect(answers[reason], reason).toBeGreaterThan(20);
    }
    expect(answers['impossible-format']).toBeGreaterThan(20);
    expect(answers['unsupported-encoding']).toBeGreaterThan(20);
  }, 60_000);
});
