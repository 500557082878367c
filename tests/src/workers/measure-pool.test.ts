import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createMeasurePool } from '../../../src/workers/measure-pool.ts';

type Message = { id: number; method: string; input: unknown } | { id: number; cancel: true };

/** What a stand-in for a worker does with a file of this path: answer, end with an error, or wait. */
type Behaviour = (path: string, attempt: number) => 'measured' | 'crash' | 'wait';

let behaviour: Behaviour = () => 'measured';
let loads: () => 'loaded' | 'crash' = () => 'loaded';
let started: FakeWorker[] = [];
const attempts = new Map<string, number>();

/** Speaks the bridge's messages, as a measuring worker does. */
class FakeWorker extends EventTarget {
  isEnded = false;
  cancelled: number[] = [];

  constructor() {
    super();
    started.push(this);
  }

  postMessage(message: Message): void {
    if ('cancel' in message) {
      this.cancelled.push(message.id);
      return;
    }
    const { id, method, input } = message;
    queueMicrotask(() => {
      if (method === 'load') {
        if (loads() === 'crash') this.crash();
        else this.answer({ id, output: null });
        return;
      }
      const { path } = input as { path: string };
      const attempt = (attempts.get(path) ?? 0) + 1;
      attempts.set(path, attempt);
      const does = behaviour(path, attempt);
      if (does === 'crash') this.crash();
      else if (does === 'measured') this.answer({ id, output: { path, bytes: 3 } });
    });
  }

  terminate(): void {
    this.isEnded = true;
  }

  private answer(data: unknown): void {
    this.dispatchEvent(new MessageEvent('message', { data }));
  }

  private crash(): void {
    this.dispatchEvent(new ErrorEvent('error', { message: 'out of memory' }));
  }
}

const input = (path: string) => ({ path, size: 3, file: new File(['abc'], path) });
const pool = (size: number) => createMeasurePool(() => Promise.resolve({}), size);

describe('the measuring workers', () => {
  beforeEach(() => {
    behaviour = () => 'measured';
    loads = () => 'loaded';
    started = [];
    attempts.clear();
    vi.stubGlobal('Worker', FakeWorker);
  });
  afterEach(() => vi.unstubAllGlobals());

  it('are no more than the pool has room for, and are used again', async () => {
    const workers = pool(2);
    const names = ['a', 'b', 'c', 'd', 'e'];
    const measured = await Promise.all(names.map((name) => workers.measure(input(name))));
    expect(measured.map(({ path }) => path)).toEqual(names);
    expect(started).toHaveLength(2);
  });

  it('are replaced when they end, and their file is tried once more', async () => {
    behaviour = (path, attempt) => (path === 'b' && attempt === 1 ? 'crash' : 'measured');
    const workers = pool(1);
    const measured = await Promise.all(['a', 'b', 'c'].map((name) => workers.measure(input(name))));
    expect(measured.map(({ path }) => path)).toEqual(['a', 'b', 'c']);
    expect(attempts.get('b')).toBe(2);
    expect(started.map(({ isEnded }) => isEnded)).toEqual([true, false]);
  });

  it('give a file up that ends two of them, and go on with the others', async () => {
    behaviour = (path) => (path === 'b' ? 'crash' : 'measured');
    const workers = pool(1);
    const measured = await Promise.all(['a', 'b', 'c'].map((name) => workers.measure(input(name))));
    expect(attempts.get('b')).toBe(2);
    expect(measured[1]).toEqual({
      path: 'b',
      bytes: 3,
      reading: { kind: 'unreadable', reason: 'could-not-be-read', byteOffset: 0 },
      measures: null,
      overview: null,
    });
    expect(measured[2]).toMatchObject({ path: 'c' });
  });

  it('are started once more when they do not start, then the engine has failed', async () => {
    let tries = 0;
    loads = () => ((tries += 1) === 1 ? 'crash' : 'loaded');
    await expect(pool(1).measure(input('a'))).resolves.toMatchObject({ path: 'a' });
    expect(tries).toBe(2);
    loads = () => 'crash';
    await expect(pool(1).measure(input('a'))).rejects.toMatchObject({ code: 'engine-failed' });
  });

  it('stop at once when asked, and take the next file', async () => {
    behaviour = (path) => (path === 'long' ? 'wait' : 'measured');
    const workers = pool(1);
    const abort = new AbortController();
    const stopped = workers.measure(input('long'), { signal: abort.signal });
    await vi.waitFor(() => expect(attempts.get('long')).toBe(1));
    abort.abort();
    await expect(stopped).rejects.toMatchObject({ code: 'cancelled' });
    expect(started[0]!.cancelled).toHaveLength(1);
    await expect(workers.measure(input('next'))).resolves.toMatchObject({ path: 'next' });
    expect(started).toHaveLength(1);
  });

  it('end with the pool', async () => {
    const workers = pool(1);
    await workers.measure(input('a'));
    workers.close();
    expect(started[0]!.isEnded).toBe(true);
  });
});
