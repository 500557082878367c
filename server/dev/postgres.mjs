import { closeSync, openSync } from 'node:fs';
import { readFile, readlink, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { exists } from './debian.mjs';
import { cleanEnvironment, makeCluster } from './make-cluster.mjs';
import { freePort, loopback } from './ports.mjs';
import { findPostgresPrograms } from './postgres-programs.mjs';
import { isRunning, startProgram } from './processes.mjs';
import { lastLines, saysDiskFull, setupFailure } from './setup-failure.mjs';

/**
 * A PostgreSQL cluster of our own: made, started on loopback, and gone with this process. Its
 * folder holds `data`, the superuser's `password` and the server's `log`.
 *
 * @typedef {import('./cluster-home.mjs').ClusterHome} ClusterHome
 * @typedef {import('./postgres-programs.mjs').PostgresPrograms} PostgresPrograms
 *
 * @typedef {object} Cluster
 * @property {ClusterHome} home
 * @property {number} port on 127.0.0.1
 * @property {string} password of the superuser `postgres`
 * @property {boolean} durable
 * @property {import('./processes.mjs').RunningProgram} program the server; another after a restart
 */

/** Recovery after a crash can take a while; a server that is silent for longer is stuck. */
const startSeconds = 120;

const settings = {
  listen_addresses: loopback,
  unix_socket_directories: '',
  timezone: 'UTC',
  log_timezone: 'UTC',
};

/** For databases that nobody misses after the run. */
const throwawaySettings = {
  fsync: 'off',
  synchronous_commit: 'off',
  full_page_writes: 'off',
  max_connections: '200',
};

/**
 * Makes the cluster where there is none, starts it and waits until it answers.
 *
 * @param {ClusterHome} home
 * @param {{ durable?: boolean, note?: (text: string) => void }} [options] durable false: faster,
 *   and lost when the machine stops
 * @returns {Promise<Cluster>}
 */
export async function startCluster(home, { durable = true, note = () => {} } = {}) {
  const programs = await choosePrograms(home);
  if (!(await exists(join(home.path, 'data', 'PG_VERSION')))) {
    note(`making a cluster in ${home.path}`);
    await makeCluster(home, programs, durable);
  }
  const password = (await readFile(join(home.path, 'password'), 'utf8')).trim();
  await clearLeftovers(home, note);
  const port = await freePort();
  const program = await launch(programs, home, port, durable);
  return { home, port, password, durable, program };
}

/** Starts the server again on its port after it ended. @param {Cluster} cluster */
export async function restartCluster(cluster) {
  const programs = await choosePrograms(cluster.home);
  await clearLeftovers(cluster.home, () => {});
  cluster.program = await launch(programs, cluster.home, cluster.port, cluster.durable);
}

/** Address of one database for clients; the password is in it. */
export function databaseUrl(
  /** @type {{ port: number, password: string }} */ { port, password },
  /** @type {string} */ user,
  /** @type {string} */ database,
) {
  return `postgres://${user}:${password}@${loopback}:${port}/${database}`;
}

/**
 * The newest programs, or those that made the cluster: its files fit one major version only.
 *
 * @param {ClusterHome} home
 * @returns {Promise<PostgresPrograms>}
 */
async function choosePrograms(home) {
  const installed = await findPostgresPrograms();
  const [newest] = installed;
  if (!newest) throw setupFailure('PostgreSQL is not installed.');
  const versionFile = join(home.path, 'data', 'PG_VERSION');
  const madeBy = await readFile(versionFile, 'utf8').catch(() => null);
  if (madeBy === null || Number.isNaN(newest.major)) return newest;
  const fitting = installed.find(({ major }) => major === Number(madeBy));
  if (fitting) return fitting;
  throw setupFailure(
    `The database in ${home.path} was made by PostgreSQL ${madeBy.trim()}, which is not ` +
      `installed any more. Please install postgresql-${madeBy.trim()}, or remove that folder to ` +
      'begin anew.',
  );
}

/**
 * A server that was killed leaves its lock file behind, and PostgreSQL will not start while the
 * process number in it belongs to anything, even to a zombie or to a stranger who got the number
 * since. One that still runs on these files is the rest of an interrupted start: it is already
 * shutting down, and ended if it does not.
 *
 * @param {ClusterHome} home
 * @param {(text: string) => void} note
 */
export async function clearLeftovers(home, note) {
  const data = join(home.path, 'data');
  const lockFile = join(data, 'postmaster.pid');
  const pid = Number((await readFile(lockFile, 'utf8').catch(() => '')).split('\n')[0]);
  if (!(pid > 0)) return;
  const ours = async () =>
    isRunning(pid) && (await readlink(`/proc/${pid}/cwd`).catch(() => '')) === data;
  if (await ours()) note('waiting for the server of an interrupted start to end');
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGQUIT', 'SIGKILL'])) {
    if (!(await ours())) break;
    process.kill(pid, signal);
    for (let tries = 0; tries < 100 && (await ours()); tries += 1) await delay(100);
  }
  await rm(lockFile, { force: true });
}

