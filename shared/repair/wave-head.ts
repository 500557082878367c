import type { RenderedAudio } from './render-frames.ts';
import { bytesPerSample } from './sample-codec.ts';

/** The header of a WAV file up to its first sample; RF64 (EBU Tech 3306) from 4 GiB on. */
export function waveHead({ form, channels, sampleRateHz, frames }: RenderedAudio): Uint8Array {
  const frameBytes = channels * bytesPerSample(form);
  const dataBytes = frames * frameBytes;
  const extensible = form.encoding === 'pcm' && form.containerBits > 16;
  const fmtBytes = extensible ? 40 : 16;
  const riffBytes = 4 + 36 + 8 + fmtBytes + 8 + dataBytes + (dataBytes % 2);
  const large = riffBytes > 0xfffffff0;
  const bytes = new Uint8Array(12 + 36 + 8 + fmtBytes + 8);
  const view = new DataView(bytes.buffer);
  const text = (at: number, id: string) => bytes.set(new TextEncoder().encode(id), at);
  text(0, large ? 'RF64' : 'RIFF');
  view.setUint32(4, large ? 0xffffffff : riffBytes, true);
  text(8, 'WAVE');
  // A JUNK chunk of the same size keeps the room a ds64 chunk would need.
  text(12, large ? 'ds64' : 'JUNK');
  view.setUint32(16, 28, true);
  if (large) {
    view.setBigUint64(20, BigInt(riffBytes), true);
    view.setBigUint64(28, BigInt(dataBytes), true);
    view.setBigUint64(36, BigInt(frames), true);
  }
  text(48, 'fmt ');
  view.setUint32(52, fmtBytes, true);
  const tag = form.encoding === 'float' ? 3 : 1;
  view.setUint16(56, extensible ? 0xfffe : tag, true);
  view.setUint16(58, channels, true);
  view.setUint32(60, sampleRateHz, true);
  view.setUint32(64, sampleRateHz * frameBytes, true);
  view.setUint16(68, frameBytes, true);
  view.setUint16(70, form.containerBits, true);
  if (extensible) {
    view.setUint16(72, 22, true);
    view.setUint16(74, form.bits, true);
    view.setUint32(76, channels === 1 ? 4 : channels === 2 ? 3 : 0, true);
    bytes.set([tag, 0, 0, 0, 0, 0, 0x10, 0, 0x80, 0, 0, 0xaa, 0, 0x38, 0x9b, 0x71], 80);
  }
  text(56 + fmtBytes, 'data');
  view.setUint32(60 + fmtBytes, large ? 0xffffffff : dataBytes, true);
  return bytes;
}
