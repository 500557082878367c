import { chmod, mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { planInstall } from '../../../server/dev/debian.mjs';
import { findPostgresPrograms } from '../../../server/dev/postgres-programs.mjs';

const missing = [
  { name: 'PostgreSQL', package: 'postgresql' },
  { name: 'sox', package: 'sox' },
];

test('root installs by itself, others through sudo', () => {
  expect(planInstall(missing, { hasApt: true, isRoot: true, hasSudo: false })).toEqual({
    prefix: [],
  });
  expect(planInstall(missing, { hasApt: true, isRoot: false, hasSudo: true })).toEqual({
    prefix: ['sudo', '-n'],
  });
});

test('without rights, a sentence says what is missing and what to run', () => {
  const plan = planInstall(missing, { hasApt: true, isRoot: false, hasSudo: false });
  expect(plan).toEqual({
    sentence:
      'Missing here: PostgreSQL, sox, which only root can install. Please run ' +
      '"sudo apt-get install -y postgresql sox" once and then this command again.',
  });
});

test('without apt-get, a sentence names the packages', () => {
  const plan = planInstall(missing, { hasApt: false, isRoot: true, hasSudo: false });
  expect(plan).toMatchObject({ sentence: expect.stringContaining('postgresql sox') as string });
});

test('the newest installed server is found, and a client alone is none', async () => {
  const folder = await mkdtemp(join(tmpdir(), 'versions-'));
  const add = async (version: string, programs: string[]) => {
    await mkdir(join(folder, version, 'bin'), { recursive: true });
    for (const program of programs) {
      await writeFile(join(folder, version, 'bin', program), '');
      await chmod(join(folder, version, 'bin', program), 0o755);
    }
  };
  const nowhere = { folder, path: join(folder, 'no-such-path') };
  expect(await findPostgresPrograms(nowhere)).toEqual([]);
  await add('17', ['psql']);
  expect(await findPostgresPrograms(nowhere)).toEqual([]);
  await add('9', ['postgres', 'initdb']);
  await add('15', ['postgres', 'initdb']);
  expect((await findPostgresPrograms(nowhere)).map(({ major }) => major)).toEqual([15, 9]);
  await rm(folder, { recursive: true });
});
