import { createHash } from 'node:crypto';
import { mkdir, mkdtemp, readFile, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bytesSource, type ByteSource } from '#shared/bytes/byte-source.ts';
import { isZip, openZip, type ZippedFile } from '#shared/bytes/zip-source.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { bextChunk, cueChunks, sine, writeTestWave } from '../../support/audio-writer.ts';
import { countingSource, sparseSource } from '../../support/counting-source.ts';
import { run } from '../../support/outside-programs.ts';
import { buildZip } from '../../support/zip-builder.ts';

let folder: string;
const at = (name: string) => join(folder, name);

/** Names people have, and some they should not have. */
const contents = new Map<string, Buffer>([
  [
    'Kick In.wav',
    writeTestWave({ ...tone(3000), before: [bextChunk({ timeReference: 48_000n })] }),
  ],
  [
    'Vocals/Lead – été.wav',
    writeTestWave({ ...tone(90_000), after: cueChunks([{ startFrame: 5, label: 'Vers' }]) }),
  ],
  ['Vocals/합창 コーラス.wav', writeTestWave(tone(2000))],
  ['notes.txt', Buffer.from('112 BPM\n')],
  ['empty.txt', Buffer.alloc(0)],
  ['__MACOSX/._Kick In.wav', Buffer.from('\0\x05\x16\x07')],
]);

function tone(frames: number) {
  return {
    sampleRateHz: 48000,
    encoding: 'pcm',
    bits: 24,
    channels: [sine(frames, 24, 40)],
  } as const;
}

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'flightcase-zip-'));
  for (const [name, bytes] of contents) {
    await mkdir(join(at('in'), name, '..'), { recursive: true });
    await writeFile(join(at('in'), name), bytes);
  }
});
afterAll(() => rm(folder, { recursive: true, force: true }));

async function readAll(file: ZippedFile): Promise<Buffer> {
  const source = await file.open();
  const blocks: Buffer[] = [];
  for await (const block of source.stream(0)) blocks.push(Buffer.from(block));
  await source.close();
  return Buffer.concat(blocks);
}

async function expectContents(zip: ByteSource): Promise<void> {
  const { files, problems } = await openZip(zip);
  expect(problems).toEqual([]);
  expect(files.map(({ path }) => path).sort()).toEqual([...contents.keys()].sort());
  for (const file of files) {
    const bytes = contents.get(file.path)!;
    expect(file.size).toBe(bytes.length);
    expect((await readAll(file)).equals(bytes), file.path).toBe(true);
    if (!file.path.endsWith('.wav') || file.path.startsWith('__')) continue;
    const source = await file.open();
    expect(await readWave(source, file.path)).toEqual(
      await readWave(bytesSource(bytes), file.path),
    );
    // From the back to the front: reading starts over where it has to.
    for (const offset of [bytes.length - 10, 70_000, 50, 0]) {
      const read = await source.read(offset, 40);
      expect(bytes.subarray(offset, offset + 40).equals(read)).toBe(true);
    }
    expect(await source.read(bytes.length + 5, 10)).toHaveLength(0);
  }
}

describe('zips made by other programs', () => {
  const python = (mode: string, compression: string) => `
import os, sys, zipfile
z = zipfile.ZipFile(sys.argv[1], '${mode}', zipfile.${compression})
for base, _, names in os.walk(sys.argv[2]):
    for name in names:
        path = os.path.join(base, name)
        z.write(path, os.path.relpath(path, sys.argv[2]))
z.close()
`;

  it.each(['ZIP_STORED', 'ZIP_DEFLATED'])("Python's zipfile, %s", async (compression) => {
    await run('python3', ['-c', python('w', compression), at(`${compression}.zip`), at('in')]);
    await expectContents(bytesSource(await readFile(at(`${compression}.zip`))));
  });

  it("Python's zipfile, streamed: sizes only behind the entries", async () => {
    const script = `
import sys, zipfile
class Pipe:
    def __init__(self, f): self.f = f
    def write(self, b): return self.f.write(b)
    def flush(self): self.f.flush()
z = zipfile.ZipFile(Pipe(open(sys.argv[1], 'wb')), 'w', zipfile.ZIP_DEFLATED)
z.writestr('a.txt', 'Paper Ferry ' * 500)
z.close()
`;
    await run('python3', ['-c', script, at('piped.zip')]);
    const { files } = await openZip(bytesSource(await readFile(at('piped.zip'))));
    expect((await readAll(files[0]!)).toString()).toBe('Paper Ferry '.repeat(500));
  });

  it.each(['-0', '-6', '-9'])('zip %s', async (level) => {
    await run('sh', ['-c', `cd "${at('in')}" && zip -q ${level} -r ../level${level}.zip .`]);
    await expectContents(bytesSource(await readFile(at(`level${level}.zip`))));
  });

  it('zip with a comment, and Zip64 forced', async () => {
    await run('sh', [
      '-c',
      `cd "${at('in')}" && zip -q -fz -r ../wide.zip . && echo "Weather for Two" | zip -q -z ../wide.zip`,
    ]);
    await expectContents(bytesSource(await readFile(at('wide.zip'))));
  });

  it('links and encrypted entries are named, the others are read', async () => {
    await symlink('/etc/hostname', at('in/link.wav'));
    await run('sh', ['-c', `cd "${at('in')}" && zip -q -y -r ../links.zip . && rm link.wav`]);
    await run('sh', ['-c', `cd "${at('in')}" && zip -q -P secret ../links.zip notes.txt`]);
    const { files, problems } = await openZip(bytesSource(await readFile(at('links.zip'))));
    expect(problems.sort((a, b) => a.path.localeCompare(b.path))).toEqual([
      { path: 'link.wav', reason: 'symlink' },
      { path: 'notes.txt', reason: 'encrypted' },
    ]);
    expect(files).toHaveLength(contents.size - 1);
  });

  it('is told from other files by its first bytes', async () => {
    expect(await isZip(bytesSource(buildZip([])))).toBe(true);
    expect(await isZip(bytesSource(buildZip([{ name: 'a', bytes: Buffer.from('a') }])))).toBe(true);
    expect(await isZip(bytesSource(contents.get('Kick In.wav')!))).toBe(false);
    expect(await isZip(bytesSource(Buffer.from('PK')))).toBe(false);
  });
});

