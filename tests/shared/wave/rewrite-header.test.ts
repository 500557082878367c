import { open, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import fc from 'fast-check';
import wavefile from 'wavefile';
import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { rewriteHeader, type HeaderRewrite } from '#shared/wave/rewrite-header.ts';
import { buildWaveHeader, writeFmt } from '#shared/wave/write-wave-header.ts';
import {
  bextChunk,
  cueChunks,
  infoChunk,
  ixmlChunk,
  sine,
  writeTestAiff,
  writeTestWave,
  type TestChunk,
  type TestWave,
} from '../../support/audio-writer.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { readTrack } from '../../support/reading.ts';

const mono24: TestWave = {
  sampleRateHz: 48000,
  encoding: 'pcm',
  bits: 24,
  channels: [sine(501, 24)],
};

/** The file that comes out: silence in front or frames dropped as a move asks for. */
async function rewrite(bytes: Buffer, change: Partial<HeaderRewrite> = {}) {
  const reading = await readTrack(bytes);
  const { layout } = reading;
  const moveByFrames = change.moveByFrames ?? 0;
  const channels = change.format?.channels ?? reading.format.channels;
  const frames = reading.format.frames + moveByFrames;
  const frameBytes = (layout.bytesPerFrame / reading.format.channels) * channels;
  const silence = Buffer.alloc(Math.max(0, moveByFrames) * frameBytes);
  const from = layout.dataOffset + Math.max(0, -moveByFrames) * frameBytes;
  const kept = Math.min(frames, reading.format.frames) * frameBytes;
  const { before, after, unchanged } = await rewriteHeader({
    source: bytesSource(bytes),
    reading,
    format: { ...reading.format, frames },
    dataBytes: frames * frameBytes,
    moveByFrames,
    ...change,
  });
  const data = bytes.subarray(from, from + kept);
  return { bytes: Buffer.concat([before, silence, data, after]), unchanged };
}

/** Metadata in the words of ffprobe. */
function tagsByFfprobe(bytes: Uint8Array): Promise<Record<string, string>> {
  return withFolder(async (folder) => {
    const path = join(folder, 'Kick In.wav');
    await writeFile(path, bytes);
    const out = await run('ffprobe', ['-v', 'error', '-of', 'json', '-show_format', path]);
    return (JSON.parse(out) as { format: { tags: Record<string, string> } }).format.tags;
  });
}

const harmless: TestChunk[] = [
  bextChunk({ description: 'Kick In', timeReference: 96_000n, codingHistory: 'A=PCM,F=48000\r\n' }),
  infoChunk({ INAM: 'Kick In', ICRD: '2026-12-01' }),
  { id: 'acid', bytes: new Uint8Array(24).fill(3) },
  { id: 'Zz9 ', bytes: new Uint8Array(33).fill(0xee) },
  ...cueChunks([{ startFrame: 100, label: 'Verse' }]),
  ixmlChunk('<TRACK_LIST><TRACK><NAME>Kick In</NAME></TRACK></TRACK_LIST>'),
];

describe('a file that needs nothing', () => {
  it('keeps its bytes, whatever stands around the audio', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.constantFrom('RIFF' as const, 'RF64' as const, 'BW64' as const),
        fc.subarray(harmless),
        fc.subarray(harmless),
        fc.boolean(),
        fc.constantFrom(Buffer.alloc(0), Buffer.from([0, 0, 0, 9, 8, 7]), Buffer.from('\0end')),
        fc.constantFrom({}, { dataBytes: 0xffffffff }, { byteRate: 5 }, { riffBytes: 4 }),
        async (form, before, after, forgetPadBytes, trailing, lies) => {
          const streamed = 'dataBytes' in lies && form === 'RIFF';
          const bytes = writeTestWave({
            ...mono24,
            form,
            before,
            after: streamed ? [] : after,
            forgetPadBytes,
            trailing: streamed ? Buffer.alloc(0) : trailing,
            lies: 'dataBytes' in lies && !streamed ? {} : lies,
          });
          const out = await rewrite(bytes);
          expect(out.unchanged).toBe(true);
          expect(out.bytes.equals(bytes)).toBe(true);
        },
      ),
      { seed: 20261201, numRuns: 150 },
    );
  });
});

