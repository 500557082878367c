import { loadMeters } from '../browser/load-meters.ts';
import { createMeasurePool, type MeasurePool } from '../workers/measure-pool.ts';
import { openSessionWorker, type SessionWorker } from '../workers/session-link.ts';

/** The workers of one bench: started when first needed, started again when one is gone. */
export class BenchWorkers {
  private module: Promise<WebAssembly.Module> | null = null;
  private pool: MeasurePool | null = null;
  private worker: Promise<SessionWorker> | null = null;

  /** Measures files, as many at a time as the machine has cores. */
  measuring(): MeasurePool {
    return (this.pool ??= createMeasurePool(() => this.meters()));
  }

  /** Compares, repairs and packs. Throws AppError `engine-failed`. */
  async session(): Promise<SessionWorker> {
    const before = this.worker;
    if (before && (await before.then(({ isAlive }) => isAlive).catch(() => false))) return before;
    // Somebody else may have seen the same worker gone and started the next one meanwhile.
    if (this.worker === before) this.worker = this.meters().then(openSessionWorker);
    return this.worker!;
  }

  close(): void {
    this.pool?.close();
    void this.worker?.then(
      (worker) => worker.close(),
      () => undefined,
    );
    this.pool = null;
    this.worker = null;
  }

  private meters(): Promise<WebAssembly.Module> {
    // Without a network it fails and may work a moment later.
    this.module ??= loadMeters().catch((cause: unknown) => {
      this.module = null;
      throw cause;
    });
    return this.module;
  }
}
