import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { migrate, seed, startClientDevServer, startFakes, startServer } from './application.mjs';
import { findOutdated } from './build.mjs';
import { inCheckout } from './checkout.mjs';
import { chooseClusterHome } from './cluster-home.mjs';
import { checkForeignDatabase, ensureDatabase } from './databases.mjs';
import { ensureDebianPackages } from './debian.mjs';
import { installPackages } from './packages.mjs';
import { firstFreePort, freePort, isPortFree, loopback } from './ports.mjs';
import { keepClusterRunning, startCluster } from './postgres.mjs';
import { postgresNeed } from './postgres-programs.mjs';
import { killAllPrograms, runProgram, stopAllPrograms, whenNpmDies } from './processes.mjs';
import { createProgress } from './progress.mjs';
import { describeFailure, lastLines, setupFailure } from './setup-failure.mjs';
import { askHolder, claim } from './single-use.mjs';

/**
 * `npm start` and `npm run dev`: from a fresh clone to a page in the browser, and everything
 * gone again on Ctrl-C or however this process ends. (The scripts in package.json say `exec`, so
 * that npm's signals reach this process instead of a shell that would die without passing them on.)
 */

const usualPort = 5180;
const logFolder = inCheckout('.data', 'log');
const progress = createProgress(process.stdout);

const usage = `Usage: npm start [-- --port 5180]
       npm run dev [-- --port 5180]
Environment: PORT, and DATABASE_URL to use a PostgreSQL that runs already.
`;

/** @param {string | undefined} asked */
async function choosePort(asked) {
  if (asked === undefined) {
    const port = await firstFreePort(usualPort);
    if (port !== usualPort) progress.say(`Port ${usualPort} is taken, so this uses ${port}.`);
    return port;
  }
  const port = Number(asked);
  if (!Number.isInteger(port) || port < 1 || port > 65535) {
    throw setupFailure(`"${asked}" is not a port: it must be a number from 1 to 65535.`);
  }
  if (await isPortFree(port)) return port;
  throw setupFailure(
    `Port ${port} is taken or not allowed. Please name another one, or none to let this ` +
      'command choose.',
  );
}

/** Refuses to run twice in one checkout: two would share one database folder and one build. */
async function claimCheckout() {
  const held = await claim('start');
  if (held) return held;
  const address = await askHolder('start');
  throw setupFailure(
    address
      ? `Flightcase already runs from this folder: ${address} (stop it there with Ctrl-C first).`
      : 'Another start is being set up in this folder. Please wait for it or stop it first.',
  );
}

/** @type {{ stop(): void } | undefined} */
let keeper;

/** @returns {Promise<string>} address of the application's database */
async function provideDatabase() {
  const given = process.env.DATABASE_URL;
  if (given) {
    await progress.step('Database', async (_note, close) => {
      await checkForeignDatabase(given);
      close('the one DATABASE_URL names');
    });
    return given;
  }
  return progress.step('PostgreSQL', async (note) => {
    await ensureDebianPackages([postgresNeed], note);
    const home = await chooseClusterHome('postgres');
    const cluster = await startCluster(home, { note });
    keeper = keepClusterRunning(cluster, progress.say, (reason) => void end(reason, 1));
    return ensureDatabase(cluster, 'flightcase');
  });
}

/** Builds in a process of its own: the compilers' memory is given back, Ctrl-C ends them. */
async function build(/** @type {string[]} */ names) {
  await progress.step('Build', async (note, close) => {
    const outdated = await findOutdated(names);
    if (outdated.length === 0) {
      close('up to date');
      return;
    }
    note(outdated.join(', '));
    const command = [process.execPath, inCheckout('server/dev/build.mjs'), '--quiet', ...names];
    const { code, stdout, stderr } = await runProgram(command, { cwd: inCheckout() });
    if (code !== 0) throw setupFailure(lastLines(`${stdout}\n${stderr}`, 40));
  });
}

