import { bytesSource } from '#shared/bytes/byte-source.ts';
import { createMeters } from '#shared/measure/create-meters.ts';
import type { Measures } from '#shared/measure/measures.ts';
import { measureTrack } from '#shared/measure/measure-track.ts';
import type { MeterEngine, MeterResult } from '#shared/measure/meter.ts';
import { loadMeterModule } from '../../server/cli/load-meters.ts';
import { writeTestWave, type TestSamples } from './audio-writer.ts';
import { readTrack, type TrackReading } from './reading.ts';

let compiled: Promise<WebAssembly.Module> | undefined;

/** WebAssembly meters of their own, so that files can be measured side by side. */
export async function newMeters(): Promise<MeterEngine> {
  compiled ??= loadMeterModule();
  return createMeters(await compiled);
}

const idle: MeterEngine[] = [];

/** Measures the bytes of a whole file with the WebAssembly meters. */
export async function measureBytes(bytes: Uint8Array): Promise<Measures> {
  const engine = idle.pop() ?? (await newMeters());
  const { measures } = await measureTrack(bytesSource(bytes), await readTrack(bytes), engine);
  idle.push(engine);
  return measures;
}

/** Measures samples as a WAV file of them. */
export async function measureSamples(samples: TestSamples): Promise<Measures> {
  return measureBytes(writeTestWave(samples));
}

/** Puts a file through an engine, cut into pieces of these lengths (the last takes the rest). */
export function measureInPieces(
  engine: MeterEngine,
  bytes: Uint8Array,
  { format, layout }: TrackReading,
  pieces: Iterable<number>,
): MeterResult {
  const meter = engine.open(format, layout);
  let at = 0;
  for (const piece of pieces) {
    meter.write(bytes.subarray(at, at + piece));
    at += piece;
  }
  if (at < bytes.length) meter.write(bytes.subarray(at));
  return meter.finish();
}

/** A mono file of 32-bit float: samples as they are, but for rounding to single precision. */
export function floatMono(samples: ArrayLike<number>, sampleRateHz = 48_000): TestSamples {
  return { sampleRateHz, encoding: 'float', bits: 32, channels: [samples] };
}

/** A PCM file of fractions of full scale, rounded and held below full scale. */
export function pcm(
  bits: number,
  channels: readonly ArrayLike<number>[],
  sampleRateHz = 48_000,
): TestSamples {
  const most = 2 ** (bits - 1);
  const toWhole = (sample: number) =>
    Math.max(-most, Math.min(most - 1, Math.round(sample * most)));
  return {
    sampleRateHz,
    encoding: 'pcm',
    bits,
    channels: channels.map((samples) => Array.from(samples, toWhole)),
  };
}

/** `frames` samples of a function of the frame's number. */
export function sampled(frames: number, sample: (frame: number) => number): Float64Array {
  return Float64Array.from({ length: frames }, (_, frame) => sample(frame));
}

/** Evenly distributed noise between -1 and 1, the same every time. */
export function noise(seed = 1): () => number {
  let state = seed >>> 0;
  return () => {
    // Numbers of Numerical Recipes' quick generator.
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 31 - 1;
  };
}
