import postgres from 'postgres';
import { expect, test } from 'vitest';
import { createTestDatabase } from '../../support/test-database.ts';

async function withConnection<T>(url: string, work: (sql: postgres.Sql) => Promise<T>): Promise<T> {
  const sql = postgres(url, { max: 1, onnotice: () => {} });
  try {
    return await work(sql);
  } finally {
    await sql.end();
  }
}

test('every test database is migrated, empty and apart from the others', async () => {
  const [one, other] = await Promise.all([createTestDatabase(), createTestDatabase()]);
  await withConnection(one.url, async (sql) => {
    await sql`create table only_here (id int)`;
    const jobs = await sql`select count(*)::int as jobs from graphile_worker.jobs`;
    expect(jobs[0]).toEqual({ jobs: 0 });
  });
  await withConnection(other.url, async (sql) => {
    const found = await sql`select to_regclass('only_here') as found`;
    expect(found[0]).toEqual({ found: null });
  });
  await one.drop();
  await other.drop();
  await expect(withConnection(one.url, (sql) => sql`select 1`)).rejects.toMatchObject({
    code: '3D000',
  });
});

test('the application role is no superuser', async () => {
  const database = await createTestDatabase();
  const roles = await withConnection(
    database.url,
    (sql) => sql`select rolsuper, rolcreaterole from pg_roles where rolname = current_user`,
  );
  expect(roles[0]).toEqual({ rolsuper: false, rolcreaterole: false });
  await database.drop();
});
