import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { readBytes, readTrack } from '../../support/reading.ts';

const fixture = (name: string) =>
  readFile(new URL(`../../../fixtures/wave/${name}`, import.meta.url));

/** Codec, rate, channels and frames as ffprobe 5.1 printed them (fixtures/wave/README.md). */
const tracks = [
  ['pcm-16-mono.wav', 'pcm_s16le', 48000, 1, 400],
  ['pcm-24-extensible.wav', 'pcm_s24le', 48000, 2, 400],
  ['float-list-first.wav', 'pcm_f32le', 48000, 2, 400],
  ['rf64.wav', 'pcm_s24le', 48000, 2, 400],
  ['bext.wav', 'pcm_s24le', 48000, 1, 400],
  ['streamed.wav', 'pcm_s16le', 48000, 1, 400],
  ['cut-short.wav', 'pcm_s16le', 48000, 1, 200],
  ['rate-96000.aiff', 'pcm_s24be', 96000, 1, 400],
  ['little-endian.aifc', 'pcm_s16le', 48000, 1, 400],
] as const;

describe('headers as sox and ffmpeg left them', () => {
  it.each(tracks)('%s', async (name, codec, rate, channels, frames) => {
    const { format, layout } = await readTrack(await fixture(name), name);
    const type = format.encoding === 'float' ? 'f' : 's';
    const order = layout.bigEndian ? 'be' : 'le';
    expect(`pcm_${type}${format.bits}${order}`).toBe(codec);
    expect([format.sampleRateHz, format.channels, format.frames]).toEqual([rate, channels, frames]);
  });

  it('with what makes each special', async () => {
    expect((await readTrack(await fixture('bext.wav'))).format.timeReferenceFrames).toBe(
      172_800_000,
    );
    expect((await readTrack(await fixture('rf64.wav'))).format.container).toBe('rf64');
    expect((await readTrack(await fixture('streamed.wav'))).layout.promisedDataBytes).toBeNull();
    expect((await readTrack(await fixture('cut-short.wav'))).layout.promisedDataBytes).toBe(800);
    expect((await readTrack(await fixture('pcm-24-extensible.wav'))).layout.channelMask).toBe(3);
    for (const [name, formatName] of [
      ['mp3-inside.wav', 'MP3 in a WAV file'],
      ['an-mp3-called.wav', 'MP3'],
    ] as const) {
      const reading = await readBytes(await fixture(name), name);
      expect(reading).toEqual({ kind: 'other-audio', formatName, lossy: true });
    }
  });
});