describe('what names people and their computers stays behind', () => {
  const personal: TestChunk[] = [
    bextChunk({
      description: '/Users/juno/Music/Salt on the Windows/Kick In.wav',
      originator: 'Juno Park',
      originatorReference: 'SERIAL-0042',
      timeReference: 172_800_000n,
      codingHistory: 'A=PCM,F=48000,W=24,T=C:\\Users\\juno\\Kick.wav\r\n',
      version: 1,
      umid: new Uint8Array(64).fill(6),
    }),
    infoChunk({
      INAM: 'Kick In',
      IART: 'Juno Park',
      IENG: 'Sol Reyes',
      ITCH: 'Sol Reyes',
      ISFT: 'A program 5.1',
      ICMT: 'ask juno.park@velvet-tramline.example about \\\\studio-nas\\takes\\kick',
    }),
    ixmlChunk(
      '<PROJECT>Juno secret</PROJECT><NOTE>from file:///home/juno/takes/kick.wav</NOTE>' +
        '<USER><FULL>Juno Park</FULL></USER><LOCATION><NAME>Juno Street 5</NAME></LOCATION>' +
        '<BEXT><BWF_ORIGINATOR>Juno Park</BWF_ORIGINATOR></BEXT>' +
        '<TRACK_LIST><TRACK><NAME>Kick &amp; In</NAME></TRACK></TRACK_LIST>',
    ),
    { id: 'JUNK', bytes: Buffer.from('left over: juno in memory') },
    { id: 'prgm', bytes: Buffer.from('\0\0/Volumes/Juno Disk/a.bin\0\0') },
    { id: 'wide', bytes: Buffer.from('C:\\Users\\juno\\session.dat', 'utf16le') },
    { id: 'id3 ', bytes: Buffer.from('ID3\x03\0\0\0\0\0\x20TPE1 Juno Park') },
    { id: '_PMX', bytes: Buffer.from('<x:xmpmeta><dc:creator>Juno</dc:creator></x:xmpmeta>') },
    { id: 'cart', bytes: Buffer.from('0101 Juno Park') },
    { id: 'good', bytes: Buffer.from('nothing about anybody') },
  ];

  it.each(['before', 'after'] as const)('%s the audio', async (side) => {
    const source = writeTestWave({ ...mono24, [side]: personal });
    const { bytes, unchanged } = await rewrite(source);
    expect(unchanged).toBe(false);
    const text = bytes.toString('latin1').replaceAll('\0', '');
    expect(text).not.toMatch(/juno|sol reyes|serial|users|volumes|studio-nas|tramline/i);
    expect(text).toContain('nothing about anybody');
    expect(text).toContain('A program 5.1');
    expect(text).toContain('<NAME>Kick &amp; In</NAME>');

    const before = await readTrack(source);
    const after = await readTrack(bytes);
    expect(after.format).toEqual(before.format);
    expect(after.layout.chunks.map(({ id }) => id)).not.toContain('id3 ');
    const samples = (of: typeof before, from: Buffer) =>
      from.subarray(of.layout.dataOffset, of.layout.dataOffset + of.layout.dataBytes);
    expect(samples(after, bytes).equals(samples(before, source))).toBe(true);

    // What is left, in the words of wavefile and ffprobe.
    const wave = new wavefile.WaveFile(bytes);
    const bext = wave.bext as Record<string, unknown>;
    expect(bext['description']).toMatch(/^Kick In\.wav\0*$/);
    expect(bext['timeReference']).toEqual([172_800_000, 0]);
    expect(wave.listTags()).toMatchObject({ INAM: 'Kick In', ISFT: 'A program 5.1' });
    const tags = await tagsByFfprobe(bytes);
    expect(tags).toMatchObject({ time_reference: '172800000', title: 'Kick In' });
    expect(tags).not.toHaveProperty('artist');
    expect(tags).not.toHaveProperty('encoded_by');
  });

  it('a broken iXML is not carried on, bytes behind everything neither', async () => {
    const broken = { id: 'iXML', bytes: Buffer.from('<BWFXML><USER>Juno</BWFXML>') };
    for (const wave of [
      { ...mono24, after: [broken] },
      { ...mono24, trailing: Buffer.from('\0\0/home/juno/x') },
    ]) {
      const { bytes, unchanged } = await rewrite(writeTestWave(wave));
      expect(unchanged).toBe(false);
      expect(bytes.toString('latin1')).not.toContain('uno');
    }
  });
});

