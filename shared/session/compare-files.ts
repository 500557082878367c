import type { DroppedFile } from '../bytes/byte-source.ts';
import { compareTracks } from '../compare/compare-tracks.ts';
import type { Comparison } from '../compare/comparison.ts';
import { readFrames } from '../repair/source-frames.ts';
import type { MeasuredFile } from './measured-file.ts';

/**
 * Compares the tracks among measured files, reading a little of some of them again. `files` are
 * where their samples are, by the same paths.
 */
export async function compareFiles(
  measured: readonly MeasuredFile[],
  files: readonly DroppedFile[],
  signal?: AbortSignal,
): Promise<Comparison> {
  const byPath = new Map(files.map((file) => [file.path, file]));
  const tracks = measured.flatMap(({ path, reading, measures, overview }) =>
    reading.kind === 'track' && measures ? [{ path, ...reading, measures, overview }] : [],
  );
  const layouts = new Map(tracks.map((track) => [track.path, track]));
  return compareTracks(
    tracks,
    async (path, startFrame, frames) => {
      const track = layouts.get(path);
      const source = await byPath.get(path)?.open();
      if (!track || !source) throw new Error(`${path} is not among the compared files`);
      try {
        return await readFrames({ ...track, source }, startFrame, frames);
      } finally {
        await source.close();
      }
    },
    signal,
  );
}
