import { migrate } from '../../server/dev/application.mjs';
import { applicationRole, ensureDatabase } from '../../server/dev/databases.mjs';
import { databaseUrl } from '../../server/dev/postgres.mjs';
import { startThrowawayCluster } from './throwaway-cluster.ts';
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

/** Vitest calls this once before the tests of the server, and what it returns after them. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const { cluster, stop } = await startThrowawayCluster();
  await migrate(await ensureDatabase(cluster, template), 'source');
  project.provide('databaseServer', {
    maintenanceUrl: databaseUrl(cluster, applicationRole, 'postgres'),
    template,
  });
  return stop;
}
