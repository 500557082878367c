import { describe, expect, it } from 'vitest';
import { sine, writeTestWave, type TestWave } from '../../support/audio-writer.ts';
import { readBytes, readTrack } from '../../support/reading.ts';

const mono24: TestWave = {
  sampleRateHz: 48000,
  encoding: 'pcm',
  bits: 24,
  channels: [sine(101, 24)],
};
const stereo16: TestWave = {
  sampleRateHz: 44100,
  encoding: 'pcm',
  bits: 16,
  channels: [sine(50, 16), sine(50, 16, 5)],
};

describe('a plain file', () => {
  it('is described by its header', async () => {
    const { format, layout } = await readTrack(writeTestWave(stereo16));
    expect(format).toEqual({
      container: 'wav',
      encoding: 'pcm',
      sampleRateHz: 44100,
      bits: 16,
      containerBits: 16,
      channels: 2,
      frames: 50,
      timeReferenceFrames: null,
    });
    // 12 + 8 + 16 + 8: the shortest header there is.
    expect(layout).toEqual({
      chunks: [
        { id: 'fmt ', contentOffset: 20, contentBytes: 16 },
        { id: 'data', contentOffset: 44, contentBytes: 200 },
      ],
      dataOffset: 44,
      dataBytes: 200,
      promisedDataBytes: 200,
      bytesPerFrame: 4,
      bigEndian: false,
      unsigned: false,
      channelMask: null,
    });
  });

  it.each([
    ['8-bit', { bits: 8 }, { bits: 8, containerBits: 8 }],
    ['16-bit', { bits: 16 }, { bits: 16, containerBits: 16 }],
    ['24-bit', { bits: 24 }, { bits: 24, containerBits: 24 }],
    ['32-bit', { bits: 32 }, { bits: 32, containerBits: 32 }],
    ['20 in 24, extensible', { bits: 20, channelMask: 4 }, { bits: 20, containerBits: 24 }],
    ['20 in 24, short', { bits: 20 }, { bits: 20, containerBits: 24 }],
    ['24 in 32', { bits: 24, containerBits: 32, channelMask: 4 }, { bits: 24, containerBits: 32 }],
    // A container wider than it needs, in the short form: only the byte rate can confirm it.
    ['24 in 32, short', { bits: 24, containerBits: 32 }, { bits: 24, containerBits: 32 }],
  ] as const)('of %s PCM', async (_name, written, read) => {
    const wave = { ...mono24, ...written, channels: [sine(101, written.bits)] };
    const { format, layout } = await readTrack(writeTestWave(wave));
    expect(format).toMatchObject({ ...read, encoding: 'pcm', frames: 101, channels: 1 });
    expect(layout.bytesPerFrame).toBe(read.containerBits / 8);
    expect(layout.unsigned).toBe(read.bits === 8);
  });

  it.each([32, 64] as const)('of %i-bit float', async (bits) => {
    const wave = { ...mono24, encoding: 'float', bits, channels: [sine(9, 'float')] } as const;
    expect((await readTrack(writeTestWave(wave))).format).toMatchObject({
      encoding: 'float',
      bits,
      containerBits: bits,
      frames: 9,
    });
    const extensible = await readTrack(writeTestWave({ ...wave, channelMask: 4 }));
    expect(extensible.format).toMatchObject({ encoding: 'float', bits });
    expect(extensible.layout.channelMask).toBe(4);
  });

  it.each(['RF64', 'BW64'] as const)('with the sizes of %s', async (form) => {
    const { format, layout } = await readTrack(writeTestWave({ ...stereo16, form }));
    expect(format).toMatchObject({ container: form.toLowerCase(), frames: 50 });
    expect(layout).toMatchObject({ dataBytes: 200, promisedDataBytes: 200 });
  });
});

