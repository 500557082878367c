import { mkdir, mkdtemp, rename, rm, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { hashInputs, isUpToDate, writeStamp } from '../../../server/dev/stamps.mjs';

let folder: string;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stamps-'));
  await mkdir(join(folder, 'src', 'deep'), { recursive: true });
  await writeFile(join(folder, 'src', 'a.ts'), 'one');
  await writeFile(join(folder, 'src', 'deep', 'b.ts'), 'two');
});
afterEach(() => rm(folder, { recursive: true }));

const hash = () => hashInputs(folder, ['src', 'not-there-yet.ts'], (path) => path === 'src/build');

test('a touched file is no change', async () => {
  const before = await hash();
  await utimes(join(folder, 'src', 'a.ts'), new Date(0), new Date(0));
  expect(await hash()).toBe(before);
});

test.each([
  ['other content', () => writeFile(join(folder, 'src', 'deep', 'b.ts'), 'TWO')],
  ['another name', () => rename(join(folder, 'src', 'a.ts'), join(folder, 'src', 'c.ts'))],
  ['a new file', () => writeFile(join(folder, 'src', 'c.ts'), '')],
  ['a removed file', () => rm(join(folder, 'src', 'a.ts'))],
  ['an input that appears', () => writeFile(join(folder, 'not-there-yet.ts'), '')],
])('%s is a change', async (_what, change) => {
  const before = await hash();
  await change();
  expect(await hash()).not.toBe(before);
});

test('what is built does not count as its own input', async () => {
  const before = await hash();
  await mkdir(join(folder, 'src', 'build'));
  await writeFile(join(folder, 'src', 'build', 'out.wasm'), 'x');
  expect(await hash()).toBe(before);
});

test('a stamp holds for its inputs while the outputs exist', async () => {
  const stamp = join(folder, 'stamps', 'client');
  const output = join(folder, 'index.html');
  const inputs = await hash();
  expect(await isUpToDate(stamp, inputs, [output])).toBe(false);
  await writeFile(output, '');
  await writeStamp(stamp, inputs);
  expect(await isUpToDate(stamp, inputs, [output])).toBe(true);
  expect(await isUpToDate(stamp, 'others', [output])).toBe(false);
  await rm(output);
  expect(await isUpToDate(stamp, inputs, [output])).toBe(false);
});
