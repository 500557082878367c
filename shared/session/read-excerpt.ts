import type { OpenByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import { readFrames } from '../repair/source-frames.ts';
import { readWave } from '../wave/read-wave.ts';

/** More frames than this are never asked for at once: 10 s at 192 kHz. */
const mostFrames = 1_920_000;

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
    const length = Math.min(mostFrames, frames - (from - startFrame));
    return await readFrames({ ...reading, source }, from, length);
  } finally {
    await source.close();
  }
}
