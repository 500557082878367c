import { describe, expect, it } from 'vitest';
import { readExtended80 } from '#shared/wave/read-aiff.ts';
import { sine, writeTestAiff, type TestAiff } from '../../support/audio-writer.ts';
import { readBytes, readTrack } from '../../support/reading.ts';

const stereo24: TestAiff = {
  sampleRateHz: 48000,
  encoding: 'pcm',
  bits: 24,
  channels: [sine(33, 24), sine(33, 24, 5)],
};

describe('the 80-bit sample rate', () => {
  // Apple AIFF 1.3, extended 80-bit; values produced by sox for these rates.
  it.each([
    ['400eac44000000000000', 44100],
    ['400ebb80000000000000', 48000],
    ['400fac44000000000000', 88200],
    ['400fbb80000000000000', 96000],
    ['4010bb80000000000000', 192000],
    // Computed by hand: 22254.5454... Hz of old machines is 2^14 × 1.358309..., rounded here.
    ['400dadddd1745d1745d1', 22255],
    ['3fff8000000000000000', 1],
    ['00000000000000000000', 0],
  ])('%s is %i Hz', (hex, rate) => {
    expect(readExtended80(Buffer.from(hex, 'hex'))).toBe(rate);
  });

  it('is no number where it is infinite or cut short', () => {
    expect(readExtended80(Buffer.from('7fff8000000000000000', 'hex'))).toBeNull();
    expect(readExtended80(Buffer.from('400eac44', 'hex'))).toBeNull();
  });
});