describe('chunks around the audio', () => {
  const odd = { id: 'note', bytes: new Uint8Array(7).fill(0x41) };
  const chunks = [
    { id: 'JUNK', bytes: new Uint8Array(28) },
    { id: 'LIST', bytes: new Uint8Array(5) },
    { id: 'bext', bytes: new Uint8Array(603) },
  ];

  it('are found before and after, odd ones by their pad byte', async () => {
    const bytes = writeTestWave({ ...mono24, before: [odd, ...chunks], after: [odd, ...chunks] });
    const { layout, format } = await readTrack(bytes);
    expect(format.frames).toBe(101);
    const ids = ['note', 'JUNK', 'LIST', 'bext'];
    expect(layout.chunks.map(({ id }) => id)).toEqual([...ids, 'fmt ', 'data', ...ids]);
    const last = layout.chunks.at(-1)!;
    expect(last.contentOffset + last.contentBytes + 1).toBe(bytes.length);
  });

  it('are found where the writer forgot the pad byte', async () => {
    // 101 frames of three bytes: the data is odd, too.
    const bytes = writeTestWave({
      ...mono24,
      before: [chunks[1]!],
      after: [chunks[2]!, chunks[0]!],
      forgetPadBytes: true,
    });
    const { layout, format } = await readTrack(bytes);
    expect(format.frames).toBe(101);
    expect(layout.chunks.map(({ id }) => id)).toEqual(['LIST', 'fmt ', 'data', 'bext', 'JUNK']);
  });

  it('end where garbage begins', async () => {
    for (const trailing of [
      Buffer.from([0, 0, 0, 0, 9, 9, 9, 9]),
      Buffer.from('TAGThis is 1997'),
    ]) {
      const { layout, format } = await readTrack(writeTestWave({ ...stereo16, trailing }));
      expect(format.frames).toBe(50);
      expect(layout.chunks.map(({ id }) => id)).toEqual(['fmt ', 'data']);
    }
  });

  it('are found though the size of the whole is a lie', async () => {
    for (const riffBytes of [0, 4, 36, 0xffffffff]) {
      const bytes = writeTestWave({ ...stereo16, after: chunks, lies: { riffBytes } });
      const { layout } = await readTrack(bytes);
      expect(layout.chunks.map(({ id }) => id)).toEqual(['fmt ', 'data', 'JUNK', 'LIST', 'bext']);
      expect(layout.promisedDataBytes).toBe(200);
    }
  });
});

describe('sizes that do not fit', () => {
  it.each([0, 0xffffffff, 0x7ffff000, 0x7ffffffc, 0x80000000, 0xfffffff0])(
    'a streamed header (%i) promises nothing, the audio runs to the end',
    async (dataBytes) => {
      const { format, layout } = await readTrack(
        writeTestWave({ ...stereo16, lies: { dataBytes, riffBytes: dataBytes } }),
      );
      expect(format.frames).toBe(50);
      expect(layout.promisedDataBytes).toBeNull();
    },
  );

  it('a file cut short keeps what is there and what was promised', async () => {
    const { format, layout } = await readTrack(writeTestWave(stereo16).subarray(0, 44 + 101));
    expect(format.frames).toBe(25);
    expect(layout).toMatchObject({ dataBytes: 100, promisedDataBytes: 200 });
  });

  it('audio beyond the promised size is not taken for a chunk', async () => {
    const { format, layout } = await readTrack(
      writeTestWave({ ...mono24, lies: { dataBytes: 150, riffBytes: 186 } }),
    );
    expect(format.frames).toBe(50);
    expect(layout.promisedDataBytes).toBe(150);
  });

  it('an incomplete last frame is left out', async () => {
    const { format, layout } = await readTrack(
      writeTestWave({ ...stereo16, lies: { dataBytes: 199 } }),
    );
    expect(format.frames).toBe(49);
    expect(layout.dataBytes).toBe(196);
  });

  it.each([{ blockAlign: 2 }, { blockAlign: 0 }, { byteRate: 0 }, { byteRate: 1, blockAlign: 17 }])(
    'wrong block align and byte rate change nothing: %o',
    async (lies) => {
      const { format, layout } = await readTrack(writeTestWave({ ...stereo16, lies }));
      expect(format).toMatchObject({ bits: 16, containerBits: 16, frames: 50 });
      expect(layout.bytesPerFrame).toBe(4);
    },
  );

  it('valid bits beyond the container are not believed', async () => {
    for (const validBits of [0, 25, 0xffff]) {
      const wave = { ...mono24, channelMask: 4, lies: { validBits } };
      expect((await readTrack(writeTestWave(wave))).format.bits).toBe(24);
    }
  });

  it('in RF64 only a field that says so is replaced (EBU Tech 3306)', async () => {
    const { layout } = await readTrack(
      writeTestWave({ ...stereo16, form: 'RF64', lies: { dataBytes: 100 } }),
    );
    expect(layout.promisedDataBytes).toBe(100);
  });
});

