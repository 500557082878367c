import { spawnSync } from 'node:child_process';
import { pathToFileURL } from 'node:url';
import { findOutdated } from './build.mjs';
import { inCheckout } from './checkout.mjs';
import { installPackages } from './packages.mjs';
import { describeFailure, setupFailure } from './setup-failure.mjs';

/**
 * Runs one of the product's command-line programs from its build, which is renewed first when
 * its sources changed. What is printed on the way goes to standard error: standard output is the
 * program's own.
 */

const programs = ['check', 'rules'];

/** @param {string} program */
async function prepare(program) {
  if (!programs.includes(program)) {
    throw setupFailure(`Usage: node server/dev/cli.mjs ${programs.join('|')} [arguments]`);
  }
  if ((await findOutdated(['wasm', 'cli'])).length === 0) return;
  const say = (/** @type {string} */ text) => console.error(`flightcase: ${text}`);
  await installPackages(say, () => {});
  const build = inCheckout('server/dev/build.mjs');
  const { status } = spawnSync(process.execPath, [build, '--quiet', 'wasm', 'cli'], {
    stdio: ['ignore', 2, 2],
  });
  if (status !== 0) throw setupFailure('The command line could not be built.');
}

const [, , program = '', ...args] = process.argv;
try {
  await prepare(program);
  // npm runs scripts in the checkout; paths mean what they mean where the person stands.
  if (process.env.INIT_CWD) process.chdir(process.env.INIT_CWD);
  const file = inCheckout('dist', 'cli', `${program}.js`);
  process.argv = [process.execPath, file, ...args];
  await import(pathToFileURL(file).href);
} catch (error) {
  console.error(describeFailure(error));
  process.exitCode = 2;
}
