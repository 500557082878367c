import { randomBytes } from 'node:crypto';
import { chown, mkdir, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { runProgram } from './processes.mjs';
import { lastLines, saysDiskFull, setupFailure } from './setup-failure.mjs';

/**
 * @typedef {import('./cluster-home.mjs').ClusterHome} ClusterHome
 * @typedef {import('./postgres-programs.mjs').PostgresPrograms} PostgresPrograms
 */

/** Room that a new cluster takes with its first write-ahead log, as told when there is none. */
const clusterMegabytes = 60;

/** For PostgreSQL's programs: no setting of the caller's shell reaches them. */
export const cleanEnvironment = { PATH: process.env.PATH, LANG: 'C.UTF-8' };

/**
 * Makes the folder of a cluster: its data, and the password of its superuser. Nothing is left
 * where that fails, and nothing half-made is ever taken for whole.
 *
 * @param {ClusterHome} home
 * @param {PostgresPrograms} programs
 * @param {boolean} durable whether it must survive the machine's stopping
 * @throws SetupFailure with the reason in a sentence
 */
export async function makeCluster(home, programs, durable) {
  const { path, owner } = home;
  const unfinished = join(path, 'data.unfinished');
  const passwordFile = join(path, 'password');
  try {
    await mkdir(path, { recursive: true, mode: 0o700 });
    await rm(unfinished, { recursive: true, force: true });
    await writeFile(passwordFile, `${randomBytes(18).toString('hex')}\n`, { mode: 0o600 });
    if (owner) {
      for (const mine of [path, passwordFile]) await chown(mine, owner.uid, owner.gid);
    }
    const command = [
      join(programs.bin, 'initdb'),
      ...['-D', unfinished, '--username=postgres', `--pwfile=${passwordFile}`],
      ...['--auth=scram-sha-256', '--encoding=UTF8', '--locale=C.UTF-8'],
      ...(durable ? [] : ['--no-sync']),
    ];
    const { code, stdout, stderr } = await runProgram(command, {
      owner,
      cwd: '/',
      env: cleanEnvironment,
    });
    if (code !== 0) throw new Error(lastLines(`${stdout}\n${stderr}`, 8));
    // In place only when whole: a set-up that was cut off begins anew.
    await rename(unfinished, join(path, 'data'));
  } catch (error) {
    await rm(unfinished, { recursive: true, force: true });
    if (saysDiskFull(error)) {
      throw setupFailure(
        `There is no room on the disk for the database in ${path}: a new one takes about ` +
          `${clusterMegabytes} MB.`,
        error,
      );
    }
    const reason = error instanceof Error ? error.message : String(error);
    throw setupFailure(`The database in ${path} could not be made.\n${reason}`, error);
  }
}
