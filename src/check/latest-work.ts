/** Work of which only the newest counts: begun after a pause, given up when newer work comes. */
export class LatestWork {
  private running: AbortController | null = null;
  private done: Promise<void> = Promise.resolve();

  /** `work` must not throw; it looks at its signal before it tells anybody what came of it. */
  start(pauseMs: number, work: (signal: AbortSignal) => Promise<void>): void {
    this.stop();
    const running = new AbortController();
    this.running = running;
    this.done = new Promise((resolve) => {
      const timer = setTimeout(() => void work(running.signal).finally(resolve), pauseMs);
      const giveUp = (): void => {
        clearTimeout(timer);
        resolve();
      };
      running.signal.addEventListener('abort', giveUp, { once: true });
    });
  }

  stop(): void {
    this.running?.abort();
  }

  /** Resolves once the newest work is done, whatever else is started meanwhile. */
  async settled(): Promise<void> {
    let waitedFor: Promise<void>;
    do {
      waitedFor = this.done;
      await waitedFor;
    } while (waitedFor !== this.done);
  }
}
