import { queryOptions } from '@tanstack/react-query';
import type { RepairPlan } from '#shared/repair/repair-plan.ts';
import type { Bench } from './bench.ts';

export type ExcerptPlace = { path: string; startFrame: number; frames: number };

/** Frames around a place: as they are in the dropped file, and as they will be in the zip. */
export type TwoExcerpts = { before: Float32Array[]; after: Float32Array[] | null };

/**
 * Reads an excerpt in the session worker: only its few frames are read again. `plan` is that of
 * the chosen repairs; without one that changes the sound there, `after` is null.
 */
export function excerptQuery(bench: Bench, place: ExcerptPlace, plan: RepairPlan | null) {
  const { path, startFrame, frames } = place;
  const operations = plan?.entries.find(({ from }) => from.includes(path))?.operations ?? [];
  return queryOptions({
    queryKey: ['excerpts', bench.stampAt(path), startFrame, frames, operations],
    queryFn: async ({ signal }): Promise<TwoExcerpts> => {
      const file = bench.fileAt(path);
      if (!file) return { before: [], after: null };
      const worker = await bench.sessionWorker();
      const before = await worker.call('excerpt', { file, startFrame, frames }, { signal });
      if (!plan || operations.length === 0) return { before, after: null };
      const after = await bench.repairedExcerpt({ path, startFrame, frames }, plan, signal);
      return { before, after };
    },
    staleTime: Infinity,
    gcTime: 60_000,
  });
}
