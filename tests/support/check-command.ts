import { spawn } from 'node:child_process';
import { mkdir, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { run } from './outside-programs.ts';

const checkout = fileURLToPath(new URL('../..', import.meta.url));
const program = `${checkout}dist/cli/check.js`;

export type CheckRun = {
  code: number | null;
  signal: NodeJS.Signals | null;
  stdout: string;
  stderr: string;
};

export type CheckRunOptions = {
  cwd?: string;
  env?: Record<string, string>;
  /** Runs as another user; only root can ask for it. */
  uid?: number;
  /** Sends this signal as soon as `when` answers true. */
  interrupt?: { signal: NodeJS.Signals; when: () => boolean };
  /** Runs under a shell that sets limits first: `ulimit -f 100`. */
  limit?: string;
};

/** Builds the command line if it is missing or old, as npm run check does. */
export async function buildCheckCommand(): Promise<void> {
  await run(process.execPath, [`${checkout}server/dev/build.mjs`, '--quiet', 'wasm', 'cli']);
}

/** Runs the built command. */
export function runCheckCommand(
  args: readonly string[],
  { cwd, env, uid, interrupt, limit }: CheckRunOptions = {},
): Promise<CheckRun> {
  const [command, ...rest] = limit
    ? ['sh', '-c', `${limit}; exec "$@"`, 'sh', process.execPath, program, ...args]
    : [process.execPath, program, ...args];
  const child = spawn(command, rest, {
    cwd,
    env: { ...process.env, ...env },
    ...(uid !== undefined && { uid, gid: uid }),
  });
  let stdout = '';
  let stderr = '';
  child.stdout.setEncoding('utf8').on('data', (text: string) => (stdout += text));
  child.stderr.setEncoding('utf8').on('data', (text: string) => (stderr += text));
  const watch =
    interrupt &&
    setInterval(() => {
      if (!interrupt.when()) return;
      clearInterval(watch);
      child.kill(interrupt.signal);
    }, 2);
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (code, signal) => {
      clearInterval(watch);
      resolve({ code, signal, stdout, stderr });
    });
  });
}

/** Writes files below a folder, with the folders they lie in; answers the folder. */
export async function saveAll(folder: string, files: Record<string, Uint8Array>): Promise<string> {
  await mkdir(folder, { recursive: true });
  for (const [path, bytes] of Object.entries(files)) {
    await mkdir(dirname(join(folder, path)), { recursive: true });
    await writeFile(join(folder, path), bytes);
  }
  return folder;
}
