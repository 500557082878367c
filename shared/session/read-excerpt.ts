import type { OpenByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import { readFrames } from '../repair/source-frames.ts';
import { readWave } from '../wave/read-wave.ts';

/** More frames than this are never asked for at once: 10 s at 192 kHz. */
const mostFrames = 1_920_000;

/** No single read is larger, so that memory stays flat on any machine. */
const bytesARead = 1 << 18;

/**
 * Some frames of a track to look at or listen to, one array a channel, full scale = 1; fewer where
 * the file ends. Throws AppError `no-access` when it cannot be read or is no track any more.
 */
export async function readExcerpt(
  file: { path: string; open(): Promise<OpenByteSource> },
  startFrame: number,
  frames: number,
): Promise<Float32Array[]> {
  const source = await file.open();
  try {
    const reading = await readWave(source, file.path);
    if (reading.kind !== 'track') throw new AppError('no-access', { path: file.path });
    const from = Math.max(0, startFrame);
    const to = Math.min(from + mostFrames, startFrame + frames, reading.format.frames);
    const framesARead = Math.max(1, Math.floor(bytesARead / reading.layout.bytesPerFrame));
    const channels = Array.from(
      { length: reading.format.channels },
      () => new Float32Array(Math.max(0, to - from)),
    );
    for (let at = from; at < to; at += framesARead) {
      const part = await readFrames({ ...reading, source }, at, Math.min(framesARead, to - at));
      for (const [index, samples] of part.entries()) channels[index]?.set(samples, at - from);
    }
    return channels;
  } finally {
    await source.close();
  }
}
