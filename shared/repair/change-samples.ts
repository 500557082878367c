import { decodeSamples, encodeSamples, type SampleForm } from './sample-codec.ts';

/**
 * Gain and high-pass touch every sample of a file. Integers are requantised with triangular
 * dither of two steps peak to peak (S. P. Lipshitz et al., "Quantization and Dither", JAES 40
 * (1992)): the error stays noise instead of distortion. The noise depends on nothing but the
 * place in the file, so a file rendered twice, or from its middle, has the same bytes.
 */
export type SampleChange = {
  gainDb: number;
  /** null without a high-pass. */
  highPass: { cutoffHz: number; startLevels: readonly number[] } | null;
};

/**
 * A second-order Butterworth high-pass by the bilinear transform (coefficients as in the Audio EQ
 * Cookbook, Q = 1/sqrt(2)), transposed direct form II, one state a channel.
 */
class HighPass {
  private readonly b0: number;
  private readonly a1: number;
  private readonly a2: number;
  private s1 = 0;
  private s2 = 0;

  constructor(cutoffHz: number, sampleRateHz: number) {
    const w = (2 * Math.PI * cutoffHz) / sampleRateHz;
    const alpha = Math.sin(w) * Math.SQRT1_2;
    const a0 = 1 + alpha;
    this.b0 = (1 + Math.cos(w)) / 2 / a0;
    this.a1 = (-2 * Math.cos(w)) / a0;
    this.a2 = (1 - alpha) / a0;
  }

  /** As if `level` had stood at the input for ever: an offset present from the start makes no thump. */
  settle(level: number): void {
    this.s1 = -this.b0 * level;
    this.s2 = this.b0 * level;
  }

  next(x: number): number {
    const y = this.b0 * x + this.s1;
    this.s1 = -2 * this.b0 * x - this.a1 * y + this.s2;
    this.s2 = this.b0 * x - this.a2 * y;
    return y;
  }
}

/** Uniform in [0, 1) from a place in the file and a draw: an integer hash, so it can start anywhere. */
function noise(place: number, draw: number): number {
  let h = Math.imul(place ^ (draw * 0x9e3779b9), 0x85ebca6b) ^ Math.floor(place / 2 ** 32);
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return ((h ^ (h >>> 16)) >>> 0) / 2 ** 32;
}

/** How much of the beginning the offset is taken from. */
const settlingMs = 20;

/** Mean of each channel over the first 20 ms: what a high-pass takes for the offset there. */
export async function startLevels(
  blocks: AsyncIterable<Uint8Array>,
  form: SampleForm,
  channels: number,
  sampleRateHz: number,
): Promise<number[]> {
  const wanted = Math.round((settlingMs / 1000) * sampleRateHz) * channels;
  const sums = new Array<number>(channels).fill(0);
  let seen = 0;
  for await (const block of blocks) {
    const values = new Float64Array((block.length * 8) / form.containerBits);
    decodeSamples(block, form, values);
    for (let i = 0; i < values.length && seen < wanted; i++, seen++) {
      const x = values[i]!;
      if (Number.isFinite(x)) sums[seen % channels]! += x;
    }
    if (seen >= wanted) break;
  }
  return sums.map((sum) => (seen === 0 ? 0 : (sum * channels) / seen));
}

/**
 * Makes the function that changes blocks of whole frames in place, which must come in order from
 * `fromFrame` on (with a high-pass: from frame 0).
 */
export function sampleChanger(
  change: SampleChange,
  form: SampleForm,
  channels: number,
  sampleRateHz: number,
  fromFrame: number,
): (bytes: Uint8Array) => void {
  const gain = 10 ** (change.gainDb / 20);
  const filters = change.highPass?.startLevels.map((level) => {
    const filter = new HighPass(change.highPass?.cutoffHz ?? 0, sampleRateHz);
    filter.settle(level);
    return filter;
  });
  const step = form.encoding === 'pcm' ? 2 ** -(form.bits - 1) : 0;
  let values = new Float64Array(0);
  let place = fromFrame * channels;
  return (bytes) => {
    const count = (bytes.length * 8) / form.containerBits;
    if (values.length < count) values = new Float64Array(count);
    decodeSamples(bytes, form, values);
    for (let i = 0, channel = 0; i < count; i++, place++) {
      const x = values[i]!;
      let y = x;
      // What is no number would stay in the filter for good; the finding about it remains.
      if (filters) y = Number.isFinite(x) ? filters[channel]!.next(x) : x;
      y *= gain;
      // Digital silence needs no requantising and stays digital silence.
      if (step > 0 && (x !== 0 || filters)) y += (noise(place, 1) - noise(place, 2)) * step;
      values[i] = y;
      if (++channel === channels) channel = 0;
    }
    encodeSamples(values, count, form, bytes);
  };
}