describe('a moved file', () => {
  const stamped = writeTestWave({
    ...mono24,
    before: [
      bextChunk({ timeReference: 4_294_967_400n, version: 2, loudness: [-2300, 500, -100, 0, 0] }),
    ],
    after: [
      ...cueChunks([
        { startFrame: 10, label: 'Intro' },
        { startFrame: 400, label: 'Verse' },
      ]),
      { id: 'PEAK', bytes: new Uint8Array(16) },
      { id: 'Zz9 ', bytes: new Uint8Array(8) },
      ixmlChunk(
        '<SPEED><TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI>1</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI>' +
          '<TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO>104</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO></SPEED>',
      ),
    ],
  });

  it('keeps every sample at its time on the clock', async () => {
    const { bytes } = await rewrite(stamped, { moveByFrames: 200 });
    const reading = await readTrack(bytes);
    expect(reading.format).toMatchObject({ frames: 701, timeReferenceFrames: 4_294_967_200 });
    expect(reading.markers).toEqual([
      { startFrame: 210, label: 'Intro' },
      { startFrame: 600, label: 'Verse' },
    ]);
    expect(bytes.toString('latin1')).toContain('_HI>0</');
    expect(bytes.toString('latin1')).toContain('_LO>4294967200</');
    const wave = new wavefile.WaveFile(bytes);
    expect((wave.bext as Record<string, unknown>)['timeReference']).toEqual([4_294_967_200, 0]);
    // wavefile tells places in milliseconds at 48 kHz.
    const cues = wave.listCuePoints() as { position: number; label: string }[];
    expect(cues.map(({ position, label }) => [label, Math.round(position * 48)])).toEqual([
      ['Intro', 210],
      ['Verse', 600],
    ]);
  });

  it('loses the markers that are cut off', async () => {
    const { bytes } = await rewrite(stamped, { moveByFrames: -100 });
    const reading = await readTrack(bytes);
    expect(reading.format).toMatchObject({ frames: 401, timeReferenceFrames: 4_294_967_500 });
    expect(reading.markers).toEqual([{ startFrame: 300, label: 'Verse' }]);
    expect(bytes.includes('Intro')).toBe(false);
  });

  it('begins where it is told to', async () => {
    const { bytes } = await rewrite(stamped, { moveByFrames: -100, timeReferenceFrames: 48_000 });
    expect((await readTrack(bytes)).format.timeReferenceFrames).toBe(48_000);
  });

  it('a time counted at another rate is taken out, not moved wrongly', async () => {
    const list = ixmlChunk(
      '<SPEED><TIMESTAMP_SAMPLE_RATE>44100</TIMESTAMP_SAMPLE_RATE>' +
        '<TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO>77</TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO></SPEED>',
    );
    const bext = bextChunk({ timeReference: 500n });
    const bytes = writeTestWave({ ...mono24, before: [bext, list] });
    const moved = await rewrite(bytes, { moveByFrames: 10 });
    expect(moved.bytes.includes('SINCE_MIDNIGHT')).toBe(false);
    expect((await readTrack(moved.bytes)).format.timeReferenceFrames).toBe(490);
    const still = await rewrite(bytes, { audioChanged: true });
    expect(still.bytes.includes('SINCE_MIDNIGHT_LO>77<')).toBe(true);
  });

  it('never begins before midnight', async () => {
    const early = writeTestWave({ ...mono24, before: [bextChunk({ timeReference: 5n })] });
    const { bytes } = await rewrite(early, { moveByFrames: 10 });
    expect((await readTrack(bytes)).format.timeReferenceFrames).toBe(0);
  });

  it('takes back what was said about the old samples', async () => {
    const { bytes } = await rewrite(stamped, { audioChanged: true });
    const { layout } = await readTrack(bytes);
    const ids = layout.chunks.map(({ id }) => id);
    expect(ids).toEqual(['bext', 'fmt ', 'data', 'cue ', 'LIST', 'iXML']);
    // EBU Tech 3285 v2: 7FFFh is the value of a figure that was not measured.
    const bext = new wavefile.WaveFile(bytes).bext as Record<string, number>;
    expect(bext['loudnessValue']).toBe(0x7fff);
    expect(bext['maxShortTermLoudness']).toBe(0x7fff);
  });
});

