import type { TrackFormat, WaveLayout } from '../../wave/track-format.ts';

/** Samples of one channel as fractions of full scale; NaN and infinity as they are. */
export function decodeSamples(
  data: Uint8Array,
  channel: number,
  format: TrackFormat,
  layout: WaveLayout,
): Float64Array {
  const view = new DataView(data.buffer, data.byteOffset, data.length);
  const sampleBytes = format.containerBits / 8;
  const frameBytes = sampleBytes * format.channels;
  return Float64Array.from({ length: Math.floor(data.length / frameBytes) }, (_, frame) => {
    const at = frame * frameBytes + channel * sampleBytes;
    return decodeSample(view, at, format, layout);
  });
}

function decodeSample(
  view: DataView,
  at: number,
  { encoding, containerBits }: TrackFormat,
  { bigEndian, unsigned }: WaveLayout,
): number {
  const little = !bigEndian;
  if (encoding === 'float') {
    return containerBits === 32 ? view.getFloat32(at, little) : view.getFloat64(at, little);
  }
  switch (containerBits) {
    case 8:
      return unsigned ? (view.getUint8(at) - 128) / 128 : view.getInt8(at) / 128;
    case 16:
      return view.getInt16(at, little) / 2 ** 15;
    case 24: {
      const high = view.getInt8(little ? at + 2 : at);
      const rest = view.getUint16(little ? at : at + 1, little);
      return (high * 2 ** 16 + rest) / 2 ** 23;
    }
    default:
      return view.getInt32(at, little) / 2 ** 31;
  }
}

/**
 * The bytes a WAVE file of this channel alone would hold: little-endian, 8-bit unsigned. The
 * identity of audio is taken of these, whatever container it comes in.
 */
export function canonicalBytes(
  data: Uint8Array,
  channel: number,
  format: TrackFormat,
  layout: WaveLayout,
): Uint8Array {
  const sampleBytes = format.containerBits / 8;
  const frameBytes = sampleBytes * format.channels;
  const frames = Math.floor(data.length / frameBytes);
  const bytes = new Uint8Array(frames * sampleBytes);
  for (let frame = 0; frame < frames; frame++) {
    const from = frame * frameBytes + channel * sampleBytes;
    const sample = data.slice(from, from + sampleBytes);
    if (layout.bigEndian) sample.reverse();
    if (sampleBytes === 1 && !layout.unsigned) sample[0]! ^= 0x80;
    bytes.set(sample, frame * sampleBytes);
  }
  return bytes;
}
