import { rm } from 'node:fs/promises';
import { parseArgs, stripVTControlCharacters } from 'node:util';
import { listBuildTargets } from './build-targets.mjs';
import { checkout, inCheckout } from './checkout.mjs';
import { createProgress } from './progress.mjs';
import { describeFailure, saysDiskFull, setupFailure } from './setup-failure.mjs';
import { oneAtATime } from './single-use.mjs';
import { hashInputs, isUpToDate, writeStamp } from './stamps.mjs';

/** @typedef {import('./build-targets.mjs').BuildTarget} BuildTarget */

/** Compiled output beside its source: an output, not an input. @param {string} path */
function isOutput(path) {
  return /(^|\/)(build|node_modules)$/.test(path);
}

/** @param {BuildTarget} target */
async function stateOf(target) {
  const stamp = inCheckout('dist', '.inputs', target.name);
  const inputs = await hashInputs(checkout, target.inputs, isOutput);
  const outputs = target.outputs.map((output) => inCheckout(output));
  return { stamp, inputs, upToDate: await isUpToDate(stamp, inputs, outputs) };
}

/**
 * Names of the targets whose inputs changed since they were built.
 *
 * @param {string[]} [names] only these targets
 */
export async function findOutdated(names) {
  const outdated = [];
  for (const target of await listBuildTargets()) {
    if (names && !names.includes(target.name)) continue;
    if (!(await stateOf(target)).upToDate) outdated.push(target.name);
  }
  return outdated;
}

/**
 * Builds what changed. Several processes may ask at once; they take turns.
 *
 * @param {object} options
 * @param {string[] | undefined} [options.names] only these targets
 * @param {boolean} [options.force] build them even if nothing changed
 * @param {import('./progress.mjs').Progress} options.progress
 */
async function buildTargets({ names, force = false, progress }) {
  // Other libraries ask for it too, and only "production" leaves development code out.
  process.env.NODE_ENV = 'production';
  await oneAtATime('build', async () => {
    for (const target of await listBuildTargets()) {
      if (names && !names.includes(target.name)) continue;
      await progress.step(`Build ${target.name}`, async (_note, close) => {
        const { stamp, inputs, upToDate } = await stateOf(target);
        if (upToDate && !force) {
          close('up to date');
          return;
        }
        await rm(stamp, { force: true });
        await target.build().catch((error) => {
          if (saysDiskFull(error)) throw setupFailure('The disk is too full to build.', error);
          // The compilers' own messages point into the source; a stack of theirs adds nothing.
          const said = stripVTControlCharacters(error instanceof Error ? error.message : '');
          throw setupFailure(`The ${target.name} part does not build.\n${said}`, error);
        });
        await writeStamp(stamp, inputs);
        close('built');
      });
    }
  });
}

const usage = `Usage: node server/dev/build.mjs [--force] [--quiet] [target ...]
Builds the named targets, or all, where their sources changed: wasm, client, server, cli.
`;

if (process.argv[1] === inCheckout('server/dev/build.mjs')) {
  try {
    const { values, positionals } = parseArgs({
      allowPositionals: true,
      options: {
        force: { type: 'boolean' },
        quiet: { type: 'boolean' },
        help: { type: 'boolean' },
      },
    });
    if (values.help) {
      process.stdout.write(usage);
    } else {
      const progress = createProgress(values.quiet ? { write: () => {} } : process.stdout);
      const names = positionals.length > 0 ? positionals : undefined;
      await buildTargets({ names, force: values.force ?? false, progress });
    }
  } catch (error) {
    console.error(describeFailure(error));
    process.exitCode = 1;
  }
}
