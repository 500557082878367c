import { copyFile, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { countingSource } from '../../support/counting-source.ts';
import { run } from '../../support/outside-programs.ts';
import { readBytes } from '../../support/reading.ts';

/** Written by ffmpeg: what it was told to write is the expected value. */
const formats = [
  ['a.mp3', [], 'MP3', true],
  ['bare.mp3', ['-id3v2_version', '0', '-write_xing', '0'], 'MP3', true],
  ['a.mp2', [], 'MPEG layer 1 or 2', true],
  ['a.m4a', [], 'AAC', true],
  ['a.aac', [], 'AAC', true],
  ['alac.m4a', ['-c:a', 'alac'], 'ALAC', false],
  ['a.flac', [], 'FLAC', false],
  ['flac.ogg', ['-c:a', 'flac'], 'FLAC', false],
  ['a.ogg', ['-c:a', 'libvorbis'], 'Ogg Vorbis', true],
  ['a.opus', [], 'Opus', true],
  ['a.webm', [], 'Opus', true],
  ['a.mka', ['-c:a', 'libvorbis'], 'Ogg Vorbis', true],
  ['a.wma', [], 'WMA', true],
  ['a.wv', [], 'WavPack', false],
  ['a.tta', [], 'TTA', false],
  ['a.ac3', [], 'AC-3', true],
  ['a.caf', [], 'CAF', false],
  ['law.caf', ['-c:a', 'pcm_mulaw'], 'CAF', true],
  ['a.au', [], 'AU', false],
  ['law.au', ['-c:a', 'pcm_alaw'], 'AU', true],
  ['a.w64', [], 'Wave64', false],
  ['adpcm.wav', ['-c:a', 'adpcm_ms'], 'ADPCM in a WAV file', true],
  ['ima.wav', ['-c:a', 'adpcm_ima_wav'], 'IMA ADPCM in a WAV file', true],
  ['mp3.wav', ['-c:a', 'libmp3lame'], 'MP3 in a WAV file', true],
  ['mulaw.wav', ['-c:a', 'pcm_mulaw'], 'µ-law in a WAV file', true],
  ['alaw.wav', ['-c:a', 'pcm_alaw'], 'A-law in a WAV file', true],
  ['aac.wav', ['-c:a', 'aac'], 'AAC in a WAV file', true],
  ['flac.wav', ['-c:a', 'flac'], 'FLAC in a WAV file', false],
  ['g722.wav', ['-ar', '16000', '-ac', '1', '-c:a', 'g722'], 'G.722 ADPCM in a WAV file', true],
  ['alaw.aifc', ['-c:a', 'pcm_alaw', '-f', 'aiff'], 'A-law in an AIFC file', true],
] as const;

let folder: string;
const at = (name: string) => join(folder, name);

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'flightcase-formats-'));
  await run('sox', [
    '-n',
    '-r',
    '48000',
    '-b',
    '16',
    '-c',
    '2',
    at('tone.wav'),
    'synth',
    '1',
    'pluck',
  ]);
  const picture = ['-v', 'error', '-y', '-f', 'lavfi', '-i', 'testsrc=d=1:s=64x64'];
  // One process for all of them: starting it costs more than the work.
  const files = formats.flatMap(([name, options]) => ['-strict', '-2', ...options, at(name)]);
  await run('ffmpeg', ['-v', 'error', '-y', '-i', at('tone.wav'), ...files]);
  await run('ffmpeg', [...picture, '-i', at('tone.wav'), at('film.mp4')]);
  await run('ffmpeg', [...picture, '-frames:v', '1', at('photo.jpg')]);
  await run('ffmpeg', [...picture, '-frames:v', '1', at('photo.png')]);
}, 60_000);

afterAll(() => rm(folder, { recursive: true, force: true }));

async function read(name: string, called = name) {
  return readBytes(await readFile(at(name)), called);
}

