import type { TrackFormat, WaveLayout } from '../../wave/track-format.ts';

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
