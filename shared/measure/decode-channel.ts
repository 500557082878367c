import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';

/**
 * Samples of one channel of some whole frames, as fractions of full scale; NaN and infinity as
 * they are. `frames` must begin with a frame's first byte.
 */
export function decodeChannel(
  frames: Uint8Array,
  channel: number,
  format: TrackFormat,
  layout: WaveLayout,
): Float64Array {
  const sampleBytes = format.containerBits / 8;
  const frameBytes = sampleBytes * format.channels;
  const samples = new Float64Array(Math.floor(frames.length / frameBytes));
  const readSample = sampleReader(frames, format, layout);
  let at = channel * sampleBytes;
  for (let frame = 0; frame < samples.length; frame++) {
    samples[frame] = readSample(at);
    at += frameBytes;
  }
  return samples;
}

function sampleReader(
  bytes: Uint8Array,
  { encoding, containerBits }: TrackFormat,
  { bigEndian, unsigned }: WaveLayout,
): (at: number) => number {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const little = !bigEndian;
  switch (encoding + String(containerBits)) {
    case 'pcm8':
      return unsigned
        ? (at) => (view.getUint8(at) - 2 ** 7) / 2 ** 7
        : (at) => view.getInt8(at) / 2 ** 7;
    case 'pcm16':
      return (at) => view.getInt16(at, little) / 2 ** 15;
    case 'pcm24':
      return little
        ? (at) => (view.getInt8(at + 2) * 2 ** 16 + view.getUint16(at, true)) / 2 ** 23
        : (at) => (view.getInt8(at) * 2 ** 16 + view.getUint16(at + 1)) / 2 ** 23;
    case 'pcm32':
      return (at) => view.getInt32(at, little) / 2 ** 31;
    case 'float32':
      return (at) => view.getFloat32(at, little);
    case 'float64':
      return (at) => view.getFloat64(at, little);
    default:
      throw new Error(`No samples of ${encoding} with ${containerBits} bits.`);
  }
}
