import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { openZip, usualZipLimits, type ZipLimits } from '#shared/bytes/zip-source.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { buildZip, type TestEntry } from '../../support/zip-builder.ts';

const good: TestEntry = { name: 'Kick.wav', bytes: Buffer.from('fine') };
const open = (zip: Buffer, limits?: ZipLimits) => openZip(bytesSource(zip), limits);

describe('one bad entry does not stop the others', () => {
  it.each([
    ['/etc/passwd', {}, 'absolute-path'],
    ['../up.wav', {}, 'parent-folder'],
    ['a/../../up.wav', {}, 'parent-folder'],
    ['C:/Kick.wav', {}, 'drive-letter'],
    ['c:Kick.wav', {}, 'drive-letter'],
    ['a\\b.wav', {}, 'backslash'],
    ['..\\b.wav', {}, 'backslash'],
    ['Kick.wav\0.txt', {}, 'nul-in-name'],
    ['.', {}, 'no-name'],
    ['link.wav', { unixMode: 0o120777 }, 'symlink'],
    ['pipe.wav', { unixMode: 0o010644 }, 'special-file'],
    ['locked.wav', { flags: 1 }, 'encrypted'],
    ['locked.wav', { flags: 0x2001 }, 'encrypted'],
    ['More takes.ZIP', {}, 'nested-zip'],
    ['lzma.wav', { method: 14 }, 'unknown-compression'],
    ['odd.wav', { central: { unpackedBytes: 99 } }, 'damaged-entry'],
    ['Kick.wav', {}, 'name-repeated'],
  ] as const)('%j %o is %s', async (name, more, reason) => {
    const bad: TestEntry = { name, bytes: Buffer.from('bad'), ...more };
    const { files, problems } = await open(buildZip([good, bad, { ...good, name: 'Snare.wav' }]));
    expect(problems).toEqual([{ path: name, reason }]);
    expect(files.map(({ path }) => path)).toEqual(['Kick.wav', 'Snare.wav']);
  });

  it('regular modes are no problem', async () => {
    const { problems } = await open(buildZip([{ ...good, unixMode: 0o100644 }]));
    expect(problems).toEqual([]);
  });
});

describe('an entry that proves to be damaged says so when it is read', () => {
  const long = Buffer.alloc(200_000, 'Paper Ferry ');
  async function readError(entry: TestEntry, zip = buildZip([entry])): Promise<unknown> {
    const { files } = await open(zip);
    let bytes = 0;
    try {
      const source = await files[0]!.open();
      for await (const block of source.stream(0)) bytes += block.length;
      return { readWithoutComplaint: bytes };
    } catch (error) {
      return error;
    }
  }
  const entry: TestEntry = { name: 'a.wav', bytes: long, deflate: true };

  it('larger than it said', async () => {
    const small = { ...entry, central: { unpackedBytes: 1000 } };
    expect(await readError(small)).toMatchObject({
      code: 'zip-refused',
      details: { reason: 'larger-than-declared', entry: 'a.wav' },
    });
  });

  it('smaller than it said, or cut, or with flipped bits', async () => {
    const damaged = { code: 'zip-refused', details: { reason: 'damaged-entry', entry: 'a.wav' } };
    expect(await readError({ ...entry, central: { unpackedBytes: 200_001 } })).toMatchObject(
      damaged,
    );
    expect(await readError({ ...entry, central: { packedBytes: 20 } })).toMatchObject(damaged);
    const flipped = buildZip([entry]);
    flipped.fill(0xff, 60, 90);
    expect(await readError(entry, flipped)).toMatchObject(damaged);
  });

  it('a local header that is not there, or says something else', async () => {
    for (const local of [{ signature: 0x11111111 }, { method: 0 }]) {
      expect(await readError({ ...entry, local })).toMatchObject({
        details: { reason: 'damaged-entry' },
      });
    }
  });

  it('a longer local name that would move the bytes into the next entry', async () => {
    const zip = buildZip([{ ...entry, local: { name: 'a.wav' } }, good]);
    zip.writeUInt16LE(4000, 26);
    expect(await readError(entry, zip)).toMatchObject({
      details: { reason: 'overlapping-entries' },
    });
  });

  it('the header reader makes a finding of it', async () => {
    const zip = buildZip([entry]);
    zip.fill(0xff, 36, 90);
    const { files } = await open(zip);
    expect(await readWave(await files[0]!.open(), 'a.wav')).toMatchObject({
      kind: 'unreadable',
      reason: 'could-not-be-read',
    });
  });
});

