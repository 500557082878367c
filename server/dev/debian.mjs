import { access } from 'node:fs/promises';
import { delimiter, join } from 'node:path';
import { runProgram } from './processes.mjs';
import { lastLines, saysDiskFull, setupFailure } from './setup-failure.mjs';

/**
 * A program or set of files that a Debian package brings.
 * @typedef {{ name: string, package: string, present: () => Promise<boolean> }} DebianNeed
 */

/**
 * What the machine lets us do about missing packages.
 * @typedef {{ hasApt: boolean, isRoot: boolean, hasSudo: boolean }} InstallRights
 */

/** Where a program lies on the path, or null. @param {string} program */
export async function findOnPath(program, path = process.env.PATH ?? '') {
  for (const folder of path.split(delimiter).filter((part) => part !== '')) {
    const file = join(folder, program);
    if (await exists(file)) return file;
  }
  return null;
}

/** @param {string} path */
export async function exists(path) {
  return access(path).then(
    () => true,
    () => false,
  );
}

/**
 * The decision alone: install, by which words in front of the command, or give up with a sentence
 * that says what to run.
 *
 * @param {{ name: string, package: string }[]} missing at least one
 * @param {InstallRights} rights
 * @returns {{ prefix: string[] } | { sentence: string }}
 */
export function planInstall(missing, { hasApt, isRoot, hasSudo }) {
  const names = missing.map((need) => need.name).join(', ');
  const packages = missing.map((need) => need.package).join(' ');
  if (!hasApt) {
    return {
      sentence:
        `Missing here: ${names}. This system has no apt-get, so please install what Debian ` +
        `calls ${packages} and run the command again.`,
    };
  }
  if (isRoot) return { prefix: [] };
  if (hasSudo) return { prefix: ['sudo', '-n'] };
  return {
    sentence:
      `Missing here: ${names}, which only root can install. Please run ` +
      `"sudo apt-get install -y ${packages}" once and then this command again.`,
  };
}

/** @returns {Promise<InstallRights>} */
async function readInstallRights() {
  const isRoot = process.getuid?.() === 0;
  return {
    hasApt: (await findOnPath('apt-get')) !== null,
    isRoot,
    hasSudo: !isRoot && (await runProgram(['sudo', '-n', 'true'])).code === 0,
  };
}

// Debian's server package would make and start a cluster of its own on the usual port. Its
// switch for that is turned off while we install and put back afterwards.
const installScript = `
set -e
export DEBIAN_FRONTEND=noninteractive
get() { apt-get -o DPkg::Lock::Timeout=300 -o Dpkg::Options::=--force-confold "$@"; }
get update
case " $* " in
  *" postgresql "*)
    get install -y --no-install-recommends postgresql-common
    switches=/etc/postgresql-common/createcluster.conf
    cp -p "$switches" "$switches.kept"
    trap 'mv "$switches.kept" "$switches"' EXIT
    echo 'create_main_cluster = false' >> "$switches"
    ;;
esac
get install -y --no-install-recommends "$@"
`;

/**
 * Installs the Debian packages of everything that is missing, as root or through sudo.
 *
 * @param {DebianNeed[]} needs
 * @param {(note: string) => void} note
 */
export async function ensureDebianPackages(needs, note) {
  const missing = await findMissing(needs);
  if (missing.length === 0) return;
  const plan = planInstall(missing, await readInstallRights());
  if ('sentence' in plan) throw setupFailure(plan.sentence);

  const packages = missing.map((need) => need.package);
  note(`installing Debian's ${packages.join(', ')}`);
  const command = [...plan.prefix, 'sh', '-c', installScript, 'install', ...packages];
  const { code, stdout, stderr } = await runProgram(command, { outlivesParent: true });
  if (code !== 0) {
    const said = lastLines(`${stdout}\n${stderr}`, 6);
    if (saysDiskFull(said)) {
      throw setupFailure(`There is no room on the disk to install ${packages.join(', ')}.`);
    }
    throw setupFailure(`Debian's ${packages.join(', ')} could not be installed.\n${said}`);
  }
  const still = await findMissing(missing);
  if (still.length > 0) {
    const names = still.map((need) => need.name).join(', ');
    throw setupFailure(
      `${names} cannot be found although apt-get installed ${packages.join(', ')}.`,
    );
  }
}

/** @param {DebianNeed[]} needs */
async function findMissing(needs) {
  const present = await Promise.all(needs.map((need) => need.present()));
  return needs.filter((_, index) => !present[index]);
}
