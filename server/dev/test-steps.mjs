import { mkdir, readFile, rm } from 'node:fs/promises';
import { inCheckout } from './checkout.mjs';
import { runProgram } from './processes.mjs';
import { countPlaywright, countVitest, settleCounts } from './test-counts.mjs';

/** @typedef {import('./test-counts.mjs').TestCounts} TestCounts */

/**
 * One part of the test run. `run` shows its output as it comes.
 *
 * @typedef {object} TestStep
 * @property {string} name as `--only` and the scripts call it
 * @property {string} heading
 * @property {string[]} builds targets it needs
 * @property {boolean} needsTools whether it needs PostgreSQL and the programs tests compare with
 * @property {(args: string[]) => Promise<TestCounts>} run
 */

/** @type {TestStep[]} */
export const testSteps = [
  {
    name: 'lint',
    heading: 'Lint',
    builds: [],
    needsTools: false,
    run: (args) =>
      runChecks([
        ['eslint/bin/eslint.js', '.', '--max-warnings', '0', ...args],
        ['prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.'],
      ]),
  },
  {
    name: 'typecheck',
    heading: 'Type check',
    builds: ['wasm'],
    needsTools: false,
    run: (args) => runChecks([['typescript/bin/tsc', '-b', ...args]]),
  },
  {
    name: 'unit',
    heading: 'Unit tests',
    builds: ['wasm'],
    needsTools: true,
    run: (args) => runVitest('unit', ['shared', 'contracts', 'client'], args),
  },
  {
    name: 'api',
    heading: 'API tests',
    builds: ['wasm', 'cli'],
    needsTools: true,
    run: (args) => runVitest('api', ['server'], args),
  },
  {
    name: 'browser',
    heading: 'Browser tests',
    builds: ['wasm', 'client', 'server', 'cli'],
    needsTools: true,
    run: runPlaywright,
  },
];

/** @param {string[]} command a file in node_modules and its arguments @param {NodeJS.ProcessEnv} [env] */
async function runNode([file = '', ...args], env) {
  const command = [process.execPath, inCheckout('node_modules', file), ...args];
  const { code } = await runProgram(command, {
    cwd: inCheckout(),
    shown: true,
    env: { ...process.env, ...env },
  });
  return code;
}

/**
 * Programs that pass or fail as a whole. All of them run; a failure counts once.
 *
 * @param {string[][]} commands
 */
async function runChecks(commands) {
  let worst = 0;
  for (const command of commands) worst = Math.max(worst, await runNode(command));
  return settleCounts(null, worst);
}

/** @param {string} name @param {string[]} projects @param {string[]} args */
async function runVitest(name, projects, args) {
  const report = await freshReport(name);
  const code = await runNode([
    ...['vitest/vitest.mjs', 'run', ...projects.flatMap((project) => ['--project', project])],
    ...['--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...args],
  ]);
  return settleCounts(await readReport(report, countVitest), code);
}

/** @param {string[]} args */
async function runPlaywright(args) {
  const report = await freshReport('browser');
  const env = { FLIGHTCASE_TEST_REPORT: report };
  const code = await runNode(['@playwright/test/cli.js', 'test', ...args], env);
  return settleCounts(await readReport(report, countPlaywright), code);
}

/** @param {string} name */
async function freshReport(name) {
  const folder = inCheckout('.cache', 'test-reports');
  await mkdir(folder, { recursive: true });
  const report = `${folder}/${name}.json`;
  await rm(report, { force: true });
  return report;
}

/**
 * @template Report
 * @param {string} file
 * @param {(report: Report) => TestCounts} count
 */
async function readReport(file, count) {
  const text = await readFile(file, 'utf8').catch(() => null);
  return text === null ? null : count(JSON.parse(text));
}
