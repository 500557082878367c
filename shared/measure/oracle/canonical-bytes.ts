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
  const flip = sampleBytes === 1 && !layout.unsigned ? 0x80 : 0;
  for (let frame = 0; frame < frames; frame++) {
    const from = frame * frameBytes + channel * sampleBytes;
    for (let i = 0; i < sampleBytes; i++) {
      const place = layout.bigEndian ? sampleBytes - 1 - i : i;
      bytes[frame * sampleBytes + i] = data[from + place]! ^ flip;
    }
  }
  return bytes;
}
