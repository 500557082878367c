import { AppError, isAppErrorCode, type AppErrorData } from '#shared/errors.ts';

/**
 * Calls between the page and a worker, typed on both ends by one Api type. The only code that
 * knows message shapes. Every call can be stopped by an AbortSignal and can report progress.
 */

/** What a worker offers: name -> input, progress and output, all structured-cloneable. */
export type WorkerApi = Record<string, { input: unknown; progress: unknown; output: unknown }>;

export type CallContext<Progress> = { signal: AbortSignal; report: (progress: Progress) => void };

export type Handlers<Api extends WorkerApi> = {
  [Method in keyof Api]: (
    input: Api[Method]['input'],
    context: CallContext<Api[Method]['progress']>,
  ) => Promise<Api[Method]['output']>;
};

type Request = { id: number; method: string; input: unknown } | { id: number; cancel: true };

type Answer =
  /** Sent once, first: the name of a lock that the worker holds for as long as it lives. */
  | { heldLock: string }
  | { id: number; progress: unknown }
  | { id: number; output: unknown }
  | { id: number; error: AppErrorData }
  | { id: number; bug: string };

/** The worker's end. `transferOf` names buffers in an output that may move instead of being copied. */
export function serveWorker<Api extends WorkerApi>(
  handlers: Handlers<Api>,
  transferOf: (output: unknown) => Transferable[] = () => [],
): void {
  const running = new Map<number, AbortController>();
  void holdLock();
  const post = (answer: Answer, transfer: Transferable[] = []): void => {
    (globalThis as unknown as DedicatedPort).postMessage(answer, transfer);
  };
  globalThis.addEventListener('message', (event: MessageEvent<Request>) => {
    const request = event.data;
    if ('cancel' in request) {
      running.get(request.id)?.abort();
      return;
    }
    const abort = new AbortController();
    running.set(request.id, abort);
    void (async () => {
      try {
        const handler: Handlers<WorkerApi>[string] | undefined = handlers[request.method];
        if (!handler) throw new Error(`the worker has no ${request.method}`);
        const output = await handler(request.input, {
          signal: abort.signal,
          report: (progress) => post({ id: request.id, progress }),
        });
        post({ id: request.id, output }, transferOf(output));
      } catch (cause) {
        post(failure(request.id, cause, abort.signal));
      } finally {
        running.delete(request.id);
      }
    })();
  });
}

/**
 * A worker that is ended by the browser (out of memory, most of all) says nothing any more: no
 * error event comes. Its locks are released, though, and that the page can wait for.
 */
async function holdLock(): Promise<void> {
  if (!('locks' in navigator)) return;
  const heldLock = `worker-${crypto.randomUUID()}`;
  await navigator.locks.request(heldLock, () => {
    (globalThis as unknown as DedicatedPort).postMessage({ heldLock } satisfies Answer, []);
    return new Promise<never>(() => undefined);
  });
}

type DedicatedPort = { postMessage(message: unknown, transfer: Transferable[]): void };

function failure(id: number, cause: unknown, signal: AbortSignal): Answer {
  if (signal.aborted) return { id, error: { code: 'cancelled' } };
  if (cause instanceof AppError) return { id, error: cause.toData() };
  return { id, bug: cause instanceof Error ? (cause.stack ?? cause.message) : String(cause) };
}

export type CallOptions<Progress> = {
  signal?: AbortSignal | undefined;
  onProgress?: ((progress: Progress) => void) | undefined;
  transfer?: Transferable[];
};

/** The worker itself went away (out of memory, a script that did not load). */
export class WorkerCrash extends Error {
  override name = 'WorkerCrash';
}

/** The page's end: owns one worker's life. */
export class WorkerLink<Api extends WorkerApi> {
  private readonly pending = new Map<number, PendingCall>();
  private nextId = 1;
  private crashed: WorkerCrash | null = null;
  private readonly worker: Worker;

  constructor(worker: Worker) {
    this.worker = worker;
    worker.addEventListener('message', (event: MessageEvent<Answer>) => this.settle(event.data));
    worker.addEventListener('error', (event) => this.fail(event.message));
    worker.addEventListener('messageerror', () => this.fail('a message could not be read'));
  }

  call<Method extends keyof Api & string>(
    method: Method,
    input: Api[Method]['input'],
    options: CallOptions<Api[Method]['progress']> = {},
  ): Promise<Api[Method]['output']> {
    if (this.crashed) return Promise.reject(this.crashed);
    if (options.signal?.aborted) return Promise.reject(new AppError('cancelled'));
    const id = this.nextId++;
    return new Promise((resolve, reject) => {
      const onAbort = (): void => {
        this.worker.postMessage({ id, cancel: true } satisfies Request);
        this.finish(id);
        reject(new AppError('cancelled'));
      };
      options.signal?.addEventListener('abort', onAbort, { once: true });
      this.pending.set(id, {
        resolve,
        reject,
        onProgress: options.onProgress,
        release: () => options.signal?.removeEventListener('abort', onAbort),
      });
      this.worker.postMessage({ id, method, input } satisfies Request, options.transfer ?? []);
    });
  }

  /** False once the worker went away or was closed: it answers no more calls. */
  get isAlive(): boolean {
    return this.crashed === null;
  }

  /** Ends the worker; calls still running are told it is gone. */
  close(): void {
    this.fail('closed');
  }

  private settle(answer: Answer): void {
    if ('heldLock' in answer) {
      // Granted when the worker is gone; after an orderly close there is nothing left to tell.
      void navigator.locks.request(answer.heldLock, () => this.fail('ended by the browser'));
      return;
    }
    const call = this.pending.get(answer.id);
    if (!call) return;
    if ('progress' in answer) {
      call.onProgress?.(answer.progress);
      return;
    }
    this.finish(answer.id);
    if ('output' in answer) call.resolve(answer.output);
    else if ('bug' in answer) call.reject(new Error(answer.bug));
    else if (isAppErrorCode(answer.error.code))
      call.reject(new AppError(answer.error.code, answer.error.details));
  }

  private finish(id: number): void {
    this.pending.get(id)?.release();
    this.pending.delete(id);
  }

  private fail(reason: string): void {
    if (this.crashed) return;
    this.worker.terminate();
    this.crashed = new WorkerCrash(reason);
    for (const [id, call] of [...this.pending]) {
      this.finish(id);
      call.reject(this.crashed);
    }
  }
}

type PendingCall = {
  // The caller's type is restored by call(); here all outputs look alike.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  resolve: (output: any) => void;
  reject: (error: Error) => void;
  onProgress: ((progress: unknown) => void) | undefined;
  release: () => void;
};
