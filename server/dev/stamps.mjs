import { createHash } from 'node:crypto';
import { mkdir, readFile, readdir, stat, writeFile } from 'node:fs/promises';
import { dirname, join, relative } from 'node:path';
import { exists } from './debian.mjs';
import { errorCode } from './setup-failure.mjs';

/**
 * What is derived from files is made again when their content changed. Times are not looked at:
 * switching branches and copying a checkout change them for nothing.
 */

/**
 * A hash over the names and contents of files and of all files in folders. A path that does not
 * exist counts as empty, so that its appearance is a change.
 *
 * @param {string} base
 * @param {string[]} paths below base
 * @param {(path: string) => boolean} [ignored] told each path below base
 * @returns {Promise<string>} hexadecimal digits
 */
export async function hashInputs(base, paths, ignored = () => false) {
  const files = [];
  for (const path of paths) files.push(...(await listFiles(base, path, ignored)));
  const hash = createHash('sha256');
  for (const file of [...new Set(files)].sort()) {
    const content = createHash('sha256').update(await readFile(join(base, file)));
    hash.update(`${file}\0${content.digest('hex')}\n`);
  }
  return hash.digest('hex');
}

/**
 * @param {string} base
 * @param {string} path
 * @param {(path: string) => boolean} ignored
 * @returns {Promise<string[]>}
 */
async function listFiles(base, path, ignored) {
  if (ignored(path)) return [];
  const whole = join(base, path);
  try {
    if (!(await stat(whole)).isDirectory()) return [path];
  } catch (error) {
    if (errorCode(error) === 'ENOENT') return [];
    throw error;
  }
  const names = await readdir(whole);
  const lists = await Promise.all(
    names.map((name) => listFiles(base, relative(base, join(whole, name)), ignored)),
  );
  return lists.flat();
}

/**
 * Whether a stamp says that this was made from these inputs and the outputs still exist.
 *
 * @param {string} stamp
 * @param {string} inputs
 * @param {string[]} outputs
 */
export async function isUpToDate(stamp, inputs, outputs) {
  const made = await readFile(stamp, 'utf8').catch(() => '');
  if (made !== inputs) return false;
  const there = await Promise.all(outputs.map(exists));
  return there.every(Boolean);
}

/** @param {string} stamp @param {string} inputs */
export async function writeStamp(stamp, inputs) {
  await mkdir(dirname(stamp), { recursive: true });
  await writeFile(stamp, inputs);
}
