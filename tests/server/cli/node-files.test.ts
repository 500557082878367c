import { execFileSync } from 'node:child_process';
import { mkdir, mkdtemp, rm, symlink, truncate, unlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { listFolder, openNodeFile } from '../../../server/cli/node-files.ts';

let folder: string;
const at = (...parts: string[]) => join(folder, ...parts);

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'flightcase-files-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('listing a folder', () => {
  it('gives every file with its path below the folder, sorted, and its size', async () => {
    await mkdir(at('Drums', 'Close'), { recursive: true });
    await writeFile(at('Drums', 'Close', 'Kick.wav'), 'abc');
    await writeFile(at('Drums', 'OH.wav'), '');
    await writeFile(at('Bass – été 低音.wav'), 'abcd');
    await writeFile(at('.hidden'), '1');
    const { files, problems } = await listFolder(folder);
    expect(files.map(({ path, size }) => [path, size])).toEqual([
      ['.hidden', 1],
      ['Bass – été 低音.wav', 4],
      ['Drums/Close/Kick.wav', 3],
      ['Drums/OH.wav', 0],
    ]);
    expect(problems).toEqual([]);
    const source = await files[2]!.open();
    expect(Buffer.from(await source.read(0, 10)).toString()).toBe('abc');
    await source.close();
  });

  it('names links without following them, loops too, but the folder itself may be one', async () => {
    await mkdir(at('in'));
    await writeFile(at('in', 'a.wav'), 'a');
    await symlink('..', at('in', 'loop'));
    await symlink('/etc/hostname', at('in', 'elsewhere.wav'));
    await symlink('nowhere', at('in', 'broken'));
    await symlink('in', at('shortcut'));
    const { files, problems } = await listFolder(at('shortcut'));
    expect(files.map(({ path }) => path)).toEqual(['a.wav']);
    expect(problems).toEqual([
      { path: 'broken', reason: 'symlink' },
      { path: 'elsewhere.wav', reason: 'symlink' },
      { path: 'loop', reason: 'symlink' },
    ]);
  });

  it('does not wait for a pipe', async () => {
    execFileSync('mkfifo', [at('pipe.wav')]);
    const { files, problems } = await listFolder(folder);
    expect(files).toEqual([]);
    expect(problems).toEqual([{ path: 'pipe.wav', reason: 'special-file' }]);
  });

  it('opens files whose names are no text, and names with control characters', async () => {
    const raw = Buffer.concat([
      Buffer.from(`${folder}/K`),
      Buffer.from([0xff, 0xfe]),
      Buffer.from('.wav'),
    ]);
    await writeFile(raw, 'raw');
    await writeFile(at('a\nb\u0007.wav'), 'odd');
    const { files } = await listFolder(folder);
    expect(files.map(({ path }) => path)).toEqual(['K\ufffd\ufffd.wav', 'a\nb\u0007.wav']);
    for (const [index, text] of ['raw', 'odd'].entries()) {
      const source = await files[index]!.open();
      expect(Buffer.from(await source.read(0, 3)).toString()).toBe(text);
      await source.close();
    }
  });

  it('fails for a folder that is not there, is a file, or may not be read', async () => {
    await writeFile(at('file'), '');
    for (const [name, reason] of [
      ['missing', 'ENOENT'],
      ['file', 'ENOTDIR'],
    ] as const) {
      await expect(listFolder(at(name))).rejects.toMatchObject({
        code: 'no-access',
        details: { path: at(name), reason },
      });
    }
  });

  it('keeps two thousand files in order', async () => {
    await Promise.all(Array.from({ length: 2000 }, (_, i) => writeFile(at(`${i}.wav`), '')));
    const { files } = await listFolder(folder);
    const paths = files.map(({ path }) => path);
    expect(paths).toHaveLength(2000);
    expect(paths).toEqual([...paths].sort());
  });
});

describe('a file as a source', () => {
  const bytes = Buffer.from(Uint8Array.from({ length: (5 << 20) + 3 }, (_, i) => (i * 31) % 253));

  async function streamed(offset: number): Promise<Buffer> {
    const source = await openNodeFile(at('a'));
    const blocks: Buffer[] = [];
    for await (const block of source.stream(offset)) {
      expect(block.length).toBeLessThanOrEqual(1 << 20);
      blocks.push(Buffer.from(block));
    }
    await source.close();
    return Buffer.concat(blocks);
  }

  it('is read at any place and streamed from any place', async () => {
    await writeFile(at('a'), bytes);
    const source = await openNodeFile(at('a'));
    expect(source.size).toBe(bytes.length);
    expect(bytes.subarray(77, 177).equals(await source.read(77, 100))).toBe(true);
    expect(await source.read(bytes.length - 2, 100)).toHaveLength(2);
    expect(await source.read(bytes.length + 9, 100)).toHaveLength(0);
    await source.close();
    for (const offset of [
      0,
      1,
      (1 << 20) - 1,
      1 << 20,
      bytes.length - 1,
      bytes.length,
      bytes.length + 1,
    ]) {
      expect((await streamed(offset)).equals(bytes.subarray(offset))).toBe(true);
    }
  });

  it('ends early when the file shrinks while it is read', async () => {
    await writeFile(at('a'), bytes);
    const source = await openNodeFile(at('a'));
    let total = 0;
    for await (const block of source.stream(0)) {
      if (total === 0) await truncate(at('a'), 100);
      total += block.length;
    }
    await source.close();
    expect(total).toBeLessThan(bytes.length);
  });

  it('stops at the next block when it is aborted, and can be closed after', async () => {
    await writeFile(at('a'), bytes);
    const source = await openNodeFile(at('a'));
    const stop = new AbortController();
    const read = async () => {
      for await (const block of source.stream(0, stop.signal)) {
        if (block.length > 0) stop.abort(new Error('stopped'));
      }
    };
    await expect(read()).rejects.toThrow('stopped');
    await source.close();
  });

  it('fails to open what is gone or no file', async () => {
    await writeFile(at('a'), 'a');
    const { files } = await listFolder(folder);
    await unlink(at('a'));
    await expect(files[0]!.open()).rejects.toMatchObject({ code: 'no-access' });
    await expect(openNodeFile(folder)).rejects.toMatchObject({ code: 'no-access' });
  });
});
