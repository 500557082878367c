import { execFileSync } from 'node:child_process';
import {
  mkdtempSync,
  openSync,
  closeSync,
  ftruncateSync,
  rmSync,
  writeFileSync,
  writeSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { crc32 as zlibCrc32 } from 'node:zlib';
import fc from 'fast-check';
import JSZip from 'jszip';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { joinCrc32 } from '#shared/bytes/crc32.ts';
import { writeZip, zipSize, type ZipEntry } from '#shared/pack/zip-writer.ts';

/** Python's zipfile: names, sizes and contents' CRC (testzip reads every byte) of a zip. */
const listWithPython = `
import json, sys, zipfile
with zipfile.ZipFile(sys.argv[1]) as z:
    broken = z.testzip() if len(sys.argv) < 3 else None
    print(json.dumps({'broken': broken, 'entries': [
        {'name': i.filename, 'size': i.file_size, 'method': i.compress_type,
         'date': list(i.date_time), 'flags': i.flag_bits, 'offset': i.header_offset}
        for i in z.infolist()]}))
`;

type PythonListing = {
  broken: string | null;
  entries: {
    name: string;
    size: number;
    method: number;
    date: number[];
    flags: number;
    offset: number;
  }[];
};

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'zip-writer-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function entry(name: string, content: string | Uint8Array): ZipEntry {
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  return {
    name,
    size: bytes.length,
    crc32: () => zlibCrc32(bytes),
    // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
    stream: async function* () {
      for (let at = 0; at < bytes.length; at += 7) yield bytes.subarray(at, at + 7);
    },
  };
}

async function bytesOf(entries: readonly ZipEntry[]): Promise<Uint8Array> {
  const blocks: Uint8Array[] = [];
  for await (const block of writeZip(entries)) blocks.push(block.slice());
  return Buffer.concat(blocks);
}

function listed(path: string, withoutReading = false): PythonListing {
  const args = ['-c', listWithPython, path, ...(withoutReading ? ['list'] : [])];
  return JSON.parse(
    execFileSync('python3', args, { encoding: 'utf8', maxBuffer: 1 << 28 }),
  ) as PythonListing;
}