describe('a zip that cannot be trusted is refused as a whole', () => {
  const refused = (reason: string) => ({ code: 'zip-refused', details: { reason } });
  const zip = buildZip([good, { ...good, name: 'Snare.wav' }]);

  it('no zip at all, or one cut short', async () => {
    await expect(open(Buffer.alloc(0))).rejects.toMatchObject(refused('not-a-zip'));
    await expect(open(Buffer.from('PK\x03\x04'))).rejects.toMatchObject(refused('not-a-zip'));
    await expect(open(zip.subarray(0, -10))).rejects.toMatchObject(refused('not-a-zip'));
    await expect(open(zip.subarray(20))).rejects.toMatchObject(refused('damaged-directory'));
  });

  it('a directory that does not hold what its end says', async () => {
    for (const options of [{ entryCount: 3 }, { directoryOffset: 7 }, { directoryOffset: 1e9 }]) {
      const wrong = buildZip([good, { ...good, name: 'b' }], options);
      await expect(open(wrong)).rejects.toMatchObject(refused('damaged-directory'));
    }
    const beyond = { ...good, central: { localOffset: 5000 } };
    await expect(open(buildZip([beyond]))).rejects.toMatchObject(refused('damaged-directory'));
  });

  it('one of several parts', async () => {
    const part = Buffer.from(zip);
    part.writeUInt16LE(1, part.length - 18);
    await expect(open(part)).rejects.toMatchObject(refused('several-parts'));
  });

  it('entries that share bytes', async () => {
    const kernel: TestEntry = { name: '0', bytes: Buffer.alloc(100_000), deflate: true };
    const again = Array.from({ length: 50 }, (_, i) => ({
      ...kernel,
      name: `${i + 1}`,
      central: { localOffset: 0 },
    }));
    await expect(open(buildZip([kernel, ...again]))).rejects.toMatchObject(
      refused('overlapping-entries'),
    );
  });

  it('more entries than anybody sends', async () => {
    const limits = { ...usualZipLimits, maxEntries: 1 };
    await expect(open(zip, limits)).rejects.toMatchObject(refused('too-many-entries'));
    const many = buildZip([good], { entryCount: 65_000 });
    await expect(open(many)).rejects.toMatchObject(refused('too-many-entries'));
  });

  it('more bytes than anybody sends, by ratio or in all', async () => {
    const bomb = { name: 'a', bytes: Buffer.alloc(1000), deflate: true };
    const gibs = (count: number) => ({ ...bomb, central: { unpackedBytes: count * 1024 ** 3 } });
    const three = Array.from({ length: 3 }, (_, i) => ({ ...gibs(1), name: `${i}` }));
    await expect(open(buildZip(three))).rejects.toMatchObject(refused('too-large'));
    const huge = { name: 'b', bytes: Buffer.alloc(10), central: { unpackedBytes: 2 ** 41 } };
    await expect(open(buildZip([huge], { zip64: true }))).rejects.toMatchObject(
      refused('too-large'),
    );
    // A silent track on its own packs by a thousand to one and is no bomb.
    const silence = { ...bomb, bytes: Buffer.alloc(4 << 20) };
    expect((await open(buildZip([silence]))).files).toHaveLength(1);
  });
});
