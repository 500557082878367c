import { describe, expect, it } from 'vitest';
import {
  measureBytes,
  floatMono,
  measureSamples,
  noise,
  pcm,
  sampled,
} from '../../support/measuring.ts';
import { writeTestWave } from '../../support/audio-writer.ts';

/** Levels, means, bits, impossible samples, pairs: expected values are arithmetic. */

describe('levels', () => {
  // A sine's RMS is its peak divided by the square root of two, a square's is its peak.
  it('of a full-scale sine are 0 and -3.01 dBFS, of a square 0 and 0', async () => {
    const sine = sampled(48_000, (frame) => Math.sin((2 * Math.PI * 1000 * frame) / 48_000));
    const { channels } = await measureSamples(floatMono(sine));
    expect(channels[0]!.peakDbfs).toBeCloseTo(0, 6);
    expect(channels[0]!.rmsDbfs).toBeCloseTo(-3.0103, 4);
    const square = sampled(48_000, (frame) => (frame % 100 < 50 ? 1 : -1));
    const measured = (await measureSamples(floatMono(square))).channels[0]!;
    expect([measured.peakDbfs, measured.rmsDbfs]).toEqual([0, 0]);
  });

  it('take the lower side for a peak too, and the mean with its sign', async () => {
    const samples = sampled(1000, (frame) => (frame === 7 ? -0.75 : 0.25));
    const { peakDbfs, dcOffset } = (await measureSamples(floatMono(samples))).channels[0]!;
    expect(peakDbfs).toBeCloseTo(20 * Math.log10(0.75), 9);
    expect(dcOffset).toBeCloseTo(0.249, 12);
  });

  it('know the mean of what sounds from the mean of the file', async () => {
    // A second of silence for each second around 0.05.
    const samples = sampled(192_000, (frame) =>
      Math.floor(frame / 48_000) % 2 ? 0 : 0.05 + 0.1 * Math.sin(frame / 10),
    );
    const { dcOffset, soundingDcOffset } = (await measureSamples(floatMono(samples))).channels[0]!;
    expect(dcOffset).toBeCloseTo(0.025, 3);
    expect(soundingDcOffset).toBeCloseTo(0.05, 3);
  });
});

describe('bits in use', () => {
  const random = noise(11);
  const loud = sampled(5000, () => 0.9 * random());
  const onGrid = (bits: number) =>
    loud.map((x) => Math.round(x * 2 ** (bits - 1)) / 2 ** (bits - 1));

  it.each([
    { bits: 16, used: 16 },
    { bits: 24, used: 16 },
    { bits: 24, used: 20 },
    { bits: 24, used: 24 },
    { bits: 32, used: 24 },
    { bits: 32, used: 32 },
    { bits: 24, used: 12 },
  ])('are $used of $bits', async ({ bits, used }) => {
    expect((await measureSamples(pcm(bits, [onGrid(used)]))).channels[0]!.realBits).toBe(used);
  });

  it('count from the top, however quiet the sound', async () => {
    const quiet = onGrid(8).map((sample) => sample / 2 ** 12);
    expect((await measureSamples(pcm(24, [quiet]))).channels[0]!.realBits).toBe(20);
  });

  it('show the whole numbers a float file was made of, or none', async () => {
    for (const used of [8, 16, 24]) {
      const { channels } = await measureSamples(floatMono(onGrid(used)));
      expect(channels[0]!.realBits).toBe(used);
    }
    const free = loud.map((sample) => sample * 0.7071);
    expect((await measureSamples(floatMono(free))).channels[0]!.realBits).toBeNull();
    const wide = writeTestWave({ ...floatMono(onGrid(32)), bits: 64 });
    expect((await measureBytes(wide)).channels[0]!.realBits).toBe(32);
  });
});

