import type { ByteSource } from '../bytes/byte-source.ts';
import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';
import { decodeChannel } from './decode-channel.ts';
import { kWeighting, type Biquad } from './k-weighting.ts';
import type { MeasureOptions, TrackReading } from './measure-track.ts';

/** Blocks of 400 ms begin every 100 ms (ITU-R BS.1770-5, Annex 1). */
const hopsPerSecond = 10;
const hopsPerBlock = 4;
const absoluteGateLufs = -70;
const relativeGateLu = -10;
/** What the K-weighting's gain at 997 Hz takes away again. */
const offsetLu = -0.691;
const surroundWeight = 1.41;

/**
 * Integrated loudness of a file in LUFS (ITU-R BS.1770-5, gated), by a read of its own: only a
 * rough mix and references are asked for it. Null below 400 ms and where all of it is gated.
 * NaN and infinity count as 0. Throws AppError `no-access` like any reading.
 */
export async function measureLoudness(
  source: ByteSource,
  { format, layout }: TrackReading,
  { signal, onBytes }: MeasureOptions = {},
): Promise<number | null> {
  const meter = new LoudnessMeter(format, layout);
  for await (const block of sampleBlocks(source, layout, signal)) {
    meter.add(block);
    onBytes?.(block.length);
  }
  return meter.integratedLufs();
}

/** The sample data in blocks of whole frames. */
async function* sampleBlocks(
  source: ByteSource,
  { dataOffset, dataBytes, bytesPerFrame }: WaveLayout,
  signal?: AbortSignal,
): AsyncGenerator<Uint8Array> {
  const blockBytes = Math.max(1, Math.floor((1 << 20) / bytesPerFrame)) * bytesPerFrame;
  for (let at = 0; at < dataBytes; at += blockBytes) {
    signal?.throwIfAborted();
    const block = await source.read(dataOffset + at, Math.min(blockBytes, dataBytes - at));
    yield block.subarray(0, block.length - (block.length % bytesPerFrame));
    if (block.length < blockBytes) return;
  }
}

class LoudnessMeter {
  readonly #format: TrackFormat;
  readonly #layout: WaveLayout;
  readonly #channels: { index: number; weight: number; filter: KFilter }[];
  readonly #hopFrames: number;
  /** Weighted mean squares of the hops, and of the one that is being filled. */
  readonly #hops: number[] = [];
  #hopEnergy = 0;
  #hopFilled = 0;

  constructor(format: TrackFormat, layout: WaveLayout) {
    this.#format = format;
    this.#layout = layout;
    this.#hopFrames = Math.max(1, Math.round(format.sampleRateHz / hopsPerSecond));
    this.#channels = channelWeights(format.channels, layout.channelMask)
      .map((weight, index) => ({ index, weight, filter: new KFilter(format.sampleRateHz) }))
      .filter(({ weight }) => weight > 0);
  }

  add(frames: Uint8Array): void {
    const weighted = this.#channels.map(({ index, weight, filter }) => ({
      weight,
      samples: filter.apply(decodeChannel(frames, index, this.#format, this.#layout)),
    }));
    const length = frames.length / this.#layout.bytesPerFrame;
    for (let from = 0; from < length;) {
      const to = Math.min(length, from + this.#hopFrames - this.#hopFilled);
      for (const { weight, samples } of weighted) {
        this.#hopEnergy += weight * sumOfSquares(samples, from, to);
      }
      this.#hopFilled += to - from;
      from = to;
      if (this.#hopFilled === this.#hopFrames) this.#endHop();
    }
  }

  #endHop(): void {
    this.#hops.push(this.#hopEnergy / this.#hopFrames);
    this.#hopEnergy = 0;
    this.#hopFilled = 0;
  }

  integratedLufs(): number | null {
    const blocks: number[] = [];
    for (let hop = hopsPerBlock; hop <= this.#hops.length; hop++) {
      blocks.push(mean(this.#hops.slice(hop - hopsPerBlock, hop)));
    }
    const audible = blocks.filter((energy) => loudnessOf(energy) > absoluteGateLufs);
    const relativeGate = loudnessOf(mean(audible)) + relativeGateLu;
    const loud = audible.filter((energy) => loudnessOf(energy) > relativeGate);
    return loud.length === 0 ? null : loudnessOf(mean(loud));
  }
}

function loudnessOf(energy: number): number {
  return offsetLu + 10 * Math.log10(energy);
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function sumOfSquares(samples: Float64Array, from: number, to: number): number {
  let sum = 0;
  for (let i = from; i < to; i++) sum += samples[i]! * samples[i]!;
  return sum;
}

/** Two biquads of one channel, with what they remember. */
class KFilter {
  readonly #stages: readonly { biquad: Biquad; memory: [number, number] }[];

  constructor(sampleRateHz: number) {
    this.#stages = kWeighting(sampleRateHz).map((biquad) => ({ biquad, memory: [0, 0] }));
  }

  /** Filters in place. */
  apply(samples: Float64Array): Float64Array {
    for (let i = 0; i < samples.length; i++) {
      if (!Number.isFinite(samples[i])) samples[i] = 0;
    }
    for (const { biquad, memory } of this.#stages) filterInPlace(samples, biquad, memory);
    return samples;
  }
}

/** Transposed direct form II. */
function filterInPlace(samples: Float64Array, biquad: Biquad, memory: [number, number]): void {
  const { b0, b1, b2, a1, a2 } = biquad;
  let [first, second] = memory;
  for (let i = 0; i < samples.length; i++) {
    const input = samples[i]!;
    const output = b0 * input + first;
    first = b1 * input - a1 * output + second;
    second = b2 * input - a2 * output;
    samples[i] = output;
  }
  memory[0] = first;
  memory[1] = second;
}

/** Speakers of WAVE_FORMAT_EXTENSIBLE's mask, in the order of their bits. */
const frontSpeakers = 0x1 | 0x2 | 0x4;
const lowFrequencySpeaker = 0x8;
const surroundSpeakers = 0x10 | 0x20 | 0x200 | 0x400;

/** Masks that files without one usually mean: quadro, 5.0 and 5.1. */
const usualMasks: Record<number, number> = {
  4: frontSpeakers - 0x4 + 0x30,
  5: frontSpeakers + 0x30,
  6: frontSpeakers + lowFrequencySpeaker + 0x30,
};

/** 1 for the front, 1.41 for surround channels, 0 for the low-frequency channel. */
function channelWeights(channels: number, channelMask: number | null): number[] {
  const mask = channelMask || (usualMasks[channels] ?? 0);
  const speakers = Array.from({ length: 32 }, (_, bit) => 2 ** bit).filter(
    (speaker) => Math.floor(mask / speaker) % 2 === 1,
  );
  return Array.from({ length: channels }, (_, channel) => {
    const speaker = speakers[channel] ?? 0;
    if (speaker === lowFrequencySpeaker) return 0;
    return speaker & surroundSpeakers ? surroundWeight : 1;
  });
}
