import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { prepareTests } from './prepare-tests.mjs';
import { stopAllPrograms, whenNpmDies } from './processes.mjs';
import { createProgress } from './progress.mjs';
import { describeFailure, setupFailure } from './setup-failure.mjs';
import { testSteps } from './test-steps.mjs';

/**
 * `npm test`: installs what the tests need, then runs every step, going on after a failure, and
 * closes with one line of counts. `--only unit,api` runs some of the steps; what follows `--` is
 * handed to their runner.
 *
 * @typedef {import('./test-steps.mjs').TestStep} TestStep
 */

const progress = createProgress(process.stdout);

/** @param {string | undefined} only @returns {TestStep[]} */
function chooseSteps(only) {
  if (only === undefined) return testSteps;
  return only.split(',').map((name) => {
    const step = testSteps.find((candidate) => candidate.name === name);
    if (step) return step;
    const names = testSteps.map((candidate) => candidate.name).join(', ');
    throw setupFailure(`There is no test step "${name}". There are: ${names}.`);
  });
}

/** @param {TestStep[]} steps @param {string[]} args */
async function runSteps(steps, args) {
  const built = await prepareTests({
    builds: [...new Set(steps.flatMap((step) => step.builds))],
    needsTools: steps.some((step) => step.needsTools),
    progress,
  });
  // The steps say themselves what does not work without it.
  if (!built) progress.say('A build failed; the tests go on without it.');
  const total = { passed: 0, failed: built ? 0 : 1, skipped: 0 };
  const lines = [];
  for (const step of steps) {
    progress.say(`\n== ${step.heading}`);
    const start = performance.now();
    const counts = await step.run(args);
    const seconds = ((performance.now() - start) / 1000).toFixed(1);
    total.passed += counts.passed;
    total.failed += counts.failed;
    total.skipped += counts.skipped;
    const verdict = counts.failed > 0 ? `FAILED (${counts.failed})` : 'passed';
    const tests = counts.passed > 0 ? `, ${counts.passed} tests` : '';
    const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : '';
    lines.push(`  ${step.heading.padEnd(14)} ${verdict}${tests}${skipped}, ${seconds} s`);
    progress.say(`${lines.at(-1)}`);
  }
  progress.say(`\n== Summary\n${lines.join('\n')}\n`);
  progress.say(`${total.passed} passed, ${total.failed} failed`);
  return total.failed === 0 ? 0 : 1;
}

let ending = false;

/** @param {number} exitCode */
async function end(exitCode) {
  if (ending) return;
  ending = true;
  await stopAllPrograms();
  process.exit(exitCode);
}

for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
  process.on(signal, () => void end(130));
}
whenNpmDies(() => void end(1));
process.stdout.on('error', () => {});

try {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: { only: { type: 'string' } },
  });
  const exitCode = await runSteps(chooseSteps(values.only), positionals);
  await end(exitCode);
} catch (error) {
  if (!ending) console.error(describeFailure(error));
  await end(1);
}
