import { readdir } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { exists, findOnPath } from './debian.mjs';

/** Debian puts each major version's programs in a folder of its own, off the path. */
const debianFolder = '/usr/lib/postgresql';

/**
 * @typedef {{ bin: string, major: number }} PostgresPrograms folder of initdb and postgres
 */

/**
 * The installed PostgreSQL servers, newest first: Debian's, then one on the path.
 *
 * @param {{ folder?: string, path?: string | undefined }} [where]
 * @returns {Promise<PostgresPrograms[]>}
 */
export async function findPostgresPrograms({ folder = debianFolder, path } = {}) {
  const versions = await readdir(folder).catch(() => []);
  /** @type {PostgresPrograms[]} */
  const found = [];
  for (const version of versions.filter((name) => /^\d+$/.test(name))) {
    const bin = join(folder, version, 'bin');
    // The client package makes the same folder without a server in it.
    if ((await exists(join(bin, 'postgres'))) && (await exists(join(bin, 'initdb')))) {
      found.push({ bin, major: Number(version) });
    }
  }
  found.sort((a, b) => b.major - a.major);
  if (found.length > 0) return found;
  const onPath = await findOnPath('initdb', path);
  // An unknown version: initdb and postgres of one folder belong together.
  return onPath === null ? [] : [{ bin: dirname(onPath), major: Number.NaN }];
}

/** @type {import('./debian.mjs').DebianNeed} */
export const postgresNeed = {
  name: 'PostgreSQL',
  package: 'postgresql',
  present: async () => (await findPostgresPrograms()).length > 0,
};
