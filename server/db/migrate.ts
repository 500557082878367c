import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate } from 'drizzle-orm/postgres-js/migrator';
import { runMigrations } from 'graphile-worker';
import postgres from 'postgres';

/** Any number that nothing else locks: two servers that start together migrate in turn. */
const migrationLock = 7_104_232;

/**
 * Brings a database to the newest schema: our tables, then the job queue's own. Does nothing
 * on one that is there already; a migration that fails is rolled back.
 */
export async function migrateDatabase(databaseUrl: string, migrationsDir: string): Promise<void> {
  const client = postgres(databaseUrl, { max: 1, connect_timeout: 5, onnotice: () => undefined });
  try {
    await client`select pg_advisory_lock(${migrationLock})`;
    await migrate(drizzle(client), { migrationsFolder: migrationsDir });
    await runMigrations({ connectionString: databaseUrl });
  } finally {
    await client.end({ timeout: 5 });
  }
}

if (process.argv[1] && path.resolve(process.argv[1]) === fileURLToPath(import.meta.url)) {
  const databaseUrl = process.env.DATABASE_URL;
  const migrationsDir = path.resolve(process.env.MIGRATIONS_DIR ?? 'migrations');
  if (!databaseUrl) {
    console.error('Set DATABASE_URL to the PostgreSQL database that is to be migrated.');
    process.exitCode = 2;
  } else if (!existsSync(path.join(migrationsDir, 'meta', '_journal.json'))) {
    console.error(`There are no migrations in ${migrationsDir}; start in the project's directory.`);
    process.exitCode = 2;
  } else {
    await migrateDatabase(databaseUrl, migrationsDir);
  }
}
