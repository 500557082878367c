import { inCheckout } from './checkout.mjs';
import { ensureDebianPackages } from './debian.mjs';
import { installPackages } from './packages.mjs';
import { postgresNeed } from './postgres-programs.mjs';
import { runProgram } from './processes.mjs';
import { testTools } from './test-tools.mjs';

/**
 * Installs and builds what tests and benchmarks need, on a bare machine too.
 *
 * @param {object} options
 * @param {string[]} options.builds names of targets
 * @param {boolean} options.needsTools PostgreSQL and the programs tests compare with
 * @param {import('./progress.mjs').Progress} options.progress
 * @returns {Promise<boolean>} false where something does not build; its messages were shown
 */
export async function prepareTests({ builds, needsTools, progress }) {
  await progress.step('Packages', installPackages);
  if (needsTools) {
    await progress.step('Programs', (note) =>
      ensureDebianPackages([postgresNeed, ...testTools], note),
    );
  }
  if (builds.length === 0) return true;
  const command = [process.execPath, inCheckout('server/dev/build.mjs'), ...builds];
  const { code } = await runProgram(command, { cwd: inCheckout(), shown: true });
  return code === 0;
}
