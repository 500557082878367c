import { readFile } from 'node:fs/promises';
import { generateDrizzleJson, generateMigration } from 'drizzle-kit/api';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as productTables from '../../server/db/schema.ts';
import * as workTables from '../../server/db/work-tables.ts';
import { createTestDatabase, type TestDatabase } from '../support/test-database.ts';

const schema = { ...productTables, ...workTables };

let migrated: TestDatabase;
let sql: postgres.Sql;
beforeAll(async () => {
  migrated = await createTestDatabase();
  sql = postgres(migrated.url, { max: 1, onnotice: () => undefined });
});
afterAll(async () => {
  await sql.end();
  await migrated.drop();
});

/** PostgreSQL's own description of every table, column, constraint and index in `public`. */
async function describeTables(connection: postgres.Sql): Promise<Record<string, unknown>[]> {
  return connection<Record<string, unknown>[]>`
    select 'column' as kind, c.relname || '.' || a.attname as name,
      format_type(a.atttypid, a.atttypmod) || case when a.attnotnull then ' not null' else '' end
        || coalesce(' default ' || pg_get_expr(d.adbin, d.adrelid), '') as definition
    from pg_class c join pg_attribute a on a.attrelid = c.oid
    left join pg_attrdef d on d.adrelid = c.oid and d.adnum = a.attnum
    where c.relnamespace = 'public'::regnamespace and c.relkind = 'r' and a.attnum > 0
      and not a.attisdropped
    union all
    select 'constraint', conrelid::regclass || '.' || conname, pg_get_constraintdef(oid)
    from pg_constraint where connamespace = 'public'::regnamespace and contype <> 't'
    union all
    select 'index', indexrelid::regclass::text, pg_get_indexdef(indexrelid)
    from pg_index join pg_class c on c.oid = indrelid
    where c.relnamespace = 'public'::regnamespace
    order by 1, 2`;
}

describe('migrations', () => {
  it('leave nothing for the generator to add', async () => {
    const journal = JSON.parse(await readFile('migrations/meta/_journal.json', 'utf8')) as {
      entries: { idx: number }[];
    };
    const last = String(journal.entries.at(-1)?.idx).padStart(4, '0');
    const snapshot: unknown = JSON.parse(
      await readFile(`migrations/meta/${last}_snapshot.json`, 'utf8'),
    );
    expect(await generateMigration(snapshot as never, generateDrizzleJson(schema))).toEqual([]);
  });

  it('give the same tables, constraints and indexes as the schema says', async () => {
    const statements = await generateMigration(
      generateDrizzleJson({}),
      generateDrizzleJson(schema),
    );
    const direct = await createTestDatabase();
    const connection = postgres(direct.url, { max: 1, onnotice: () => undefined });
    try {
      await connection.unsafe('drop schema public cascade; create schema public');
      for (const statement of statements) await connection.unsafe(statement);
      const wanted = await describeTables(connection);
      expect(wanted.length).toBeGreaterThan(150);
      expect(await describeTables(sql)).toEqual(wanted);
    } finally {
      await connection.end();
      await direct.drop();
    }
  });
});

describe('the database', () => {
  it('has an index that begins with a column of each foreign key', async () => {
    const bare = await sql`
      select conrelid::regclass::text as table, conname from pg_constraint k
      where contype = 'f' and connamespace = 'public'::regnamespace and not exists (
        select from pg_index i where i.indrelid = k.conrelid and i.indpred is null
          and i.indkey[0] = any(k.conkey))`;
    expect(bare).toEqual([]);
    const [count] = await sql`select count(*)::int as keys from pg_constraint
      where contype = 'f' and connamespace = 'public'::regnamespace`;
    expect(count?.keys).toBeGreaterThan(20);
  });

  it('knows no moment without a time zone', async () => {
    expect(
      await sql`select table_name, column_name from information_schema.columns
        where table_schema = 'public' and data_type = 'timestamp without time zone'`,
    ).toEqual([]);
  });
});

