import { spawn } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { clearInterval, clearTimeout, setInterval, setTimeout } from 'node:timers';

/**
 * Another system user to run a program as.
 * @typedef {{ uid: number, gid: number, name: string }} Owner
 */

/**
 * A program that runs until it is stopped.
 * @typedef {object} RunningProgram
 * @property {string} name for messages
 * @property {import('node:child_process').ChildProcess} child
 * @property {Promise<string>} ended how it ended, in words; never rejects
 * @property {(graceSeconds?: number) => Promise<void>} stop asks it to end, then makes it
 * @property {() => void} kill ends it and its own children at once
 */

/** Programs of this process that have not ended, oldest first. @type {Set<RunningProgram>} */
const runningPrograms = new Set();

// Started only while its parent is still the one that asked for it: the parent can die between
// the fork and the request for its death signal, and then no signal would ever come.
const startIfParentLives = 'test "$PPID" = "$0" && exec "$@"';

/**
 * The command wrapped so that the kernel signals it when this process dies, however that
 * happens. The signal belongs to the thread that starts the program: call from the main thread.
 * A user is switched first, since that would clear the signal again.
 *
 * @param {string[]} command
 * @param {{ owner?: Owner | null | undefined, deathSignal?: 'TERM' | 'INT' }} [options]
 * @returns {string[]}
 */
export function dyingWithParent(command, { owner, deathSignal = 'TERM' } = {}) {
  const asOwner = owner
    ? [`--reuid=${owner.uid}`, `--regid=${owner.gid}`, '--clear-groups', '--no-new-privs']
    : [];
  const guard = ['sh', '-c', startIfParentLives, String(process.pid)];
  return ['setpriv', ...asOwner, `--pdeathsig=${deathSignal}`, ...guard, ...command];
}

/**
 * Runs a program to its end and keeps what it printed.
 *
 * @param {string[]} command
 * @param {object} [options]
 * @param {Owner | null} [options.owner]
 * @param {string} [options.cwd]
 * @param {NodeJS.ProcessEnv} [options.env]
 * @param {boolean} [options.shown] let it write to this terminal instead of keeping its output
 * @param {boolean} [options.outlivesParent] for what must not be cut off half-way (dpkg)
 * @returns {Promise<{ code: number, stdout: string, stderr: string }>} code 127 where there is no
 *   such program, 128 where a signal ended it
 */
export async function runProgram(command, { owner, cwd, env, shown, outlivesParent } = {}) {
  const wrapped = outlivesParent ? command : dyingWithParent(command, { owner });
  const [file = '', ...args] = wrapped;
  const child = spawn(file, args, {
    cwd: cwd ?? (owner ? '/' : undefined),
    env: env ?? process.env,
    stdio: shown ? ['ignore', 'inherit', 'inherit'] : ['ignore', 'pipe', 'pipe'],
  });
  let stdout = '';
  let stderr = '';
  child.stdout?.setEncoding('utf8').on('data', (/** @type {string} */ text) => (stdout += text));
  child.stderr?.setEncoding('utf8').on('data', (/** @type {string} */ text) => (stderr += text));
  const code = await new Promise((resolve) => {
    child.on('error', (error) => {
      stderr += error.message;
      resolve(127);
    });
    child.on('close', (exitCode) => resolve(exitCode ?? 128));
  });
  return { code, stdout, stderr };
}

/**
 * Starts a program that runs until it is stopped, in a process group of its own: a Ctrl-C in the
 * terminal reaches this process only, which then stops its programs in the right order.
 *
 * @param {string} name
 * @param {string[]} command
 * @param {object} [options]
 * @param {Owner | null} [options.owner]
 * @param {string} [options.cwd]
 * @param {NodeJS.ProcessEnv} [options.env]
 * @param {import('node:child_process').StdioOptions} [options.stdio]
 * @param {'SIGTERM' | 'SIGINT'} [options.stopSignal]
 * @param {'SIGKILL' | 'SIGQUIT'} [options.killSignal] what ends it when there is no time
 * @returns {RunningProgram}
 */
export function startProgram(name, command, options = {}) {
  const { owner, cwd, env, stdio = 'ignore' } = options;
  const { stopSignal = 'SIGTERM', killSignal = 'SIGKILL' } = options;
  const deathSignal = stopSignal === 'SIGINT' ? 'INT' : 'TERM';
  const [file = '', ...args] = dyingWithParent(command, { owner, deathSignal });
  const child = spawn(file, args, {
    cwd: cwd ?? (owner ? '/' : undefined),
    env: env ?? process.env,
    stdio,
    detached: true,
  });
  const ended = new Promise((/** @type {(how: string) => void} */ resolve) => {
    child.on('error', (error) => resolve(error.message));
    child.on('exit', (code, signal) => resolve(signal ?? `exit code ${code}`));
  });
  /** @type {RunningProgram} */
  const program = {
    name,
    child,
    ended,
    async stop(graceSeconds = 15) {
      child.kill(stopSignal);
      const force = setTimeout(() => this.kill(), graceSeconds * 1000);
      await ended;
      clearTimeout(force);
    },
    kill() {
      if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return;
      // It leads a process group, in which the programs it started are too.
      process.kill(-child.pid, killSignal);
    },
  };
  runningPrograms.add(program);
  void ended.then(() => runningPrograms.delete(program));
  return program;
}

/** Stops every program started here and still running, the youngest first. */
export async function stopAllPrograms() {
  for (const program of [...runningPrograms].reverse()) await program.stop();
}

/** Ends every program started here at once, for the second Ctrl-C. */
export function killAllPrograms() {
  for (const program of runningPrograms) program.kill();
}

/**
 * Whether a process runs. One that has ended but was not yet collected by its parent (a zombie)
 * still has a number that can be signalled, so the kernel's own table is read.
 *
 * @param {number} pid
 */
export function isRunning(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'latin1');
    // The name in brackets may itself hold spaces and brackets: the state follows the last one.
    const state = stat.slice(stat.lastIndexOf(')') + 2, stat.lastIndexOf(')') + 3);
    return state !== 'Z' && state !== 'X';
  } catch {
    return false;
  }
}

/**
 * Calls back once npm, which started this process, is gone without having told it: npm passes
 * signals on only while it lives. Does nothing for a process that npm did not start, which may
 * outlive the shell it was started from.
 *
 * @param {() => void} callback
 */
export function whenNpmDies(callback) {
  if (!process.env.npm_lifecycle_event) return;
  const npm = process.ppid;
  const watch = setInterval(() => {
    if (process.ppid === npm) return;
    clearInterval(watch);
    callback();
  }, 500);
  watch.unref();
}
