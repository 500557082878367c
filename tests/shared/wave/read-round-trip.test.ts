import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  bextChunk,
  cueChunks,
  sampleBytes,
  writeTestAiff,
  writeTestWave,
  type TestSamples,
} from '../../support/audio-writer.ts';
import { readTrack } from '../../support/reading.ts';

/** Any depth, rate, channel count and content that a WAV file can have. */
function anySamples(depths: readonly number[]): fc.Arbitrary<TestSamples> {
  return fc
    .record({
      encoding: fc.constantFrom('pcm' as const, 'float' as const),
      depth: fc.constantFrom(...depths),
      sampleRateHz: fc.integer({ min: 1, max: 768_000 }),
      channelCount: fc.integer({ min: 1, max: 9 }),
      frames: fc.integer({ min: 1, max: 40 }),
      seed: fc.integer(),
    })
    .map(({ encoding, depth, sampleRateHz, channelCount, frames, seed }) => {
      const bits = encoding === 'float' ? (depth > 16 ? 64 : 32) : depth;
      let state = seed;
      const next = () => {
        state = (Math.imul(state, 1664525) + 1013904223) | 0;
        return encoding === 'float' ? state / 2 ** 31 : state >> (32 - bits);
      };
      const channels = Array.from({ length: channelCount }, () =>
        Array.from({ length: frames }, next),
      );
      return { encoding, bits, sampleRateHz, channels };
    });
}

const chunkIds = ['JUNK', 'LIST', 'PAD ', 'acid', 'zzzz', 'INST'];
const anyChunks = fc.array(
  fc.record({
    id: fc.constantFrom(...chunkIds),
    bytes: fc.uint8Array({ minLength: 0, maxLength: 40 }),
  }),
  { maxLength: 5 },
);

describe('what the writer wrote is what the reader reads', () => {
  it('WAV', async () => {
    const depths = [8, 12, 16, 20, 24, 32];
    await fc.assert(
      fc.asyncProperty(
        anySamples(depths),
        fc.constantFrom('RIFF' as const, 'RF64' as const, 'BW64' as const),
        fc.option(fc.integer({ min: 0, max: 0x3ffff }), { nil: undefined }),
        anyChunks,
        anyChunks,
        fc.option(fc.bigInt({ min: 0n, max: BigInt(Number.MAX_SAFE_INTEGER) }), { nil: undefined }),
        async (samples, form, mask, before, after, timeReference) => {
          const marks = [{ startFrame: 0, label: 'Intro' }];
          const bext = timeReference === undefined ? [] : [bextChunk({ timeReference })];
          const bytes = writeTestWave({
            ...samples,
            form,
            ...(mask === undefined ? {} : { channelMask: mask }),
            before: [...before, ...bext],
            after: [...after, ...cueChunks(marks)],
          });
          const { format, layout, markers } = await readTrack(bytes);
          expect(format).toEqual({
            container: form === 'RIFF' ? 'wav' : form.toLowerCase(),
            encoding: samples.encoding,
            sampleRateHz: samples.sampleRateHz,
            bits: samples.bits,
            containerBits: Math.ceil(samples.bits / 8) * 8,
            channels: samples.channels.length,
            frames: samples.channels[0]!.length,
            timeReferenceFrames: timeReference === undefined ? null : Number(timeReference),
          });
          expect(layout.channelMask).toBe(mask ?? null);
          expect(markers).toEqual(marks);
          const data = bytes.subarray(layout.dataOffset, layout.dataOffset + layout.dataBytes);
          expect(data.equals(sampleBytes(samples, 'le', true))).toBe(true);
        },
      ),
      { seed: 20261201, numRuns: 300 },
    );
  });

  it('AIFF', async () => {
    await fc.assert(
      fc.asyncProperty(
        anySamples([8, 12, 16, 20, 24, 32]),
        fc.integer({ min: 0, max: 64 }),
        anyChunks,
        anyChunks,
        async (samples, lead, before, after) => {
          const compression =
            samples.encoding === 'pcm' ? undefined : samples.bits === 32 ? 'fl32' : 'FL64';
          const bytes = writeTestAiff({
            ...samples,
            ...(compression === undefined ? {} : { compression }),
            lead,
            before,
            after,
          });
          const { format, layout } = await readTrack(bytes, 'a.aif');
          expect(format).toMatchObject({
            container: compression === undefined ? 'aiff' : 'aifc',
            encoding: samples.encoding,
            sampleRateHz: samples.sampleRateHz,
            bits: samples.bits,
            channels: samples.channels.length,
            frames: samples.channels[0]!.length,
          });
          const data = bytes.subarray(layout.dataOffset, layout.dataOffset + layout.dataBytes);
          expect(data.equals(sampleBytes(samples, 'be', false))).toBe(true);
        },
      ),
      { seed: 20261201, numRuns: 200 },
    );
  });
});