describe('damage is told with its reason and place', () => {
  const whole = writeTestWave(stereo16);
  const noData = Buffer.concat([whole.subarray(0, 36), Buffer.from('LIST\x04\0\0\0INFO')]);
  it.each([
    ['nothing', Buffer.alloc(0), 'empty-file', 0],
    ['zeros', Buffer.alloc(4000), 'no-audio-header', 0],
    ['a text', Buffer.from('Salt on the Windows, vocals by Juno'), 'no-audio-header', 0],
    ['another RIFF form', Buffer.from('RIFF\x04\0\0\0AVI '), 'no-audio-header', 0],
    ['the first bytes only', whole.subarray(0, 9), 'header-cut-short', 9],
    ['half a format', whole.subarray(0, 30), 'header-cut-short', 30],
    ['a format alone', whole.subarray(0, 36), 'no-data-chunk', 36],
    ['no data', noData, 'no-data-chunk', 48],
    [
      'no format',
      Buffer.concat([whole.subarray(0, 12), whole.subarray(36)]),
      'no-format-chunk',
      220,
    ],
    ['an empty data chunk', whole.subarray(0, 44), 'no-audio-in-data', 44],
    ['no channels', writeTestWave({ ...stereo16, lies: { channels: 0 } }), 'impossible-format', 22],
    ['no rate', writeTestWave({ ...stereo16, lies: { sampleRateHz: 0 } }), 'impossible-format', 24],
    ['no bits', writeTestWave({ ...stereo16, lies: { bits: 0 } }), 'impossible-format', 34],
    ['48 bits', writeTestWave({ ...stereo16, lies: { bits: 48 } }), 'unsupported-encoding', 34],
    [
      'an unknown tag',
      writeTestWave({ ...stereo16, lies: { tag: 0x4242 } }),
      'unsupported-encoding',
      20,
    ],
    ['16-bit float', writeTestWave({ ...stereo16, lies: { tag: 3 } }), 'unsupported-encoding', 34],
  ] as const)('%s', async (_name, bytes, reason, byteOffset) => {
    expect(await readBytes(bytes)).toEqual({ kind: 'unreadable', reason, byteOffset });
  });

  it('an empty data chunk before other chunks holds no audio', async () => {
    const bytes = writeTestWave({
      ...stereo16,
      channels: [[], []],
      after: [{ id: 'LIST', bytes: Buffer.from('INFO') }],
    });
    expect(await readBytes(bytes)).toMatchObject({ reason: 'no-audio-in-data', byteOffset: 44 });
  });

  it('a source that cannot be read is one more reason', async () => {
    const { readWave } = await import('#shared/wave/read-wave.ts');
    const { AppError } = await import('#shared/errors.ts');
    const source = {
      size: 100,
      read: () => Promise.reject(new AppError('no-access')),
      // eslint-disable-next-line require-yield, @typescript-eslint/require-await -- the interface
      async *stream() {
        throw new AppError('no-access');
      },
    };
    expect(await readWave(source, 'kick.wav')).toMatchObject({ reason: 'could-not-be-read' });
  });

  it('a file that never claimed to be audio is none', async () => {
    for (const name of ['lyrics.txt', '.DS_Store']) {
      expect(await readBytes(Buffer.from('some words'), name)).toEqual({ kind: 'not-audio' });
      expect(await readBytes(Buffer.alloc(0), name)).toEqual({ kind: 'not-audio' });
    }
  });
});
