import { AppError } from '#shared/errors.ts';
import type { CallOptions } from './bridge.ts';
import { WorkerCrash, WorkerLink } from './bridge.ts';
import type { MeasureApi, MeasureInput, MeasureOutput } from './measure-api.ts';

export type MeasurePool = {
  /** Workers at most. */
  readonly size: number;
  /**
   * Measures one file in the next free worker. A file whose worker crashes is tried once more; when
   * that worker crashes too, the file is `unreadable` and the others go on. Throws AppError
   * `engine-failed` when workers do not even start.
   */
  measure(input: MeasureInput, options?: CallOptions<number>): Promise<MeasureOutput>;
  close(): void;
};

/**
 * As many workers as the machine has cores, each taking whole files from one queue. Workers start
 * when the first file comes. All share one compiled module: `loadModule` is asked once a worker and
 * gives every time the same.
 */
export function createMeasurePool(
  loadModule: () => Promise<WebAssembly.Module>,
  size = Math.max(1, navigator.hardwareConcurrency),
): MeasurePool {
  const idle: WorkerLink<MeasureApi>[] = [];
  const waiting: ((link: Promise<WorkerLink<MeasureApi>>) => void)[] = [];
  let started = 0;
  let closed = false;

  const start = async (): Promise<WorkerLink<MeasureApi>> => {
    const module = await loadModule();
    const link = new WorkerLink<MeasureApi>(
      new Worker(new URL('./measure.worker.ts', import.meta.url), { type: 'module' }),
    );
    try {
      await link.call('load', module);
    } catch (cause) {
      link.close();
      throw cause instanceof WorkerCrash ? new StartFailure(cause.message) : cause;
    }
    return link;
  };

  const take = (): Promise<WorkerLink<MeasureApi>> => {
    for (let link = idle.pop(); link; link = idle.pop()) {
      if (link.isAlive) return Promise.resolve(link);
      started -= 1;
    }
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
      if (link && !link.isAlive) link = null;
      throw cause;
    } finally {
      if (closed) link?.close();
      else giveBack(link);
    }
  };

  return {
    size,
    async measure(input, options = {}) {
      for (let attempt = 1; ; attempt++) {
        try {
          return await measureOnce(input, options);
        } catch (cause) {
          const ended = cause instanceof WorkerCrash || cause instanceof StartFailure;
          if (!ended || closed) throw cause;
          if (attempt < mostAttempts) continue;
          if (cause instanceof StartFailure) {
            throw new AppError('engine-failed', { reason: cause.message });
          }
          return couldNotBeRead(input);
        }
      }
    },
    close() {
      closed = true;
      for (const link of idle) link.close();
    },
  };
}

const mostAttempts = 2;

/** A worker ended before it could do anything: its script did not load. Not the file's doing. */
class StartFailure extends Error {
  override name = 'StartFailure';
}

function couldNotBeRead({ path, size }: MeasureInput): MeasureOutput {
  return {
    path,
    bytes: size,
    reading: { kind: 'unreadable', reason: 'could-not-be-read', byteOffset: 0 },
    measures: null,
    overview: null,
  };
}