describe('impossible samples', () => {
  it('are listed, and count as 0 everywhere else', async () => {
    const samples = sampled(9000, (frame) => 0.5 * Math.sin(frame / 9));
    const clean = samples.slice();
    for (const frame of [100, 101, 102, 1023, 1024, 8999]) clean[frame] = 0;
    samples.set([NaN, Infinity, -Infinity], 100);
    samples.set([NaN, NaN], 1023);
    samples[8999] = -Infinity;
    const [dirty, held] = [
      (await measureSamples(floatMono(samples))).channels[0]!,
      (await measureSamples(floatMono(clean))).channels[0]!,
    ];
    expect(dirty.notANumber).toEqual({
      count: 3,
      ranges: [
        { startFrame: 100, endFrame: 103 },
        { startFrame: 1023, endFrame: 1025 },
        { startFrame: 8999, endFrame: 9000 },
      ],
    });
    expect({ ...dirty, notANumber: held.notANumber }).toEqual(held);
  });

  it('above full scale are listed with the peak they reach', async () => {
    const samples = sampled(9000, (frame) =>
      frame % 3000 >= 1020 && frame % 3000 < 1030 ? -1.5 : 0.9,
    );
    samples[5] = 1;
    const { overFullScale, peakDbfs } = (await measureSamples(floatMono(samples))).channels[0]!;
    expect(overFullScale.count).toBe(3);
    expect(overFullScale.ranges[1]).toEqual({ startFrame: 4020, endFrame: 4030 });
    expect(peakDbfs).toBeCloseTo(3.5218, 4);
  });
});

describe('a pair of channels', { timeout: 30_000 }, () => {
  const random = noise(5);
  const left = sampled(48_000, () => 0.5 * random());
  const other = sampled(48_000, () => 0.5 * random());

  it('is identical only to the bit', async () => {
    const near = left.slice();
    near[40_000]! += 2 ** -23;
    const same = (await measureSamples(pcm(24, [left, left]))).pairs[0]!;
    const nearly = (await measureSamples(pcm(24, [left, near]))).pairs[0]!;
    expect([same.identical, nearly.identical]).toEqual([true, false]);
    expect(same).toMatchObject({ gainDb: 0, correlation: 1, sideUnderMidDb: 140 });
    expect(nearly.sideUnderMidDb).toBeGreaterThan(100);
  });

  it('has its gain, and its side that far under the middle', async () => {
    // Noise 66 dB below the other: the difference of both is 6 dB less under their sum.
    const mixed = left.map((sample, frame) => 0.5 * (sample + other[frame]! * 10 ** (-66 / 20)));
    const pair = (await measureSamples(floatMono(left))).pairs;
    expect(pair).toEqual([]);
    const stereo = { ...floatMono(left), channels: [left, mixed] };
    const { gainDb, sideUnderMidDb, midUnderSideDb } = (await measureSamples(stereo)).pairs[0]!;
    expect(gainDb).toBeCloseTo(-6.0206, 2);
    expect(sideUnderMidDb).toBeCloseTo(72, 0);
    expect(midUnderSideDb).toBe(-sideUnderMidDb!);
  });

  it('shows polarity turned over as a middle under the side', async () => {
    const upsideDown = left.map((sample) => -sample);
    const { midUnderSideDb, correlation } = (await measureSamples(pcm(16, [left, upsideDown])))
      .pairs[0]!;
    expect(correlation).toBeCloseTo(-1, 6);
    expect(midUnderSideDb).toBeGreaterThan(90);
  });

  it('says nothing where one side is silent, and little where they differ', async () => {
    const silent = (await measureSamples(pcm(16, [left, new Float64Array(48_000)]))).pairs[0]!;
    expect(silent).toMatchObject({ gainDb: null, correlation: null, sideUnderMidDb: null });
    const apart = (await measureSamples(pcm(16, [left, other]))).pairs[0]!;
    expect(Math.abs(apart.correlation!)).toBeLessThan(0.02);
    expect(Math.abs(apart.sideUnderMidDb!)).toBeLessThan(0.3);
  });

  it('is made of neighbours', async () => {
    const { pairs } = await measureSamples(pcm(16, [left, other, left, left, other]));
    expect(pairs.map(({ channels }) => channels)).toEqual([
      [0, 1],
      [2, 3],
    ]);
    expect(pairs.map(({ identical }) => identical)).toEqual([false, true]);
  });
});
