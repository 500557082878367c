import { spawnSync } from 'node:child_process';
import { readdir } from 'node:fs/promises';
import { inCheckout } from './checkout.mjs';
import { prepareTests } from './prepare-tests.mjs';
import { createProgress } from './progress.mjs';
import { describeFailure, setupFailure } from './setup-failure.mjs';

/** Runs a benchmark, of the check if none is named: npm run bench -- [name] [arguments]. */

const folder = inCheckout('tests', 'bench');
const [, , name = 'check', ...args] = process.argv;
const nameOf = (/** @type {string} */ file) => file.replace(/\.bench\.\w+$/, '');

/** @param {string} file */
async function runBenchmark(file) {
  const built = await prepareTests({
    builds: ['wasm', 'client', 'server', 'cli'],
    needsTools: true,
    progress: createProgress(process.stderr),
  });
  if (!built) throw setupFailure('Benchmarks run what is built, and it does not build.');
  const command = ['--import', 'tsx', `${folder}/${file}`, ...args];
  const { status } = spawnSync(process.execPath, command, { stdio: 'inherit', cwd: inCheckout() });
  return status ?? 1;
}

try {
  const files = (await readdir(folder)).filter((file) => /\.bench\.(ts|mjs)$/.test(file));
  const file = files.find((candidate) => nameOf(candidate) === name);
  if (file) {
    process.exitCode = await runBenchmark(file);
  } else {
    const names = files.map((candidate) => `  ${nameOf(candidate)}`).sort();
    console.log(`Usage: npm run bench -- name [arguments]\n${names.join('\n')}`);
    process.exitCode = 1;
  }
} catch (error) {
  console.error(describeFailure(error));
  process.exitCode = 1;
}
