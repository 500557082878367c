import { describe, expect, it } from 'vitest';
import type { ChannelMeasures } from '#shared/measure/measures.ts';
import { floatMono, measureSamples, noise, pcm, sampled } from '../../support/measuring.ts';

/** Expected frames are arithmetic: what was put where. All at 48 kHz unless said. */

async function measureOne(samples: ArrayLike<number>, rate = 48_000): Promise<ChannelMeasures> {
  return (await measureSamples(floatMono(samples, rate))).channels[0]!;
}

/** Running sound without a single zero sample, loud enough to break off abruptly. */
function running(frames: number): Float64Array {
  const random = noise(7);
  return sampled(frames, () => {
    const sample = random();
    return 0.2 * Math.sign(sample || 1) + 0.2 * sample;
  });
}

describe('first and last sound', () => {
  it('are the samples above -60 dBFS, to the frame', async () => {
    const samples = new Float64Array(20_000);
    samples[4321] = 0.00101;
    samples[4000] = 0.00099;
    samples[15_555] = -0.00101;
    samples[15_600] = 0.00099;
    const { firstSoundFrame, lastSoundFrame } = await measureOne(samples);
    expect([firstSoundFrame, lastSoundFrame]).toEqual([4321, 15_555]);
  });

  it('are null where nothing sounds', async () => {
    const whisper = await measureOne(sampled(5000, (frame) => 0.0009 * Math.sin(frame)));
    expect([whisper.firstSoundFrame, whisper.lastSoundFrame]).toEqual([null, null]);
  });
});

describe('digital silence', () => {
  it('is null as a level, never minus infinity', async () => {
    for (const samples of [floatMono(new Float64Array(3000)), pcm(24, [new Float64Array(3000)])]) {
      const measures = await measureSamples(samples);
      expect(measures.truePeakDbtp).toBeNull();
      expect(measures.channels[0]).toMatchObject({
        peakDbfs: null,
        rmsDbfs: null,
        dcOffset: 0,
        soundingDcOffset: 0,
        realBits: null,
        tailPeakDbfs: null,
        floorDbfs: null,
        longestDigitalSilence: { startFrame: 0, endFrame: 3000 },
        startEdge: { peakDbfs: null, ramps: true },
        dropouts: { count: 0, ranges: [] },
      });
    }
  });

  it('is found where it is longest, from one millisecond on', async () => {
    const samples = running(30_000);
    samples.fill(0, 1000, 1047);
    expect((await measureOne(samples)).longestDigitalSilence).toBeNull();
    samples.fill(0, 2000, 2048);
    const shortest = { startFrame: 2000, endFrame: 2048 };
    expect((await measureOne(samples)).longestDigitalSilence).toEqual(shortest);
    samples.fill(0, 7001, 19_003);
    samples.fill(0, 25_000, 30_000);
    const longest = { startFrame: 7001, endFrame: 19_003 };
    expect((await measureOne(samples)).longestDigitalSilence).toEqual(longest);
  });
});

describe('dropouts', { timeout: 30_000 }, () => {
  it.each([8000, 44_100, 48_000, 96_000, 192_000])(
    'last from 1 to 100 ms at %i Hz',
    async (rate) => {
      const millisecond = rate / 1000;
      const lengths = { 0.9: false, 1.1: true, 20: true, 99: true, 101: false };
      for (const [length, isDropout] of Object.entries(lengths)) {
        const samples = running(rate);
        const range = {
          startFrame: 3003,
          endFrame: 3003 + Math.round(Number(length) * millisecond),
        };
        samples.fill(0, range.startFrame, range.endFrame);
        const { dropouts } = await measureOne(samples, rate);
        expect(dropouts, length).toEqual(
          isDropout ? { count: 1, ranges: [range] } : { count: 0, ranges: [] },
        );
      }
    },
  );

  it('are found wherever they lie in a block', async () => {
    const samples = running(60_000);
    const ranges = Array.from({ length: 12 }, (_, i) => {
      const startFrame = 1024 * (4 * i + 1) - 60 + 17 * i;
      return { startFrame, endFrame: startFrame + 50 + 23 * i };
    });
    for (const { startFrame, endFrame } of ranges) samples.fill(0, startFrame, endFrame);
    expect((await measureOne(samples)).dropouts).toEqual({ count: 12, ranges });
  });

  it('break off on both sides', async () => {
    const fadeOut = running(20_000);
    for (let i = 0; i < 96; i++) fadeOut[4999 - i]! *= i / 96;
    fadeOut.fill(0, 5000, 5600);
    expect((await measureOne(fadeOut)).dropouts.count).toBe(0);
    const fadeIn = fadeOut.toReversed();
    expect((await measureOne(fadeIn)).dropouts.count).toBe(0);
    const quiet = running(20_000).map((sample) => sample * 0.013);
    quiet.fill(0, 5000, 5600);
    expect((await measureOne(quiet)).dropouts.count).toBe(0);
  });

  it('are no silence at the start or end of the file', async () => {
    const samples = running(20_000);
    samples.fill(0, 0, 1000);
    samples.fill(0, 19_000, 20_000);
    expect((await measureOne(samples)).dropouts.count).toBe(0);
  });

  it('are counted beyond the places that are kept', async () => {
    const samples = running(150_000);
    for (let i = 0; i < 250; i++) samples.fill(0, 500 + 590 * i, 600 + 590 * i);
    const { dropouts } = await measureOne(samples);
    expect(dropouts.count).toBe(250);
    expect(dropouts.ranges).toHaveLength(200);
    expect(dropouts.ranges.at(-1)).toEqual({
      startFrame: 500 + 590 * 199,
      endFrame: 600 + 590 * 199,
    });
  });
});
