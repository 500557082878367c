import { WorkerLink } from './bridge.ts';
import type { SessionApi } from './session-api.ts';

export type SessionWorker = WorkerLink<SessionApi>;

/** Starts the worker that compares, repairs and packs. */
export async function openSessionWorker(module: WebAssembly.Module): Promise<SessionWorker> {
  const link = new WorkerLink<SessionApi>(
    new Worker(new URL('./session.worker.ts', import.meta.url), { type: 'module' }),
  );
  await link.call('load', module);
  return link;
}
