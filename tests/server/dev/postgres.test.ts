import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { chmod, mkdir, mkdtemp, readFile, readdir, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import postgres from 'postgres';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { inCheckout } from '../../../server/dev/checkout.mjs';
import { chooseClusterHome, type ClusterHome } from '../../../server/dev/cluster-home.mjs';
import { checkForeignDatabase, ensureDatabase } from '../../../server/dev/databases.mjs';
import { freePort } from '../../../server/dev/ports.mjs';
import {
  clearLeftovers,
  databaseUrl,
  keepClusterRunning,
  startCluster,
  type Cluster,
} from '../../../server/dev/postgres.mjs';
import { isRunning, runProgram } from '../../../server/dev/processes.mjs';

const isRoot = process.getuid?.() === 0;
// Containers may not mount, not even in a namespace of their own.
const tryMount = ['unshare', '-m', 'mount', '-t', 'tmpfs', 'none', tmpdir()];
const canMount = isRoot && (await runProgram(tryMount)).code === 0;
let folder: string;
let home: ClusterHome;
let cluster: Cluster;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'cluster-'));
  await chmod(folder, 0o755);
  home = await chooseClusterHome('postgres', { folder, elsewhere: join(folder, 'elsewhere') });
  cluster = await startCluster(home, { durable: false });
});
afterAll(async () => {
  await cluster.program.stop();
  await rm(folder, { recursive: true, force: true });
});

async function ask(url: string): Promise<unknown> {
  const sql = postgres(url, { max: 1, connect_timeout: 5, onnotice: () => {} });
  try {
    const [row] = await sql`select current_database() as name, pg_backend_pid() > 0 as answers`;
    return row;
  } finally {
    await sql.end();
  }
}

async function until(condition: () => boolean | Promise<boolean>): Promise<boolean> {
  for (let tries = 0; tries < 100 && !(await condition()); tries += 1) await delay(50);
  return condition();
}

/** What runs on this machine: the command line of every process. */
async function allCommandLines(): Promise<string[]> {
  const pids = (await readdir('/proc')).filter((name) => /^\d+$/.test(name));
  return Promise.all(pids.map((pid) => readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => '')));
}

test('the server runs as an unprivileged user and listens on loopback only', async () => {
  const { uid } = await stat(`/proc/${cluster.program.child.pid}`);
  expect(uid).toBe(home.owner?.uid ?? process.getuid?.());
  expect(uid).not.toBe(0);
  const sql = postgres(databaseUrl(cluster, 'postgres', 'postgres'), { max: 1 });
  const [row] = await sql`
    select current_setting('listen_addresses') as addresses,
           current_setting('unix_socket_directories') as sockets`;
  await sql.end();
  expect(row).toEqual({ addresses: '127.0.0.1', sockets: '' });
});

test('a database is made once, and needs its password', async () => {
  const url = await ensureDatabase(cluster, 'flightcase');
  expect(await ensureDatabase(cluster, 'flightcase')).toBe(url);
  expect(await ask(url)).toEqual({ name: 'flightcase', answers: true });
  const wrong = new URL(url);
  wrong.password = 'wrong';
  await expect(ask(wrong.href)).rejects.toMatchObject({ code: '28P01' });
});

test('a killed server comes back on its port', async () => {
  const said: string[] = [];
  const url = await ensureDatabase(cluster, 'survives');
  const keeper = keepClusterRunning(
    cluster,
    (text) => said.push(text),
    (reason) => said.push(`gave up: ${reason}`),
  );
  const before = cluster.program.child.pid;
  cluster.program.child.kill('SIGKILL');
  expect(await until(() => said.includes('The database server answers again.'))).toBe(true);
  keeper.stop();
  expect(cluster.program.child.pid).not.toBe(before);
  expect(await ask(url)).toEqual({ name: 'survives', answers: true });
});

test('two clusters run side by side', async () => {
  const other = join(folder, 'other');
  const otherHome = await chooseClusterHome('postgres', { folder: other, elsewhere: other });
  const second = await startCluster(otherHome, { durable: false });
  expect(second.port).not.toBe(cluster.port);
  expect(await ask(databaseUrl(second, 'postgres', 'postgres'))).toMatchObject({ answers: true });
  await second.program.stop();
});

