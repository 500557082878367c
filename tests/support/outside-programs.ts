import { execFile } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const execute = promisify(execFile);

/** Runs a reference program (sox, ffmpeg, python3 ...) and answers what it printed. */
export async function run(program: string, args: readonly string[]): Promise<string> {
  const { stdout } = await execute(program, [...args], { maxBuffer: 1 << 26 });
  return stdout;
}

/** The same, for programs that describe things in their messages. */
export async function runForMessages(program: string, args: readonly string[]): Promise<string> {
  const { stderr } = await execute(program, [...args], { maxBuffer: 1 << 26 });
  return stderr;
}

/** Runs the tasks two at a time: the programs are processes of their own. */
export async function inPairs<T, R>(
  items: readonly T[],
  task: (item: T, index: number) => Promise<R>,
): Promise<R[]> {
  const results: R[] = [];
  const queue = items.entries();
  const worker = async () => {
    for (const [index, item] of queue) results[index] = await task(item, index);
  };
  await Promise.all([worker(), worker()]);
  return results;
}

/** A folder of its own, removed after `use`. */
export async function withFolder<T>(use: (folder: string) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(join(tmpdir(), 'flightcase-'));
  try {
    return await use(folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
