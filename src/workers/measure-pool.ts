import { AppError } from '#shared/errors.ts';
import type { CallOptions } from './bridge.ts';
import { WorkerCrash, WorkerLink } from './bridge.ts';
import type { MeasureApi, MeasureInput, MeasureOutput } from './measure-api.ts';

export type MeasurePool = {
  /** Workers at most. */
  readonly size: number;
  /** Measures one file in the next free worker. A file whose worker crashes is tried once more. */
  measure(input: MeasureInput, options?: CallOptions<number>): Promise<MeasureOutput>;
  close(): void;
};

/**
 * As many workers as the machine has cores, each taking whole files from one queue. Workers start
 * when the first file comes and all share one compiled module.
 */
export function createMeasurePool(
  loadModule: () => Promise<WebAssembly.Module>,
  size = Math.max(1, navigator.hardwareConcurrency),
): MeasurePool {
  const idle: WorkerLink<MeasureApi>[] = [];
  const waiting: ((link: Promise<WorkerLink<MeasureApi>>) => void)[] = [];
  let started = 0;
  let module: Promise<WebAssembly.Module> | null = null;
  let closed = false;

  const start = async (): Promise<WorkerLink<MeasureApi>> => {
    module ??= loadModule();
    const link = new WorkerLink<MeasureApi>(
      new Worker(new URL('./measure.worker.ts', import.meta.url), { type: 'module' }),
    );
    await link.call('load', await module);
    return link;
  };

  const take = (): Promise<WorkerLink<MeasureApi>> => {
    const link = idle.pop();
    if (link) return Promise.resolve(link);
    if (started < size) {
      started += 1;
      return start();
    }
    return new Promise((resolve) => waiting.push(resolve));
  };

  const giveBack = (link: WorkerLink<MeasureApi> | null): void => {
    const next = waiting.shift();
    if (next) next(link ? Promise.resolve(link) : start());
    else if (link) idle.push(link);
    else started -= 1;
  };

  const measureOnce = async (
    input: MeasureInput,
    options: CallOptions<number>,
  ): Promise<MeasureOutput> => {
    let link: WorkerLink<MeasureApi> | null = null;
    try {
      link = await take();
      if (closed) throw new AppError('cancelled');
      return await link.call('measure', input, options);
    } catch (cause) {
      if (cause instanceof WorkerCrash) link = null;
      throw cause;
    } finally {
      if (closed) link?.close();
      else giveBack(link);
    }
  };

  return {
    size,
    async measure(input, options = {}) {
      try {
        return await measureOnce(input, options);
      } catch (cause) {
        if (cause instanceof WorkerCrash && !closed) return measureOnce(input, options);
        throw cause;
      }
    },
    close() {
      closed = true;
      for (const link of idle) link.close();
    },
  };
}