describe('another shape', () => {
  it('one side of a stereo file is a mono file in front of one speaker', async () => {
    const list = ixmlChunk(
      '<TRACK_LIST><TRACK><NAME>L</NAME></TRACK><TRACK><NAME>R</NAME></TRACK></TRACK_LIST>',
    );
    const bytes = writeTestWave({
      ...mono24,
      channels: [sine(60, 24), sine(60, 24)],
      channelMask: 3,
      after: [list],
    });
    const { format } = await readTrack(bytes);
    const out = await rewrite(bytes, { format: { ...format, channels: 1 } });
    const reading = await readTrack(out.bytes);
    expect(reading.format).toMatchObject({ channels: 1, frames: 60 });
    // Speaker masks as FL = 1, FR = 2, FC = 4 (Microsoft, WAVEFORMATEXTENSIBLE).
    expect(reading.layout.channelMask).toBe(4);
    expect(out.bytes.includes('TRACK_LIST')).toBe(false);
  });

  it('an AIFF becomes a WAV with its markers and its name', async () => {
    const mark = Buffer.from([0, 1, 0, 1, 0, 0, 0, 20, 5, ...Buffer.from('Verse')]);
    const bytes = writeTestAiff({
      sampleRateHz: 44100,
      encoding: 'pcm',
      bits: 20,
      channels: [sine(33, 20)],
      after: [
        { id: 'MARK', bytes: mark },
        { id: 'NAME', bytes: Buffer.from('Tambourine') },
        { id: 'AUTH', bytes: Buffer.from('Juno Park') },
      ],
    });
    const out = (await rewrite(bytes)).bytes;
    const reading = await readTrack(out);
    expect(reading.format).toMatchObject({
      container: 'wav',
      bits: 20,
      containerBits: 24,
      frames: 33,
    });
    expect(reading.markers).toEqual([{ startFrame: 20, label: 'Verse' }]);
    expect(await tagsByFfprobe(out)).toMatchObject({ title: 'Tambourine' });
    expect(out.includes('Juno')).toBe(false);
  });

  it('wrong sizes are put right once the header is written', async () => {
    const lies = { dataBytes: 0xffffffff, riffBytes: 0, byteRate: 1, blockAlign: 9 };
    const bytes = writeTestWave({ ...mono24, lies, before: [bextChunk({ originator: 'Juno' })] });
    const out = (await rewrite(bytes)).bytes;
    const { layout } = await readTrack(out);
    expect(layout.promisedDataBytes).toBe(501 * 3);
    expect(out.readUInt32LE(4)).toBe(out.length - 8);
    await withFolder(async (folder) => {
      const path = join(folder, 'a.wav');
      await writeFile(path, out);
      const script =
        'import sys, wave; w = wave.open(sys.argv[1]); print(w.getnframes(), w.getsampwidth())';
      expect((await run('python3', ['-c', script, path])).trim()).toBe('501 3');
    });
  });
});

describe('a new header', () => {
  const format = {
    container: 'wav',
    encoding: 'pcm',
    sampleRateHz: 48000,
    bits: 24,
    containerBits: 24,
    channels: 2,
    frames: 0,
    timeReferenceFrames: null,
  } as const;

  it.each([
    [{ bits: 16, containerBits: 16 }, 16, 1],
    [{}, 40, 0xfffe],
    [{ encoding: 'float', bits: 32, containerBits: 32 }, 18, 3],
    [{ encoding: 'float', bits: 32, containerBits: 32, channels: 6 }, 40, 0xfffe],
    [{ bits: 16, containerBits: 16, channels: 3 }, 40, 0xfffe],
    [{ bits: 20 }, 40, 0xfffe],
  ] as const)('of %o has the form sox and ffmpeg give it', (change, bytes, tag) => {
    const fmt = writeFmt({ ...format, ...change });
    expect(fmt.length).toBe(bytes);
    expect(Buffer.from(fmt).readUInt16LE(0)).toBe(tag);
  });

  it.each([
    ['just under 4 GiB', 2 ** 32 - 200, 'RIFF'],
    ['just over it', 2 ** 32 + 4, 'RF64'],
    ['five GiB', 5 * 2 ** 30 + 2, 'RF64'],
  ])('%s says what ffprobe reads', async (_name, wanted, form) => {
    const frames = Math.floor(wanted / 6);
    const dataBytes = frames * 6;
    const { before, after } = buildWaveHeader({
      container: 'wav',
      dataBytes,
      frames,
      before: [{ id: 'fmt ', bytes: writeFmt(format) }],
      after: [{ id: 'LIST', bytes: Buffer.from('INFO') }],
    });
    expect(Buffer.from(before.subarray(0, 4)).toString()).toBe(form);
    await withFolder(async (folder) => {
      const path = join(folder, 'long.wav');
      const file = await open(path, 'w');
      await file.write(before, 0, before.length, 0);
      await file.write(after, 0, after.length, before.length + dataBytes);
      await file.close();
      const show = ['-v', 'error', '-of', 'csv=p=0', '-show_entries', 'stream=duration_ts'];
      expect(Number(await run('ffprobe', [...show, path]))).toBe(frames);
    });
  });
});
