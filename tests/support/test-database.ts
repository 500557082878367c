import { randomBytes } from 'node:crypto';
import postgres from 'postgres';
import { inject } from 'vitest';

export type TestDatabase = {
  /** Address of the database; its role owns it. */
  url: string;
  /** Ends every connection to the database and removes it. */
  drop: () => Promise<void>;
};

/**
 * Makes a migrated database without rows for the calling test file, copied from the run's
 * template in some 50 ms, so that files can run side by side and in any order.
 *
 *     const database = await createTestDatabase();
 *     afterAll(database.drop);
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const { maintenanceUrl, template } = inject('databaseServer');
  const name = `flightcase_test_${process.env.VITEST_POOL_ID ?? '0'}_${randomBytes(4).toString('hex')}`;
  await maintain(maintenanceUrl, `create database ${name} template ${template}`);
  const url = new URL(maintenanceUrl);
  url.pathname = `/${name}`;
  return {
    url: url.href,
    drop: () => maintain(maintenanceUrl, `drop database if exists ${name} with (force)`),
  };
}

/** Runs one statement that must stand outside a transaction. */
async function maintain(url: string, statement: string): Promise<void> {
  const sql = postgres(url, { max: 1, onnotice: () => {} });
  try {
    await sql.unsafe(statement);
  } finally {
    await sql.end();
  }
}