/** Two people, a studio, an edition, a project, a song and a report, in as few words as SQL needs. */
async function storeSome(): Promise<void> {
  const hash = 'a'.repeat(64);
  await sql.unsafe(`
    insert into users values ('${id(1)}', 'One', 'one@x.example', '$argon2id$', now()),
      ('${id(2)}', 'Two', 'two@x.example', '$argon2id$', now());
    insert into studios values ('${id(3)}', 'first', 'First', now()), ('${id(4)}', 'second', 'Second', now());
    insert into studio_members values ('${id(5)}', '${id(3)}', '${id(1)}', 'owner', now()),
      ('${id(6)}', '${id(3)}', '${id(2)}', 'assistant', now());
    insert into house_rules_editions values
      ('${id(7)}', '${id(3)}', 1, '{}', '${hash}', '', '${id(1)}', now());
    insert into projects values
      ('${id(8)}', 'studio', '${id(3)}', null, 'EP', 'Band', '${id(7)}', now()),
      ('${id(9)}', 'studio', '${id(4)}', null, 'LP', 'Band', null, now());
    insert into songs values ('${id(10)}', '${id(8)}', 'Song', now());
    insert into reports values ('${id(11)}', '${id(10)}', '${id(12)}', '${id(1)}', now(), '${id(7)}',
      '${hash}', 1, 1, 1, 'ready', '{}', 'same', '[]', '{}');
    insert into report_overviews values ('${id(11)}', '\\x1f8b', now());`);
}

function id(number: number): string {
  return `00000000-0000-7000-8000-${String(number).padStart(12, '0')}`;
}

describe('rows', () => {
  beforeAll(storeSome);

  it.each(['house_rules_editions', 'reports', 'report_overviews'])(
    'of %s are never changed, removed or emptied',
    async (table) => {
      const column = table === 'report_overviews' ? 'created_at = now()' : 'id = id';
      const message = /are never changed/;
      await expect(sql.unsafe(`update ${table} set ${column}`)).rejects.toThrow(message);
      await expect(sql.unsafe(`delete from ${table}`)).rejects.toThrow(message);
      await expect(sql.unsafe(`truncate ${table} cascade`)).rejects.toThrow(message);
      expect((await sql.unsafe(`select from ${table}`)).length).toBe(1);
    },
  );

  it('let an assistant on projects of their own studio only, and off them when they leave', async () => {
    const put = (project: number, studio: number) =>
      sql`insert into project_members values
        (${id(20 + project)}, ${id(project)}, ${id(2)}, 'assistant', ${id(studio)}, now())`;
    await expect(put(9, 4)).rejects.toThrow(/project_members_assistant_fk/);
    await expect(put(9, 3)).rejects.toThrow(/project_members_assistant_project_fk/);
    await put(8, 3);
    await sql`delete from studio_members where user_id = ${id(2)}`;
    expect(await sql`select from project_members`).toHaveLength(0);
  });

  it.each([
    ['an address in capitals', `update users set email = 'One@x.example' where id = '${id(1)}'`],
    ['a password that is not hashed', `update users set password_hash = 'secret'`],
    ['a slug with a space', `update studios set slug = 'a slug'`],
    ['a role that is none', `update studio_members set role = 'boss'`],
    [
      'a private project in a studio',
      `update projects set owner_id = '${id(1)}' where id = '${id(8)}'`,
    ],
    [
      "another studio's rules",
      `update projects set rules_edition_id = '${id(7)}' where id = '${id(9)}'`,
    ],
    [
      'a session id in the clear',
      `insert into sessions values ('plain', '${id(1)}', now(), now())`,
    ],
    [
      'an artist with a studio',
      `insert into project_members values ('${id(30)}', '${id(8)}', '${id(1)}', 'artist', '${id(3)}', now())`,
    ],
    [
      'an invitation to two places',
      `insert into invitations values ('${id(31)}', repeat('a', 64), 'a@x.example', 'assistant', '${id(3)}', '${id(8)}', '${id(1)}', now(), now())`,
    ],
    [
      'a report without a song',
      `insert into reports select '${id(32)}', null, '${id(33)}', created_by, now(), null, rules_hash, 1, 1, 1, 'ready', '{}', 'same', '[]', '{}' from reports`,
    ],
    [
      'a sent mail that still holds its link',
      `insert into mail_outbox values ('${id(34)}', 'x', 'a@x.example', '{}', now(), now(), now(), null)`,
    ],
  ])('refuse %s', async (_what, statement) => {
    await expect(sql.unsafe(statement)).rejects.toThrow(/violates/);
  });
});