describe('writeZip', () => {
  const names = [
    'Song/01 Kick In.wav',
    'Song/Größe 한글 Ω.wav',
    'Song/Notes/лирика.txt',
    'Song/empty',
  ];
  const entries = names.map((name, index) => entry(name, index === 3 ? '' : `content of ${name}`));

  it('is read without complaint by unzip, Python and jszip', async () => {
    const path = join(folder, 'plain.zip');
    writeFileSync(path, await bytesOf(entries));
    expect(execFileSync('unzip', ['-t', path], { encoding: 'utf8' })).toContain('No errors');
    const { broken, entries: read } = listed(path);
    expect(broken).toBeNull();
    expect(read.map(({ name }) => name)).toEqual(names);
    expect(read.every(({ method }) => method === 0)).toBe(true);
    const zip = await JSZip.loadAsync(await bytesOf(entries), { checkCRC32: true });
    for (const name of names.slice(0, 3)) {
      expect(await zip.file(name)?.async('string')).toBe(`content of ${name}`);
    }
  });

  it('has no descriptors, the earliest date and names marked as UTF-8', async () => {
    const path = join(folder, 'flags.zip');
    writeFileSync(path, await bytesOf(entries));
    for (const { flags, date } of listed(path).entries) {
      expect(flags).toBe(0x800);
      expect(date).toEqual([1980, 1, 1, 0, 0, 0]);
    }
  });

  it('unpacks with rights everybody can use', async () => {
    const path = join(folder, 'rights.zip');
    writeFileSync(path, await bytesOf(entries.slice(0, 1)));
    expect(execFileSync('zipinfo', [path], { encoding: 'utf8' })).toMatch(/^-rw-r--r--/m);
  });

  it('knows its length before its first byte, and gives back what went in', async () => {
    const files = fc.uniqueArray(
      fc.record({
        name: fc.string({ unit: 'grapheme', minLength: 1, maxLength: 20 }),
        bytes: fc.uint8Array({ maxLength: 100 }),
      }),
      { selector: ({ name }) => name.normalize('NFC').replace(/\W/gu, '_'), maxLength: 6 },
    );
    await fc.assert(
      fc.asyncProperty(files, async (list) => {
        const some = list.map(({ name, bytes }, index) =>
          entry(`${index}${name.replace(/[/\\\0]|\p{Cs}/gu, '_')}`, bytes),
        );
        const zipped = await bytesOf(some);
        expect(zipped.length).toBe(zipSize(some));
        const zip = await JSZip.loadAsync(zipped, { checkCRC32: true });
        for (const [index, one] of some.entries()) {
          expect(await zip.file(one.name)?.async('uint8array')).toEqual(list[index]!.bytes);
        }
      }),
      { numRuns: 50 },
    );
  });

  it('holds more than 65,535 files', async () => {
    const many = Array.from({ length: 65_600 }, (_, index) => entry(`f/${index}`, ''));
    const path = join(folder, 'many.zip');
    const bytes = await bytesOf(many);
    expect(bytes.length).toBe(zipSize(many));
    writeFileSync(path, bytes);
    const { entries: read } = listed(path, true);
    expect(read.length).toBe(65_600);
    expect(read.at(-1)?.name).toBe('f/65599');
    const last = execFileSync('zipinfo', ['-t', path], { encoding: 'utf8' });
    expect(last).toContain('65600 files');
  });

  it('goes beyond 4 GiB, in one file and in where a file begins', async () => {
    const block = new Uint8Array(1 << 20);
    const blocks = 5000;
    const size = blocks * block.length;
    let crc = 0;
    for (let i = 0; i < blocks; i++) crc = joinCrc32(crc, zlibCrc32(block), block.length);
    const large: ZipEntry = {
      name: 'Song/large.wav',
      size,
      crc32: () => crc,
      // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
      stream: async function* () {
        for (let i = 0; i < blocks; i++) yield block;
      },
    };
    const entries = [entry('Song/before.txt', 'before'), large, entry('Song/after.txt', 'after')];

    const path = join(folder, 'large.zip');
    const file = openSync(path, 'w');
    let at = 0;
    for await (const part of writeZip(entries)) {
      // The zeros stay a hole in the file.
      if (part !== block) writeSync(file, part, 0, part.length, at);
      at += part.length;
    }
    ftruncateSync(file, at);
    closeSync(file);

    expect(at).toBe(zipSize(entries));
    const { entries: read } = listed(path, true);
    expect(read.map(({ size: bytes }) => bytes)).toEqual([6, size, 5]);
    expect(read[2]!.offset).toBeGreaterThan(2 ** 32);
    expect(execFileSync('unzip', ['-p', path, 'Song/after.txt'], { encoding: 'utf8' })).toBe(
      'after',
    );
    const listing = execFileSync('zipinfo', ['-v', path, 'Song/large.wav'], { encoding: 'utf8' });
    expect(listing).toMatch(new RegExp(`uncompressed size: +${size} bytes`));
    rmSync(path);
  });

  it('uses Zip64 only where it must', async () => {
    const text = Buffer.from(await bytesOf(entries)).toString('latin1');
    expect(text).not.toContain('PK\x06\x06');
    expect(text).not.toContain('PK\x06\x07');
  });

  it('reads nothing ahead of who takes the bytes', async () => {
    let read = 0;
    const watched: ZipEntry = {
      name: 'watched',
      size: 100,
      crc32: () => 0,
      // eslint-disable-next-line @typescript-eslint/require-await -- the interface is asynchronous
      stream: async function* () {
        for (let i = 0; i < 100; i++) {
          read += 1;
          yield new Uint8Array(1);
        }
      },
    };
    const zip = writeZip([watched]);
    await zip.next();
    expect(read).toBe(0);
    await zip.next();
    expect(read).toBe(1);
    await zip.return();
    expect(read).toBe(1);
  });

  it('stops at the next block after an abort', async () => {
    const abort = new AbortController();
    const zip = writeZip(entries, abort.signal);
    await zip.next();
    await zip.next();
    abort.abort(new Error('enough'));
    await expect(zip.next()).rejects.toThrow('enough');
  });

  it.each([
    ['more', 3],
    ['fewer', 5],
  ])('does not write a wrong zip when a file has %s bytes than promised', async (_, size) => {
    const lying = { ...entry('lying', 'four'), size };
    await expect(bytesOf([lying])).rejects.toThrow('another length');
  });
});