describe('names', () => {
  it('are UTF-8 with or without the flag, or code page 437', async () => {
    const { files } = await openZip(
      bytesSource(
        buildZip([
          { name: 'Gesang – flagged.wav', flags: 0x800, bytes: Buffer.from('1') },
          { name: 'Gesang – bare.wav', bytes: Buffer.from('2') },
          // "Bläser Übung ñ" as code page 437 has it: ä 84, Ü 9A, ñ A4 (from memory of the table).
          { name: Buffer.from('426c84736572209a62756e67a4', 'hex'), bytes: Buffer.from('3') },
        ]),
      ),
    );
    expect(files.map(({ path }) => path)).toEqual([
      'Gesang – flagged.wav',
      'Gesang – bare.wav',
      'Bläser Übungñ',
    ]);
  });

  it("all of code page 437 is read as Python's codec reads it", async () => {
    const upper = Buffer.from(Array.from({ length: 128 }, (_, i) => 128 + i));
    const expected = await run('python3', [
      '-c',
      "import sys; sys.stdout.buffer.write(bytes(range(128, 256)).decode('cp437').encode())",
    ]);
    const { files } = await openZip(
      bytesSource(buildZip([{ name: upper, bytes: Buffer.alloc(1) }])),
    );
    expect(files[0]!.path).toBe(expected);
  });

  it('lose empty parts and dots, and keep control characters for the check to see', async () => {
    const names = ['./a//b.wav', 'tab\there.wav'];
    const { files } = await openZip(
      bytesSource(buildZip(names.map((name) => ({ name, bytes: Buffer.from('x') })))),
    );
    expect(files.map(({ path }) => path)).toEqual(['a/b.wav', 'tab\there.wav']);
  });
});

describe('large zips', () => {
  it('stored and beyond 4 GiB: a track is read in a few small reads', async () => {
    const header = writeTestWave(tone(2)).subarray(0, -6);
    const size = 6 * 1024 ** 3;
    // One entry whose bytes are mostly not there: the zip around it, laid out by hand.
    const zip = buildZip(
      [{ name: 'long.wav', bytes: header, central: { packedBytes: size, unpackedBytes: size } }],
      { zip64: true },
    );
    const localBytes = 30 + 8 + header.length;
    const shift = size - header.length;
    const tail = Buffer.from(zip.subarray(localBytes));
    const end64 = tail.length - 22 - 20 - 56;
    tail.writeBigUInt64LE(BigInt(localBytes + shift), end64 + 48);
    tail.writeBigUInt64LE(BigInt(localBytes + shift + end64), end64 + 56 + 8);
    const source = countingSource(
      sparseSource(zip.length + shift, [
        { offset: 0, bytes: zip.subarray(0, localBytes) },
        { offset: localBytes + shift, bytes: tail },
      ]),
    );
    const { files, problems } = await openZip(source);
    expect(problems).toEqual([]);
    expect(files[0]).toMatchObject({ path: 'long.wav', size });
    const reading = await readWave(await files[0]!.open(), 'long.wav');
    expect(reading).toMatchObject({ kind: 'track' });
    expect(source.counts.largest).toBeLessThanOrEqual(65536);
    expect(source.counts.bytes).toBeLessThan(200_000);
  });

  it('two thousand files are listed without reading any of them', async () => {
    const entries = Array.from({ length: 2000 }, (_, i) => ({
      name: `Takes/${i}.wav`,
      bytes: Buffer.alloc(100),
    }));
    const zip = buildZip(entries);
    const source = countingSource(bytesSource(zip));
    const { files } = await openZip(source);
    expect(files).toHaveLength(2000);
    expect(source.counts.largest).toBeLessThanOrEqual(65536);
    expect(source.counts.reads).toBeLessThan(30);
  });

  it('three hundred megabytes of silence unpack in small blocks', async () => {
    const script = `
import sys, zipfile
with zipfile.ZipFile(sys.argv[1], 'w', zipfile.ZIP_DEFLATED, compresslevel=1) as z, z.open('silence.raw', 'w', force_zip64=True) as f:
    block = bytes(1 << 20)
    for _ in range(300): f.write(block)
`;
    await run('python3', ['-c', script, at('silence.zip')]);
    const { files } = await openZip(bytesSource(await readFile(at('silence.zip'))));
    const source = await files[0]!.open();
    let total = 0;
    let largest = 0;
    const hash = createHash('sha256');
    for await (const block of source.stream(0)) {
      total += block.length;
      largest = Math.max(largest, block.length);
      hash.update(block);
    }
    expect(total).toBe(300 << 20);
    expect(largest).toBeLessThanOrEqual(4 << 20);
    // head -c 314572800 /dev/zero | sha256sum
    const expected = (await run('sh', ['-c', 'head -c 314572800 /dev/zero | sha256sum'])).slice(
      0,
      64,
    );
    expect(hash.digest('hex')).toBe(expected);
  }, 30_000);
});
