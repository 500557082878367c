import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { inCheckout } from './checkout.mjs';
import { runProgram } from './processes.mjs';
import { lastLines } from './setup-failure.mjs';

/**
 * One thing that is built.
 *
 * @typedef {object} BuildTarget
 * @property {string} name
 * @property {string[]} inputs files and folders below the checkout whose change asks for a build
 * @property {string[]} outputs what must exist afterwards, below the checkout
 * @property {() => Promise<void>} build
 */

/** Sources that are not there yet, or not any more, are left out of a build. */
const programs = {
  server: [
    { source: 'server/index.ts', name: 'index' },
    { source: 'server/fakes/main.ts', name: 'fakes' },
    { source: 'server/db/migrate.ts', name: 'migrate' },
    { source: 'server/dev/seed.ts', name: 'seed' },
  ],
  cli: [
    { source: 'server/cli/check.ts', name: 'check' },
    { source: 'server/cli/rules.ts', name: 'rules' },
  ],
};

const meterConfig = 'shared/measure/wasm/asconfig.json';

/** What every target depends on: other packages or another recipe give another result. */
const always = ['package.json', 'package-lock.json', 'server/dev/build-targets.mjs'];

/** In the order in which they need each other. @returns {Promise<BuildTarget[]>} */
export async function listBuildTargets() {
  const targets = [];
  if (existsSync(inCheckout(meterConfig))) targets.push(await meterTarget());
  if (existsSync(inCheckout('src/app/main.tsx'))) targets.push(clientTarget);
  targets.push(programTarget('server', ['server', 'shared'], 'external'));
  targets.push(programTarget('cli', ['server', 'shared'], 'bundled'));
  return targets.filter((target) => target.outputs.length > 0);
}

/** The meters in WebAssembly, one module an entry of the compiler's own configuration. */
async function meterTarget() {
  const config = JSON.parse(await readFile(inCheckout(meterConfig), 'utf8'));
  // The compiler takes paths in its configuration as relative to it.
  const outFile = join(dirname(meterConfig), config.targets.release.outFile);
  return {
    name: 'wasm',
    inputs: [...always, 'shared/measure/wasm'],
    outputs: [outFile],
    async build() {
      const compiler = inCheckout('node_modules/assemblyscript/bin/asc.js');
      const { code, stdout, stderr } = await runProgram(
        [process.execPath, compiler, '--config', meterConfig, '--target', 'release'],
        { cwd: inCheckout() },
      );
      if (code !== 0) {
        throw new Error(`The meters do not compile.\n${lastLines(`${stdout}\n${stderr}`, 20)}`);
      }
    },
  };
}

/** @type {BuildTarget} */
const clientTarget = {
  name: 'client',
  inputs: [...always, 'index.html', 'src', 'shared', 'vite.config.ts', 'tailwind.config.ts'],
  outputs: ['dist/client/index.html'],
  async build() {
    const { build } = await import('vite');
    await build({ root: inCheckout(), logLevel: 'warn' });
  },
};

/**
 * Node programs. The server's keep their packages outside, the command line's bundle them: a
 * program that reads one file starts several times faster than one that looks up a hundred.
 *
 * @param {'server' | 'cli'} name
 * @param {string[]} inputs
 * @param {'external' | 'bundled'} packages
 * @returns {BuildTarget}
 */
function programTarget(name, inputs, packages) {
  const present = programs[name].filter(({ source }) => existsSync(inCheckout(source)));
  return {
    name,
    inputs: [...always, ...inputs],
    outputs: present.map((program) => `dist/${name}/${program.name}.js`),
    async build() {
      const { build } = await import('vite');
      await build({
        root: inCheckout(),
        configFile: false,
        logLevel: 'warn',
        publicDir: false,
        ssr: packages === 'bundled' ? { noExternal: true } : {},
        build: {
          ssr: true,
          outDir: `dist/${name}`,
          emptyOutDir: true,
          target: 'node20',
          sourcemap: true,
          minify: false,
          rolldownOptions: {
            input: Object.fromEntries(
              present.map((program) => [program.name, inCheckout(program.source)]),
            ),
            // Beside each other, so that a path relative to one is the same from any chunk.
            output: { entryFileNames: '[name].js', chunkFileNames: '[name]-[hash].js' },
          },
        },
      });
    },
  };
}