describe('AIFF and AIFC', () => {
  it('is described by COMM and SSND', async () => {
    const { format, layout } = await readTrack(writeTestAiff(stereo24), 'a.aif');
    expect(format).toEqual({
      container: 'aiff',
      encoding: 'pcm',
      sampleRateHz: 48000,
      bits: 24,
      containerBits: 24,
      channels: 2,
      frames: 33,
      timeReferenceFrames: null,
    });
    // 12 (FORM) + 8 + 18 (COMM) + 8 + 8 (SSND with offset and block size).
    expect(layout).toMatchObject({
      dataOffset: 54,
      dataBytes: 198,
      promisedDataBytes: 198,
      bytesPerFrame: 6,
      bigEndian: true,
      unsigned: false,
      channelMask: null,
    });
  });

  it.each([
    ['NONE', 'pcm', 16, { bigEndian: true }],
    ['twos', 'pcm', 24, { bigEndian: true }],
    ['sowt', 'pcm', 16, { bigEndian: false }],
    ['sowt', 'pcm', 24, { bigEndian: false }],
    ['in24', 'pcm', 24, { bigEndian: true }],
    ['in32', 'pcm', 32, { bigEndian: true }],
    ['42ni', 'pcm', 24, { bigEndian: false }],
    ['23ni', 'pcm', 32, { bigEndian: false }],
    ['raw ', 'pcm', 8, { unsigned: true }],
    ['fl32', 'float', 32, { bigEndian: true }],
    ['FL32', 'float', 32, { bigEndian: true }],
    ['fl64', 'float', 64, { bigEndian: true }],
    ['FL64', 'float', 64, { bigEndian: true }],
  ] as const)('AIFC %s with %s of %i bits', async (compression, encoding, bits, layout) => {
    const channels = [sine(40, encoding === 'float' ? 'float' : bits)];
    const bytes = writeTestAiff({ ...stereo24, compression, encoding, bits, channels });
    const reading = await readTrack(bytes, 'a.aifc');
    expect(reading.format).toMatchObject({ container: 'aifc', encoding, bits, frames: 40 });
    expect(reading.layout).toMatchObject(layout);
  });

  it('keeps 8-bit samples signed and places odd depths in whole bytes', async () => {
    const eight = await readTrack(writeTestAiff({ ...stereo24, bits: 8, channels: [sine(5, 8)] }));
    expect(eight.layout).toMatchObject({ unsigned: false, bytesPerFrame: 1 });
    const twenty = await readTrack(
      writeTestAiff({ ...stereo24, bits: 20, channels: [sine(5, 20)] }),
    );
    expect(twenty.format).toMatchObject({ bits: 20, containerBits: 24 });
  });

  it('finds audio behind the offset SSND asks for, and chunks on both sides', async () => {
    const text = { id: 'ANNO', bytes: Buffer.from('odd') };
    const bytes = writeTestAiff({ ...stereo24, lead: 10, before: [text], after: [text] });
    const { layout, format } = await readTrack(bytes);
    expect(format.frames).toBe(33);
    expect(layout.dataOffset).toBe(54 + 12 + 10);
    expect(layout.chunks.map(({ id }) => id)).toEqual(['COMM', 'ANNO', 'SSND', 'ANNO']);
  });

  it('reads a streamed file to its end', async () => {
    const bytes = writeTestAiff({ ...stereo24, lies: { frames: 0, ssndBytes: 0 } });
    const { layout, format } = await readTrack(bytes);
    expect(format.frames).toBe(33);
    expect(layout.promisedDataBytes).toBeNull();
  });

  it('keeps the promise of a file that was cut short', async () => {
    const { layout, format } = await readTrack(writeTestAiff(stereo24).subarray(0, 54 + 60));
    expect(format.frames).toBe(10);
    expect(layout).toMatchObject({ dataBytes: 60, promisedDataBytes: 198 });
  });

  it('believes COMM where SSND holds more', async () => {
    const { layout, format } = await readTrack(
      writeTestAiff({ ...stereo24, lies: { frames: 20 } }),
    );
    expect(format.frames).toBe(20);
    expect(layout.dataBytes).toBe(120);
  });

  it('reads markers and the name', async () => {
    // MARK (Apple AIFF 1.3): count, then id, position and a Pascal string of even length.
    const mark = Buffer.from([
      0,
      2,
      0,
      1,
      0,
      0,
      0,
      20,
      5,
      ...Buffer.from('Verse'),
      0,
      2,
      0,
      0,
      0,
      4,
      4,
      ...Buffer.from('Intr'),
      0,
    ]);
    const { markers, trackName } = await readTrack(
      writeTestAiff({
        ...stereo24,
        after: [
          { id: 'MARK', bytes: mark },
          { id: 'NAME', bytes: Buffer.from('Tambourine') },
        ],
      }),
    );
    expect(markers).toEqual([
      { startFrame: 4, label: 'Intr' },
      { startFrame: 20, label: 'Verse' },
    ]);
    expect(trackName).toBe('Tambourine');
  });

  it.each([
    ['no channels', { lies: { channels: 0 } }, 'impossible-format', 20],
    ['no bits', { lies: { bits: 0 } }, 'impossible-format', 26],
    ['64 bits', { lies: { bits: 64 } }, 'unsupported-encoding', 26],
    ['no rate', { lies: { rate: new Uint8Array(10) } }, 'impossible-format', 28],
    [
      'infinite rate',
      { lies: { rate: Buffer.from('7fff8000000000000000', 'hex') } },
      'impossible-format',
      28,
    ],
    ['unknown compression', { compression: 'xyzw' }, 'unsupported-encoding', 12 + 12 + 8 + 18],
  ] as const)('%s is told with its place', async (_name, change, reason, byteOffset) => {
    const bytes = writeTestAiff({ ...stereo24, ...change });
    expect(await readBytes(bytes, 'a.aif')).toEqual({ kind: 'unreadable', reason, byteOffset });
  });

  it('compressed AIFC is other audio', async () => {
    for (const compression of ['ulaw', 'ALAW', 'ima4']) {
      const bytes = writeTestAiff({ ...stereo24, compression });
      expect(await readBytes(bytes)).toMatchObject({ kind: 'other-audio', lossy: true });
    }
  });
});