/** @param {{ dev: boolean, port: string | undefined }} options */
async function start({ dev, port: askedPort }) {
  const begun = performance.now();
  const held = await claimCheckout();
  const port = await choosePort(askedPort ?? process.env.PORT);
  /** @type {import('./application.mjs').CodeForm} */
  const form = dev ? 'source' : 'built';
  await progress.step('Packages', installPackages);
  const databaseUrl = await provideDatabase();
  await build(dev ? ['wasm'] : ['wasm', 'client', 'server', 'cli']);
  await progress.step('Migrations', () => migrate(databaseUrl, form));
  const signIns = await progress.step('Demo data', () => seed(databaseUrl, form));

  const origin = `http://${loopback}:${port}`;
  const mailPagePort = await firstFreePort(port + 1);
  const smtpPort = await freePort();
  const common = { form, publicOrigin: origin, databaseUrl, smtpPort, logFolder };
  await progress.step('Mail catcher', async () => {
    endWith(await startFakes({ form, smtpPort, mailPagePort, logFolder }));
  });
  if (dev) {
    const serverPort = await freePort();
    const output = await readableLog();
    await progress.step('Server', async () => {
      endWith(await startServer({ ...common, port: serverPort, output, nodeEnv: 'development' }));
    });
    await progress.step('Client', async () => {
      endWith(await startClientDevServer({ port, serverPort }));
    });
  } else {
    await progress.step('Server', async () => endWith(await startServer({ ...common, port })));
  }

  held.describe(`${origin}/`);
  ready = true;
  const seconds = ((performance.now() - begun) / 1000).toFixed(1);
  const widest = Math.max(0, ...signIns.map(({ who }) => who.length));
  progress.say(
    [
      '',
      `Flightcase is ready after ${seconds} s.`,
      '',
      `  Open        ${origin}/`,
      `  Mail        http://${loopback}:${mailPagePort}/ (what was "sent"; nothing leaves this machine)`,
      ...signIns.map(
        ({ who, email, password }, index) =>
          `  ${index === 0 ? 'Sign in as' : '          '}  ${who.padEnd(widest)}  ${email}  ${password}`,
      ),
      ...(dev ? [] : [`  Logs        ${logFolder}`]),
      '',
      'Ctrl-C stops everything.',
    ].join('\n'),
  );
}

/** The server's JSON lines as a person reads them, on this terminal. */
async function readableLog() {
  const { default: pretty } = await import('pino-pretty');
  return pretty({ destination: 1, ignore: 'pid,hostname', translateTime: 'SYS:HH:MM:ss' });
}

/** A program that ends by itself takes everything with it. */
function endWith(/** @type {import('./processes.mjs').RunningProgram} */ program) {
  void program.ended.then((how) =>
    end(`The ${program.name} ended by itself (${how}). Logs are in ${logFolder}.`, 1),
  );
}

let ready = false;
let ending = false;

/**
 * Stops what was started and ends this process.
 *
 * @param {string} reason
 * @param {number} exitCode
 */
async function end(reason, exitCode) {
  if (ending) return;
  ending = true;
  progress.say(reason);
  keeper?.stop();
  await stopAllPrograms();
  process.exit(exitCode);
}

/** @type {number | undefined} */
let firstSignalAt;

for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
  process.on(signal, () => {
    firstSignalAt ??= performance.now();
    void end('Stopping.', ready ? 0 : 130);
    // A Ctrl-C comes twice at once, from the terminal and from npm: only a later one is impatience.
    if (performance.now() - firstSignalAt > 1000) {
      killAllPrograms();
      process.exit(130);
    }
  });
}
whenNpmDies(() => void end('npm is gone; stopping.', 1));
// The terminal may be gone before we are.
process.stdout.on('error', () => {});
process.stderr.on('error', () => {});

try {
  const { values } = parseArgs({
    options: { dev: { type: 'boolean' }, port: { type: 'string' }, help: { type: 'boolean' } },
  });
  if (values.help) process.stdout.write(usage);
  else await start({ dev: values.dev ?? false, port: values.port });
} catch (error) {
  // A step that is cut off by Ctrl-C fails too; that is no news.
  if (!ending) await end(describeFailure(error), 1);
}
