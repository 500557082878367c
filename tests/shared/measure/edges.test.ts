import { describe, expect, it } from 'vitest';
import type { ChannelMeasures } from '#shared/measure/measures.ts';
import { floatMono, measureSamples, noise, sampled } from '../../support/measuring.ts';

async function measureOne(samples: ArrayLike<number>, rate = 48_000): Promise<ChannelMeasures> {
  return (await measureSamples(floatMono(samples, rate))).channels[0]!;
}

const decibels = (amplitude: number) => 20 * Math.log10(amplitude);

/** Several kinds of running sound. */
function sounds(frames: number): Record<string, Float64Array> {
  const random = noise(3);
  return {
    'a low note': sampled(frames, (i) => 0.5 * Math.sin((2 * Math.PI * 55 * i) / 48_000 + 1)),
    'a middle note': sampled(frames, (i) => 0.5 * Math.sin((2 * Math.PI * 440 * i) / 48_000 + 1)),
    'a high note': sampled(frames, (i) => 0.5 * Math.sin((2 * Math.PI * 5000 * i) / 48_000 + 1)),
    noise: sampled(frames, () => 0.5 * random()),
  };
}

/** Gain over a fade of `length` frames, from 0 at its first frame. */
const fades: Record<string, (share: number) => number> = {
  linear: (share) => share,
  'equal power': (share) => Math.sin((share * Math.PI) / 2),
  cosine: (share) => (1 - Math.cos(share * Math.PI)) / 2,
};

describe('the edges of a file', { timeout: 30_000 }, () => {
  it.each(Object.entries(sounds(9600)))('do not ramp where %s is cut', async (_, samples) => {
    // Cut one frame later each time, but for places within a twentieth of its peak around zero.
    for (let cut = 0; cut < 200; cut += 7) {
      const part = samples.slice(cut, 9600 - cut);
      const { startEdge, endEdge } = await measureOne(part);
      if (Math.abs(part[0]!) > 0.15) expect(startEdge.ramps, `start ${cut}`).toBe(false);
      if (Math.abs(part.at(-1)!) > 0.15) expect(endEdge.ramps, `end ${cut}`).toBe(false);
    }
  });

  it.each(Object.entries(fades))('ramp under a fade of 2 to 20 ms, %s', async (_, gainAt) => {
    for (const [name, sound] of Object.entries(sounds(9600))) {
      for (const milliseconds of [2, 5, 10, 20]) {
        const length = 48 * milliseconds;
        const faded = sound.map((sample, i) => {
          const share = Math.min(1, i / length, (sound.length - 1 - i) / length);
          return sample * gainAt(share);
        });
        const { startEdge, endEdge } = await measureOne(faded);
        expect([startEdge.ramps, endEdge.ramps], `${name}, ${milliseconds} ms`).toEqual([
          true,
          true,
        ]);
      }
    }
  });

  it('have the peak of their millisecond', async () => {
    const samples = sampled(9600, () => 0.01);
    samples[47] = 0.5;
    samples[48] = 0.9;
    samples[9600 - 48] = -0.25;
    samples[9600 - 49] = 0.8;
    const { startEdge, endEdge } = await measureOne(samples);
    expect(startEdge.peakDbfs).toBeCloseTo(decibels(0.5), 6);
    expect(endEdge.peakDbfs).toBeCloseTo(decibels(0.25), 6);
  });
});

describe('tail and floor', () => {
  it('are the peak of the last 50 ms and what a tenth of the file stays below', async () => {
    const random = noise(9);
    // A tenth of hiss at -70 dBFS, then loud, and a tail at -40 dBFS in the last 50 ms only.
    const samples = sampled(96_000, (frame) => {
      const sign = random() < 0 ? -1 : 1;
      return sign * (frame < 12_000 ? 10 ** (-70 / 20) : frame < 93_600 ? 0.5 : 0.01);
    });
    const { tailPeakDbfs, floorDbfs } = await measureOne(samples);
    expect(tailPeakDbfs).toBeCloseTo(-40, 5);
    // Levels are sorted into bins of at most 0.27 dB.
    expect(floorDbfs).toBeLessThanOrEqual(-70);
    expect(floorDbfs).toBeGreaterThan(-70.27);
    samples[93_599] = 0.7;
    expect((await measureOne(samples)).tailPeakDbfs).toBeCloseTo(-40, 5);
    samples[93_600] = 0.7;
    expect((await measureOne(samples)).tailPeakDbfs).toBeCloseTo(decibels(0.7), 5);
  });

  it('have no floor where a tenth of the file is digital silence', async () => {
    const samples = sampled(96_000, (frame) => (frame < 12_000 ? 0 : 0.5));
    expect((await measureOne(samples)).floorDbfs).toBeNull();
  });
});