test('nothing is left when the process that started the server is killed', async () => {
  const orphanHome = { ...home, path: join(folder, 'orphan') };
  const code = `
    import { startCluster } from ${JSON.stringify(inCheckout('server/dev/postgres.mjs'))};
    const cluster = await startCluster(${JSON.stringify(orphanHome)}, { durable: false });
    console.log(cluster.program.child.pid);
    setInterval(() => {}, 1000);`;
  const parent = spawn(process.execPath, ['--input-type=module', '-e', code]);
  const [line] = (await once(parent.stdout, 'data')) as [Buffer];
  const pid = Number(String(line));
  expect(isRunning(pid)).toBe(true);
  parent.kill('SIGKILL');
  expect(await until(() => !isRunning(pid))).toBe(true);
  expect((await allCommandLines()).join('\n')).not.toContain(orphanHome.path);

  const again = await startCluster(orphanHome, { durable: false });
  expect(await ask(databaseUrl(again, 'postgres', 'postgres'))).toMatchObject({ answers: true });
  await again.program.stop();
});

test("a crashed server's lock file is removed even if a stranger has its number now", async () => {
  const data = join(folder, 'stale', 'data');
  const lockFile = join(data, 'postmaster.pid');
  await mkdir(data, { recursive: true });
  await writeFile(lockFile, `${process.pid}\n${data}\n`);
  await clearLeftovers({ path: join(folder, 'stale'), owner: null }, () => {});
  await expect(readFile(lockFile)).rejects.toMatchObject({ code: 'ENOENT' });
});

test.runIf(isRoot)('a folder that the server cannot reach is replaced by another', async () => {
  const hidden = join(folder, 'hidden', 'checkout');
  const elsewhere = join(folder, 'elsewhere');
  await mkdir(hidden, { recursive: true });
  await chmod(join(folder, 'hidden'), 0o700);
  const places = { folder: hidden, elsewhere };
  const chosen = await chooseClusterHome('postgres', places);
  expect(chosen.path.startsWith(join(elsewhere, 'checkout-'))).toBe(true);
  const hiddenCluster = await startCluster(chosen, { durable: false });
  await hiddenCluster.program.stop();
  expect((await chooseClusterHome('postgres', places)).path).toBe(chosen.path);
  // Opening the folder later does not lose the data that was begun elsewhere.
  await chmod(join(folder, 'hidden'), 0o755);
  expect((await chooseClusterHome('postgres', places)).path).toBe(chosen.path);
});

test.runIf(canMount)('a full disk is one sentence and leaves nothing half-made', async () => {
  const disk = join(folder, 'full', '.data');
  await mkdir(disk, { recursive: true });
  const code = `
    import { existsSync } from 'node:fs';
    import { chooseClusterHome } from ${JSON.stringify(inCheckout('server/dev/cluster-home.mjs'))};
    import { startCluster } from ${JSON.stringify(inCheckout('server/dev/postgres.mjs'))};
    const home = await chooseClusterHome('postgres', { folder: ${JSON.stringify(join(folder, 'full'))} });
    await startCluster(home).catch((error) => console.log(error.message));
    console.log(existsSync(home.path + '/data.unfinished'), existsSync(home.path + '/data'));`;
  const script = join(folder, 'fill.mjs');
  await writeFile(script, code);
  const mount = `mount -t tmpfs -o size=20m,mode=755 none "$1" && exec "$2" "$3"`;
  const command = ['unshare', '-m', 'sh', '-c', mount, 'full', disk, process.execPath, script];
  const { stdout, stderr } = await runProgram(command, { outlivesParent: true });
  expect(stderr).toBe('');
  expect(stdout).toBe(
    `There is no room on the disk for the database in ${disk}/postgres: a new one takes about ` +
      '60 MB.\nfalse false\n',
  );
});

test('DATABASE_URL is tried, and what is wrong with it is said without its password', async () => {
  const url = await ensureDatabase(cluster, 'given');
  await expect(checkForeignDatabase(url)).resolves.toBeUndefined();
  const refusal = async (change: (url: URL) => void) => {
    const changed = new URL(url);
    changed.password = 'geheim';
    change(changed);
    return checkForeignDatabase(changed.href).then(
      () => 'accepted',
      (error: Error) => error.message,
    );
  };
  const unused = await freePort();
  const messages = {
    wrongPassword: await refusal(() => {}),
    noDatabase: await refusal((changed) => {
      changed.password = cluster.password;
      changed.pathname = '/nobody-made-this';
    }),
    nobodyThere: await refusal((changed) => (changed.port = String(unused))),
  };
  expect(messages.wrongPassword).toContain('does not accept the user and password');
  expect(messages.noDatabase).toContain('has no database "nobody-made-this"');
  expect(messages.nobodyThere).toContain(`No PostgreSQL answers at 127.0.0.1:${unused}`);
  expect(JSON.stringify(messages)).not.toMatch(new RegExp(`geheim|${cluster.password}`));
  await expect(checkForeignDatabase('localhost:5432')).rejects.toThrow('not an address like');
});