/**
 * Starts the server and waits for the word "ready" that it writes into its lock file.
 *
 * @param {PostgresPrograms} programs
 * @param {ClusterHome} home
 * @param {number} port
 * @param {boolean} durable
 */
async function launch(programs, home, port, durable) {
  const data = join(home.path, 'data');
  const logFile = join(home.path, 'log');
  const chosen = { ...settings, port, ...(durable ? {} : throwawaySettings) };
  const options = Object.entries(chosen).flatMap(([name, value]) => ['-c', `${name}=${value}`]);

  // Killed children of an earlier server may hold its shared memory for a moment.
  for (let tries = 1; ; tries += 1) {
    const logStart = await stat(logFile).then(
      ({ size }) => size,
      () => 0,
    );
    const log = openSync(logFile, 'a', 0o600);
    const program = startProgram(
      'PostgreSQL',
      [join(programs.bin, 'postgres'), '-D', data, ...options],
      {
        owner: home.owner,
        cwd: '/',
        env: cleanEnvironment,
        stdio: ['ignore', log, log],
        // Fast shutdown: connections are ended, the data is left in order.
        stopSignal: 'SIGINT',
        // Immediate shutdown: the next start repairs what was at work.
        killSignal: 'SIGQUIT',
      },
    );
    closeSync(log);
    const outcome = await Promise.race([
      program.ended.then(() => 'ended'),
      untilReady(join(data, 'postmaster.pid'), program.child.pid ?? 0),
    ]);
    if (outcome === 'ready') return program;
    await program.stop(1);
    const said = (await readFile(logFile, 'utf8').catch(() => '')).slice(logStart);
    if (/still in use/.test(said) && tries < 20) {
      await delay(500);
      continue;
    }
    throw explainFailedStart(home, outcome, said);
  }
}

/** @param {string} lockFile @param {number} pid */
async function untilReady(lockFile, pid) {
  const deadline = Date.now() + startSeconds * 1000;
  while (Date.now() < deadline) {
    const lines = (await readFile(lockFile, 'utf8').catch(() => '')).split('\n');
    if (Number(lines[0]) === pid && lines[7]?.trim() === 'ready') return 'ready';
    await delay(20);
  }
  return 'silent';
}

/** @param {ClusterHome} home @param {string} outcome @param {string} said */
function explainFailedStart(home, outcome, said) {
  if (saysDiskFull(said)) {
    return setupFailure(`PostgreSQL cannot start: the disk with ${home.path} is full.`);
  }
  const grave = said.split('\n').filter((line) => /FATAL|PANIC|HINT|ERROR/.test(line));
  const reason = lastLines(grave.join('\n') || said);
  return setupFailure(
    outcome === 'silent'
      ? `PostgreSQL did not answer within ${startSeconds} s. Its log: ${join(home.path, 'log')}`
      : `PostgreSQL could not be started from ${home.path}.\n${reason}`,
  );
}

/**
 * Starts the server again whenever it ends by itself, on the port that clients know, until
 * `stop` is called. Says so each time; after five failures in a row it gives up.
 *
 * @param {Cluster} cluster
 * @param {(text: string) => void} say
 * @param {(reason: string) => void} giveUp
 */
export function keepClusterRunning(cluster, say, giveUp) {
  let watching = true;
  const watch = async () => {
    while (watching) {
      const how = await cluster.program.ended;
      if (!watching) return;
      say(`The database server ended (${how}); starting it again.`);
      for (let tries = 1; ; tries += 1) {
        try {
          await restartCluster(cluster);
          say('The database server answers again.');
          break;
        } catch (error) {
          if (!watching) return;
          const reason = error instanceof Error ? error.message : String(error);
          if (tries === 5) return giveUp(`The database server stays down. ${reason}`);
          await delay(1000 * tries);
        }
      }
    }
  };
  void watch();
  return {
    stop() {
      watching = false;
    },
  };
}

/** Removes a cluster that is not running. @param {ClusterHome} home */
export async function removeCluster(home) {
  await rm(home.path, { recursive: true, force: true });
}
