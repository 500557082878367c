import { mkdir, stat } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { checkout, hashOfPlace } from './checkout.mjs';
import { runProgram } from './processes.mjs';
import { setupFailure } from './setup-failure.mjs';

/**
 * Where a cluster lives and who runs it. PostgreSQL refuses to run as root, so root hands it to
 * the system user that comes with Debian's package.
 *
 * @typedef {import('./processes.mjs').Owner} Owner
 * @typedef {{ path: string, owner: Owner | null }} ClusterHome owner null: the user we are
 */

/** Where clusters go that cannot live in the checkout. */
const systemFolder = '/var/lib/flightcase';

/** @param {string} path */
async function ownerOf(path) {
  return stat(path).then(
    ({ uid, gid }) => ({ uid, gid, name: `user ${uid}` }),
    () => null,
  );
}

/** @returns {Promise<Owner>} */
async function systemUser() {
  const uid = await runProgram(['id', '-u', 'postgres']);
  const gid = await runProgram(['id', '-g', 'postgres']);
  if (uid.code === 0 && gid.code === 0) {
    return { uid: Number(uid.stdout), gid: Number(gid.stdout), name: 'postgres' };
  }
  throw setupFailure(
    'PostgreSQL does not run as root and there is no user "postgres" to run it as. Please make ' +
      'that user or run this command as an ordinary user.',
  );
}

/**
 * Whether a user can reach a folder: every folder above it must let them through.
 *
 * @param {Owner} owner
 * @param {string} folder
 */
async function canReach(owner, folder) {
  const command = ['sh', '-c', 'cd "$1"', 'reach', folder];
  return (await runProgram(command, { owner })).code === 0;
}

/**
 * Chooses the folder of a cluster: in the checkout's .data folder, or, where the server's user
 * cannot get there (a checkout in root's home), in a system folder named after the checkout, so
 * that the next start finds it again. Creates the folder above it.
 *
 * @param {string} name
 * @param {{ folder?: string, elsewhere?: string }} [places]
 * @returns {Promise<ClusterHome>}
 */
export async function chooseClusterHome(
  name,
  { folder = checkout, elsewhere = systemFolder } = {},
) {
  const near = join(folder, '.data', name);
  await mkdir(dirname(near), { recursive: true });
  const nearOwner = await ownerOf(near);
  if (process.getuid?.() !== 0) {
    if (nearOwner && nearOwner.uid !== process.getuid?.()) {
      throw setupFailure(
        `The database in ${near} belongs to another user, probably because root ran this before. ` +
          'Please run it as root again, or have root remove that folder to begin anew.',
      );
    }
    return { path: near, owner: null };
  }

  // A cluster that an ordinary user began stays theirs.
  const owner = nearOwner && nearOwner.uid !== 0 ? nearOwner : await systemUser();
  const far = join(elsewhere, `${basename(folder)}-${hashOfPlace(folder)}`, name);
  const farExists = (await ownerOf(far)) !== null;
  const reachable = await canReach(owner, dirname(near));
  if (reachable && (nearOwner || !farExists)) return { path: near, owner };
  await mkdir(dirname(far), { recursive: true });
  return { path: far, owner: farExists ? ((await ownerOf(far)) ?? owner) : await systemUser() };
}
