import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { checkout, inCheckout } from './checkout.mjs';
import { runProgram } from './processes.mjs';
import { errorCode, lastLines, saysDiskFull, setupFailure } from './setup-failure.mjs';

/**
 * One entry of a lock file, as far as it is looked at here.
 * @typedef {{ version?: string, integrity?: string, link?: boolean, optional?: boolean,
 *   devOptional?: boolean, peer?: boolean }} LockEntry
 */

/**
 * Whether the installed packages are those of the lock file. npm writes down what it installed in
 * node_modules/.package-lock.json when an installation is complete, so a half-made one has none.
 *
 * @param {Record<string, LockEntry>} wanted `packages` of package-lock.json
 * @param {Record<string, LockEntry>} installed `packages` of the hidden lock file
 */
export function packagesAgree(wanted, installed) {
  for (const [path, entry] of Object.entries(wanted)) {
    if (path === '') continue;
    const there = installed[path];
    // Packages for other systems are listed and not installed.
    if (!there && (entry.optional || entry.devOptional || entry.peer)) continue;
    if (there?.version !== entry.version || there?.integrity !== entry.integrity) return false;
  }
  // One that is left over could be found instead of the right one.
  return Object.keys(installed).every((path) => path in wanted);
}

/** @param {string} path @returns {Promise<Record<string, LockEntry> | null>} */
async function readLock(path) {
  try {
    return JSON.parse(await readFile(path, 'utf8')).packages ?? {};
  } catch (error) {
    if (errorCode(error) === 'ENOENT' || error instanceof SyntaxError) return null;
    throw error;
  }
}

/** Whether node_modules holds what package-lock.json asks for. @param {string} [folder] */
export async function packagesAreInstalled(folder = checkout) {
  const wanted = await readLock(join(folder, 'package-lock.json'));
  const installed = await readLock(join(folder, 'node_modules', '.package-lock.json'));
  return wanted !== null && installed !== null && packagesAgree(wanted, installed);
}

/** Installs the packages of the lock file where they are missing or others. */
export async function installPackages(
  /** @type {(note: string) => void} */ note,
  /** @type {(text: string) => void} */ close,
) {
  if (await packagesAreInstalled()) {
    close('as in package-lock.json');
    return;
  }
  note('installing from package-lock.json, a minute or so');
  // The npm that runs us, else the one on the path.
  const npm = process.env.npm_execpath?.endsWith('.js')
    ? [process.execPath, process.env.npm_execpath]
    : ['npm'];
  const command = [...npm, 'ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  const { code, stdout, stderr } = await runProgram(command, { cwd: inCheckout() });
  if (code === 0) return;
  const said = lastLines(`${stdout}\n${stderr}`, 12);
  if (saysDiskFull(said)) {
    throw setupFailure('There is no room on the disk for the packages (about 600 MB).');
  }
  throw setupFailure(`The packages could not be installed: npm ci ended with this.\n${said}`);
}
