import { sampleRateHz } from './synthesis.ts';

/** A 24-bit WAV file (RIFF, PCM) of one channel or two, as the recording programs of today write. */
export function writeWav(channels: readonly Float32Array[]): Uint8Array<ArrayBuffer> {
  const frames = channels[0]?.length ?? 0;
  const frameBytes = channels.length * 3;
  const dataBytes = frames * frameBytes;
  const bytes = new Uint8Array(44 + dataBytes);
  const view = new DataView(bytes.buffer);
  const text = (at: number, id: string): void => bytes.set(new TextEncoder().encode(id), at);
  text(0, 'RIFF');
  view.setUint32(4, 36 + dataBytes, true);
  text(8, 'WAVEfmt ');
  view.setUint32(16, 16, true);
  view.setUint16(20, 1, true);
  view.setUint16(22, channels.length, true);
  view.setUint32(24, sampleRateHz, true);
  view.setUint32(28, sampleRateHz * frameBytes, true);
  view.setUint16(32, frameBytes, true);
  view.setUint16(34, 24, true);
  text(36, 'data');
  view.setUint32(40, dataBytes, true);
  let at = 44;
  for (let frame = 0; frame < frames; frame++) {
    for (const channel of channels) {
      // Beyond full scale a converter clips, and that is what one of the planted faults needs.
      const clipped = Math.max(-1, Math.min(1, channel[frame]!));
      const sample = Math.max(-8_388_608, Math.min(8_388_607, Math.round(clipped * 8_388_608)));
      bytes[at++] = sample & 0xff;
      bytes[at++] = (sample >> 8) & 0xff;
      bytes[at++] = (sample >> 16) & 0xff;
    }
  }
  return bytes;
}
