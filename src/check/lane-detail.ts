import { queryOptions, skipToken } from '@tanstack/react-query';
import type { Overview } from '#shared/measure/overview.ts';
import type { Bench } from './bench.ts';
import { samplePeaks, type Peaks } from './draw-lane.ts';
import type { TimeView } from './time-view.ts';
import type { ViewedFile } from './viewed-session.ts';

/** Stretches longer than this are never read again for drawing. */
const longestSeconds = 8;
/** About as many columns as a wide screen has pixels. */
const mostColumns = 4096;

/**
 * Finer peaks for a view in which a column of the overview is wider than about two pixels. The
 * stretch is rounded outwards, so that small moves find it read already.
 */
export function laneDetailQuery(
  bench: Bench | null,
  { path, format }: ViewedFile,
  overview: Overview,
  { startSeconds, endSeconds }: TimeView,
) {
  const { sampleRateHz, frames } = format!;
  const span = endSeconds - startSeconds;
  const columnsInView = (span * sampleRateHz) / overview.framesPerColumn;
  const file = bench?.fileAt(path);
  const needed = span <= longestSeconds && columnsInView < 700 && file !== undefined;
  const step = 2 ** Math.ceil(Math.log2(span)) / 2;
  const from = Math.max(0, Math.floor(startSeconds / step) * step);
  const startFrame = Math.round(from * sampleRateHz);
  const length = Math.min(
    frames,
    Math.ceil((Math.ceil(endSeconds / step) * step - from) * sampleRateHz),
  );
  return queryOptions({
    queryKey: ['lane-detail', bench?.stampAt(path), startFrame, length],
    queryFn:
      needed && bench
        ? async ({ signal }): Promise<Peaks> => {
            const worker = await bench.sessionWorker();
            const input = { file, startFrame, frames: length };
            const samples = await worker.call('excerpt', input, { signal });
            return samplePeaks(samples, startFrame, sampleRateHz, mostColumns);
          }
        : skipToken,
    staleTime: Infinity,
    gcTime: 30_000,
  });
}
