import { closeSync, mkdirSync, openSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { setTimeout as delay } from 'node:timers/promises';
import { inCheckout } from './checkout.mjs';
import { loopback } from './ports.mjs';
import { runProgram, startProgram } from './processes.mjs';
import { lastLines, setupFailure } from './setup-failure.mjs';

/**
 * The application's own programs, as the two commands and the browser tests start them.
 *
 * @typedef {'built' | 'source'} CodeForm what runs: the files in dist, or the sources directly
 * @typedef {import('./processes.mjs').RunningProgram} RunningProgram
 * @typedef {{ who: string, email: string, password: string }} SignIn
 */

/** A server that is not ready by then has something to say in its log. */
const readySeconds = 30;

const sources = {
  index: 'server/index.ts',
  fakes: 'server/fakes/main.ts',
  migrate: 'server/db/migrate.ts',
  seed: 'server/dev/seed.ts',
};

/** @param {keyof typeof sources} program @param {CodeForm} form */
function nodeCommand(program, form) {
  return form === 'built'
    ? [process.execPath, '--enable-source-maps', inCheckout('dist', 'server', `${program}.js`)]
    : [process.execPath, '--import', 'tsx', inCheckout(sources[program])];
}

/**
 * Brings a database to the newest schema.
 *
 * @param {string} databaseUrl
 * @param {CodeForm} form
 */
export async function migrate(databaseUrl, form) {
  await runOnce('migrate', databaseUrl, form, 'The migrations could not be applied.');
}

/**
 * Puts the reference scenario into the database unless it is there already.
 *
 * @param {string} databaseUrl
 * @param {CodeForm} form
 * @returns {Promise<SignIn[]>}
 */
export async function seed(databaseUrl, form) {
  const stdout = await runOnce('seed', databaseUrl, form, 'The demo data could not be stored.');
  return JSON.parse(stdout);
}

/**
 * @param {'migrate' | 'seed'} program
 * @param {string} databaseUrl
 * @param {CodeForm} form
 * @param {string} sentence
 */
async function runOnce(program, databaseUrl, form, sentence) {
  const { code, stdout, stderr } = await runProgram(nodeCommand(program, form), {
    cwd: inCheckout(),
    env: { ...process.env, DATABASE_URL: databaseUrl },
  });
  if (code !== 0) throw setupFailure(`${sentence}\n${lastLines(stderr || stdout, 15)}`);
  return stdout;
}

/**
 * Opens a program's log for one run. The earlier run's is overwritten.
 *
 * @param {string} folder
 * @param {string} name
 */
function openLog(folder, name) {
  mkdirSync(folder, { recursive: true });
  return openSync(join(folder, `${name}.log`), 'w');
}

/**
 * Starts the local stand-ins for outside services and waits until they listen.
 *
 * @param {object} options
 * @param {CodeForm} options.form
 * @param {number} options.smtpPort takes the mail that the server sends
 * @param {number} options.mailPagePort shows it in a browser
 * @param {string} options.logFolder
 * @returns {Promise<RunningProgram>}
 */
export async function startFakes({ form, smtpPort, mailPagePort, logFolder }) {
  const log = openLog(logFolder, 'fakes');
  const program = startProgram('mail catcher', nodeCommand('fakes', form), {
    cwd: inCheckout(),
    env: {
      ...process.env,
      SMTP_PORT: String(smtpPort),
      MAIL_PAGE_PORT: String(mailPagePort),
    },
    stdio: ['ignore', 'pipe', log],
  });
  closeSync(log);
  const output = program.child.stdout;
  if (!output) throw new Error('The mail catcher was started without its output.');
  const ready = new Promise((/** @type {(word: string) => void} */ resolve) => {
    createInterface({ input: output }).on('line', (line) => {
      if (line.includes('"ready":true')) resolve('ready');
    });
  });
  const outcome = await Promise.race([ready, program.ended, delay(readySeconds * 1000)]);
  if (outcome === 'ready') return program;
  await program.stop(1);
  const said = await readFile(join(logFolder, 'fakes.log'), 'utf8');
  throw setupFailure(`The local mail catcher could not be started.\n${lastLines(said, 8)}`);
}

/**
 * Starts the server and waits until it can do its work.
 *
 * @param {object} options
 * @param {CodeForm} options.form
 * @param {number} options.port on 127.0.0.1
 * @param {string} options.publicOrigin what people's browsers see, for example http://127.0.0.1:5180
 * @param {string} options.databaseUrl
 * @param {number} options.smtpPort
 * @param {string} options.logFolder
 * @param {NodeJS.WritableStream} [options.output] takes the log instead of a file
 * @param {'production' | 'development'} [options.nodeEnv]
 * @returns {Promise<RunningProgram>}
 */
export async function startServer(options) {
  const { form, port, publicOrigin, databaseUrl, smtpPort, logFolder, output } = options;
  const command =
    form === 'built'
      ? nodeCommand('index', form)
      : [
          process.execPath,
          inCheckout('node_modules/tsx/dist/cli.mjs'),
          ...['watch', '--clear-screen=false', inCheckout(sources.index)],
        ];
  const log = output ? 'pipe' : openLog(logFolder, 'server');
  const program = startProgram('server', command, {
    cwd: inCheckout(),
    env: {
      ...process.env,
      NODE_ENV: options.nodeEnv ?? 'production',
      HOST: loopback,
      PORT: String(port),
      APP_ORIGIN: publicOrigin,
      DATABASE_URL: databaseUrl,
      SMTP_URL: `smtp://${loopback}:${smtpPort}`,
      CLIENT_DIR: form === 'built' ? inCheckout('dist/client') : '',
    },
    stdio: ['ignore', log, log],
  });
  if (typeof log === 'number') closeSync(log);
  if (output) {
    program.child.stdout?.pipe(output, { end: false });
    program.child.stderr?.pipe(output, { end: false });
  }
  const outcome = await Promise.race([untilAnswering(port), program.ended]);
  if (outcome === 'ready') return program;
  await program.stop(2);
  const said = await readFile(join(logFolder, 'server.log'), 'utf8').catch(() => '');
  throw setupFailure(
    outcome === 'silent'
      ? `The server was not ready within ${readySeconds} s.\n${lastLines(said, 8)}`
      : `The server ended while starting (${outcome}).\n${lastLines(said, 8)}`,
  );
}

/**
 * Starts Vite's development server, whose page talks to a running server.
 *
 * @param {{ port: number, serverPort: number }} ports
 * @returns {Promise<RunningProgram>}
 */
export async function startClientDevServer({ port, serverPort }) {
  const command = [inCheckout('server/dev/client-dev-server.mjs'), `${port}`, `${serverPort}`];
  const program = startProgram('client', [process.execPath, ...command], {
    cwd: inCheckout(),
    env: { ...process.env, NODE_ENV: 'development' },
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  const outcome = await Promise.race([untilAnswering(port), program.ended]);
  if (outcome === 'ready') return program;
  await program.stop(2);
  throw setupFailure('The development server of the client could not be started.');
}

/**
 * Asks a server on loopback until it says that it can work.
 *
 * @param {number} port
 */
async function untilAnswering(port) {
  const deadline = Date.now() + readySeconds * 1000;
  while (Date.now() < deadline) {
    const answer = await fetch(`http://${loopback}:${port}/readyz`, {
      signal: AbortSignal.timeout(3000),
    }).catch(() => null);
    if (answer?.ok) return 'ready';
    await delay(50);
  }
  return 'silent';
}
