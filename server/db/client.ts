import { drizzle, type PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import postgres, { type Sql } from 'postgres';

export type Database = PostgresJsDatabase;

/** The database itself, or a transaction on it. */
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];
export type Queryable = Database | Transaction;

export type DatabaseConnection = {
  readonly db: Database;
  /** Waits for running queries (at most five seconds) and closes every connection. */
  readonly close: () => Promise<void>;
};

/**
 * Opens a pool of at most `maxConnections`. Connecting is bounded to three seconds, a
 * statement to ten, and after a refused connection the next attempt follows within a quarter of
 * a second, so a server whose PostgreSQL has gone answers soon and recovers soon.
 */
export function openDatabase(databaseUrl: string, maxConnections = 10): DatabaseConnection {
  const client = postgres(databaseUrl, {
    max: maxConnections,
    connect_timeout: 3,
    backoff: (attempt) => Math.min(0.25, 0.02 * 2 ** attempt),
    idle_timeout: 60,
    connection: {
      statement_timeout: 10_000,
      application_name: 'flightcase',
      // Rows are found by keys: no value deserves a plan of its own.
      plan_cache_mode: 'force_generic_plan',
    },
    // Notices of a migration ("relation exists, skipping") are not news.
    onnotice: () => undefined,
  });
  return { db: drizzle(preparing(client)), close: () => client.end({ timeout: 5 }) };
}

/**
 * The same client, but every statement is prepared once a connection and planned once. Drizzle
 * asks for that only where a query has a name; for a list over five tables planning takes three
 * times as long as running it. Texts are few: they come from our code, values are parameters.
 */
function preparing(client: Sql): Sql {
  return new Proxy(client, {
    get(target, property) {
      if (property === 'unsafe') {
        return ((text, parameters, options) =>
          target.unsafe(text, parameters, { ...options, prepare: true })) as Sql['unsafe'];
      }
      if (property === 'begin' || property === 'savepoint') {
        const open = Reflect.get(target, property) as (work: (inner: Sql) => unknown) => unknown;
        return (work: (inner: Sql) => unknown) => open((inner) => work(preparing(inner)));
      }
      return Reflect.get(target, property) as unknown;
    },
  });
}