describe('other audio is recognised by its content', () => {
  it.each(formats)('%s %j is %s', async (name, _options, formatName, lossy) => {
    expect(await read(name)).toEqual({ kind: 'other-audio', formatName, lossy });
  });

  it('whatever its name says', async () => {
    const mp3 = { kind: 'other-audio', formatName: 'MP3', lossy: true };
    for (const called of ['Kick.wav', 'Kick', 'Kick.txt', 'bare.aif']) {
      expect(await read('a.mp3', called)).toEqual(mp3);
      expect(await read('bare.mp3', called)).toEqual(mp3);
    }
    for (const called of ['Kick.mp3', 'Kick', 'Kick.txt', 'Kick.WAVE']) {
      expect(await read('tone.wav', called)).toMatchObject({ kind: 'track' });
    }
  });

  it('also where it is cut short', async () => {
    for (const [name, formatName] of [
      ['a.flac', 'FLAC'],
      ['a.ogg', 'Ogg'],
      ['a.wma', 'WMA'],
    ] as const) {
      const cut = (await readFile(at(name))).subarray(0, 60);
      const reading = await readBytes(cut, name);
      expect(reading).toMatchObject({ kind: 'other-audio' });
      expect(JSON.stringify(reading)).toContain(formatName);
    }
  });

  it('with small reads and without reading it all', async () => {
    // A picture of 3 MB in front of the sound, as music from a shop has it.
    const picture = Buffer.alloc(3_000_000, 7);
    const frame = Buffer.concat([Buffer.from('PRIV'), Buffer.alloc(6), picture]);
    frame.writeUInt32BE(picture.length, 4);
    const size = frame.length;
    const syncsafe = [(size >> 21) & 127, (size >> 14) & 127, (size >> 7) & 127, size & 127];
    const id3 = Buffer.from([...Buffer.from('ID3'), 3, 0, 0, ...syncsafe]);
    const bytes = Buffer.concat([id3, frame, await readFile(at('bare.mp3'))]);
    const source = countingSource(bytesSource(bytes));
    expect(await readWave(source, 'a.mp3')).toMatchObject({ formatName: 'MP3', lossy: true });
    expect(source.counts.largest).toBeLessThanOrEqual(65536);
    expect(source.counts.bytes).toBeLessThan(5_000_000);
  });
});

describe('what is no audio is not taken for it', () => {
  it.each([
    ['film.mp4', 'not-audio'],
    ['photo.jpg', 'not-audio'],
    ['photo.png', 'not-audio'],
  ])('%s', async (name, kind) => {
    expect(await read(name)).toEqual({ kind });
    expect(await read(name, 'Kick.wav')).toMatchObject({ reason: 'no-audio-header' });
  });

  it.each([
    ['a text', Buffer.from('Night Bus North\n')],
    ['a text of 16 bits', Buffer.from('\ufeffPaper Ferry, take two, more words', 'utf16le')],
    ['MIDI', Buffer.from('MThd\0\0\0\x06\0\x01\0\x02\x01\xe0MTrk')],
    ['a photo of a phone', Buffer.from('\0\0\0\x18ftypheic\0\0\0\0mif1heic')],
    ['a document', Buffer.from('%PDF-1.4\n')],
    ['noise', Buffer.from(Array.from({ length: 5000 }, (_, i) => (i * i * 7 + i * 131) % 251))],
  ])('%s', async (_name, bytes) => {
    expect(await readBytes(bytes, 'notes')).toEqual({ kind: 'not-audio' });
    expect(await readBytes(bytes, 'Kick.wav')).toEqual({
      kind: 'unreadable',
      reason: 'no-audio-header',
      byteOffset: 0,
    });
  });

  it('a file on disk gives the same answer as its bytes', async () => {
    const { openNodeFile } = await import('../../../server/cli/node-files.ts');
    await copyFile(at('a.mp3'), at('Vocal.wav'));
    await writeFile(at('Bass.wav'), Buffer.alloc(10_000));
    for (const name of ['Vocal.wav', 'Bass.wav', 'tone.wav']) {
      const source = await openNodeFile(at(name));
      expect(await readWave(source, name)).toEqual(await read(name));
      await source.close();
    }
  });
});
