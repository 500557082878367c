import { randomBytes } from 'node:crypto';
import { readdir, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { chooseClusterHome } from '../../server/dev/cluster-home.mjs';
import { ensureDatabase } from '../../server/dev/databases.mjs';
import { inCheckout } from '../../server/dev/checkout.mjs';
import { databaseUrl, removeCluster, startCluster } from '../../server/dev/postgres.mjs';
import { isRunning, runProgram } from '../../server/dev/processes.mjs';
import type { TestProject } from 'vitest/node';

/** What a test worker needs to make itself a database. */
export type TestDatabaseServer = {
  /** Address of a database from which others can be made and dropped. */
  maintenanceUrl: string;
  /** A migrated database without rows that nobody connects to. */
  template: string;
};

declare module 'vitest' {
  export interface ProvidedContext {
    databaseServer: TestDatabaseServer;
  }
}

const template = 'flightcase_template';

/**
 * A PostgreSQL server of this run's own, with the migrated template in it. Several runs in one
 * checkout do not meet. It ends with this process, however that ends.
 *
 * @throws SetupFailure where PostgreSQL is missing or the migrations fail
 */
export async function startTestDatabaseServer(): Promise<{
  server: TestDatabaseServer;
  stop: () => Promise<void>;
}> {
  const runName = `${process.pid}-${randomBytes(3).toString('hex')}`;
  const home = await chooseClusterHome(join('test-postgres', runName));
  await removeDeadClusters(dirname(home.path));
  const cluster = await startCluster(home, { durable: false });
  const url = await ensureDatabase(cluster, template);
  const migrate = [process.execPath, '--import', 'tsx', 'server/db/migrate.ts'];
  const { code, stdout, stderr } = await runProgram(migrate, {
    cwd: inCheckout(),
    env: { ...process.env, DATABASE_URL: url },
  });
  if (code !== 0) throw new Error(`The migrations failed.\n${stdout}\n${stderr}`);
  return {
    server: { maintenanceUrl: databaseUrl(cluster, 'flightcase', 'postgres'), template },
    stop: async () => {
      await cluster.program.stop();
      await removeCluster(home);
    },
  };
}

/** Removes the clusters of runs that were killed before they could do it themselves. */
async function removeDeadClusters(folder: string): Promise<void> {
  for (const name of await readdir(folder).catch(() => [])) {
    const pid = Number(name.split('-')[0]);
    if (pid > 0 && !isRunning(pid)) await rm(join(folder, name), { recursive: true, force: true });
  }
}

/** Vitest calls this once before the tests of the server. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const { server, stop } = await startTestDatabaseServer();
  project.provide('databaseServer', server);
  return stop;
}
