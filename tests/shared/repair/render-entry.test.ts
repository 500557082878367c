import { truncate } from 'node:fs/promises';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { AppError } from '#shared/errors.ts';
import { renderEntry } from '#shared/repair/render-entry.ts';
import type { Operation } from '#shared/repair/repair-plan.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import {
  sine,
  writeTestAiff,
  writeTestWave,
  type TestSamples,
} from '../../support/audio-writer.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { allBytes, droppedBytes, rendered, savedIn, soxSamples } from '../../support/rendering.ts';

type Form = Pick<TestSamples, 'encoding' | 'bits' | 'containerBits'>;

/** Every form samples can have in a WAV file. */
const forms: Form[] = [
  { encoding: 'pcm', bits: 8 },
  { encoding: 'pcm', bits: 16 },
  { encoding: 'pcm', bits: 24 },
  { encoding: 'pcm', bits: 20, containerBits: 24 },
  { encoding: 'pcm', bits: 32 },
  { encoding: 'float', bits: 32 },
  { encoding: 'float', bits: 64 },
];

const name = ({ encoding, bits, containerBits }: Form) =>
  `${encoding} ${bits}${containerBits ? ` in ${containerBits}` : ''}`;
const cases = forms.map((form) => [name(form), form] as const);

const frames = 997;

function samples(form: Form, channels = 1): TestSamples {
  const kind = form.encoding === 'float' ? 'float' : form.bits;
  return {
    ...form,
    sampleRateHz: 48_000,
    channels: Array.from({ length: channels }, (_, channel) => sine(frames, kind, 5 + 2 * channel)),
  };
}

const wave = (form: Form, channels = 1) =>
  writeTestWave({
    ...samples(form, channels),
    ...(form.containerBits ? { channelMask: channels === 1 ? 4 : 3 } : {}),
  });

/**
 * sox refuses a header that says 20 bits in 24; the same samples under a header of 24 bits are
 * what it can read. Valid bits stand 18 bytes into `fmt `, which comes first here.
 */
function readableBySox(bytes: Uint8Array): Uint8Array {
  const copy = Buffer.from(bytes);
  if (copy.readUInt16LE(20) === 0xfffe && copy.readUInt16LE(38) === 20) copy.writeUInt16LE(24, 38);
  return copy;
}

/** Renders, saves both, and answers what sox reads in the output and in the input after effects. */
async function besideSox(
  inputs: { bytes: Uint8Array; ending: string }[],
  operations: Operation[],
  effects: string[],
  combine: string[] = [],
) {
  return withFolder(async (folder) => {
    const output = await allBytes(
      await rendered(
        inputs.map(({ bytes }) => bytes),
        operations,
        701,
      ),
    );
    const paths = await Promise.all(
      inputs.map(({ bytes, ending }, index) =>
        savedIn(folder, `in${index}.${ending}`, readableBySox(bytes)),
      ),
    );
    const out = await savedIn(folder, 'out.wav', readableBySox(output));
    return {
      ours: await soxSamples([out]),
      theirs: await soxSamples(paths, effects, combine),
      info: await run('soxi', [out]),
    };
  });
}

describe('renderEntry keeps samples bit for bit, against sox', () => {
  it.each(cases)('takes one channel: %s', async (_, form) => {
    const input = [{ bytes: wave(form, 2), ending: 'wav' }];
    const take: Operation = { kind: 'take-channel', channel: 1 };
    const { ours, theirs, info } = await besideSox(input, [take], ['remix', '2']);
    expect(ours).toEqual(theirs);
    expect(info).toMatch(/Channels +: 1/);
  });

  it.each(cases)('joins left and right: %s', async (_, form) => {
    const left = writeTestWave({ ...samples(form), ...(form.containerBits && { channelMask: 4 }) });
    const right = writeTestWave({
      ...samples(form, 2),
      channels: [samples(form, 2).channels[1]!],
      ...(form.containerBits && { channelMask: 4 }),
    });
    const input = [left, right].map((bytes) => ({ bytes, ending: 'wav' }));
    const { ours, theirs, info } = await besideSox(input, [{ kind: 'join' }], [], ['-M']);
    expect(ours).toEqual(theirs);
    expect(info).toMatch(/Channels +: 2/);
  });

  it.each(cases)('adds silence at the end: %s', async (_, form) => {
    const input = [{ bytes: wave(form, 2), ending: 'wav' }];
    const pad: Operation = { kind: 'pad', toFrames: 1500 };
    const { ours, theirs } = await besideSox(input, [pad], ['pad', '0', `${1500 - frames}s`]);
    expect(ours).toEqual(theirs);
  });

  it.each(cases)('moves later and earlier: %s', async (_, form) => {
    const input = [{ bytes: wave(form, 2), ending: 'wav' }];
    const later = await besideSox(input, [{ kind: 'move', byFrames: 321 }], ['pad', '321s', '0']);
    expect(later.ours).toEqual(later.theirs);
    const earlier = await besideSox(input, [{ kind: 'move', byFrames: -321 }], ['trim', '321s']);
    expect(earlier.ours).toEqual(earlier.theirs);
  });

  it.each([
    ['AIFF 8', { encoding: 'pcm', bits: 8 }, undefined],
    ['AIFF 16', { encoding: 'pcm', bits: 16 }, undefined],
    ['AIFF 24', { encoding: 'pcm', bits: 24 }, undefined],
    ['AIFF 32', { encoding: 'pcm', bits: 32 }, undefined],
    ['AIFC sowt', { encoding: 'pcm', bits: 16 }, 'sowt'],
    ['AIFC fl32', { encoding: 'float', bits: 32 }, 'fl32'],
    ['AIFC fl64', { encoding: 'float', bits: 64 }, 'fl64'],
  ] as const)('writes %s anew as WAV', async (_, form, compression) => {
    const bytes = writeTestAiff({ ...samples(form, 2), ...(compression && { compression }) });
    const { ours, theirs } = await besideSox([{ bytes, ending: 'aiff' }], [], []);
    expect(ours.length).toBe(2 * frames);
    expect(ours).toEqual(theirs);
  });
});

describe('renderEntry changes only what a repair is about', () => {
  it.each(cases)('fades in and out: %s', async (_, form) => {
    const window = 144;
    const flat = form.encoding === 'float' ? 0.5 : 2 ** (form.bits - 2);
    const bytes = writeTestWave({
      ...samples(form),
      channels: [new Array<number>(frames).fill(flat)],
      ...(form.containerBits && { channelMask: 4 }),
    });
    const operations: Operation[] = [
      { kind: 'fade', shape: 'in', startFrame: 0, endFrame: window, channel: null },
      { kind: 'fade', shape: 'out', startFrame: frames - window, endFrame: frames, channel: null },
    ];
    const { ours, theirs } = await besideSox([{ bytes, ending: 'wav' }], operations, []);
    expect(ours.slice(window, frames - window)).toEqual(theirs.slice(window, frames - window));
    expect(ours[0]).toBe(0);
    expect(ours.at(-1)).toBe(0);
    // Half of the way through a raised cosine is half of the level.
    const step = form.encoding === 'float' ? 1e-6 : 2 ** (1 - form.bits);
    expect(Math.abs(ours[window / 2]! - 0.25)).toBeLessThanOrEqual(step);
    for (let i = 1; i < window; i++) expect(ours[i]!).toBeGreaterThanOrEqual(ours[i - 1]!);
  });

  it.each(cases)('takes the jump out of an edit: %s', async (_, form) => {
    const scale = form.encoding === 'float' ? 1 : 2 ** (form.bits - 1);
    const edit = 500;
    const values = Array.from(
      { length: frames },
      (_, i) => Math.round((i < edit ? 0.25 : -0.25) * scale * 64) / 64,
    );
    const bytes = writeTestWave({
      ...samples(form),
      channels: [values],
      ...(form.containerBits && { channelMask: 4 }),
    });
    const half = 96;
    const cross: Operation = {
      kind: 'fade',
      shape: 'cross',
      startFrame: edit - half,
      endFrame: edit + half,
      channel: null,
    };
    const { ours, theirs } = await besideSox([{ bytes, ending: 'wav' }], [cross], []);
    expect(ours.slice(0, edit - half)).toEqual(theirs.slice(0, edit - half));
    expect(ours.slice(edit + half)).toEqual(theirs.slice(edit + half));
    const steps = Array.from(ours, (value, i) => (i === 0 ? 0 : Math.abs(value - ours[i - 1]!)));
    expect(Math.max(...steps)).toBeLessThan(0.02);
  });

  it.each(cases)('turns down, and leaves silence silent: %s', async (_, form) => {
    const gap = { from: 300, to: 600 };
    const [tone = []] = samples(form).channels;
    const channels = [Array.from(tone, (x, i) => (i >= gap.from && i < gap.to ? 0 : x))];
    const bytes = writeTestWave({
      ...samples(form),
      channels,
      ...(form.containerBits && { channelMask: 4 }),
    });
    const gain: Operation = { kind: 'gain', gainDb: -4.3 };
    const input = [{ bytes, ending: 'wav' }];
    const { ours, theirs } = await besideSox(input, [gain], ['gain', '-4.3']);
    expect(ours.slice(gap.from, gap.to).every((x) => x === 0)).toBe(true);
    // Dither of one step each way, and half a step of rounding on either side.
    const step = form.encoding === 'float' ? 2e-8 : 2 ** (1 - form.bits);
    for (const [i, value] of ours.entries()) {
      expect(Math.abs(value - theirs[i]!)).toBeLessThanOrEqual(2.01 * step);
    }
  });

  it("removes an offset as sox's high-pass does, without a thump at the start", async () => {
    const long = 96_000;
    const values = Array.from({ length: long }, (_, i) =>
      Math.round(2 ** 23 * (0.05 + 0.2 * Math.sin((2 * Math.PI * 440 * i) / 48_000))),
    );
    const bytes = writeTestWave({
      sampleRateHz: 48_000,
      encoding: 'pcm',
      bits: 24,
      channels: [values],
    });
    const highPass: Operation = { kind: 'high-pass', cutoffHz: 5 };
    const input = [{ bytes, ending: 'wav' }];
    const { ours, theirs } = await besideSox(input, [highPass], ['highpass', '5']);
    const mean = ours.reduce((sum, x) => sum + x, 0) / long;
    expect(Math.abs(mean)).toBeLessThan(1e-4);
    expect(Math.abs(ours[0]!)).toBeLessThan(0.01);
    // sox starts from zero, so its start thumps; a second later both have settled.
    for (let i = 72_000; i < long; i++) expect(Math.abs(ours[i]! - theirs[i]!)).toBeLessThan(1e-6);
  });

  it('adds no tone to what it requantises: the error is noise of the right strength', async () => {
    // TPDF dither of two steps peak to peak and rounding: 1/6 + 1/12 = 1/4 of a squared step.
    const form: Form = { encoding: 'pcm', bits: 16 };
    const values = new Array<number>(20_000).fill(1001);
    const bytes = writeTestWave({ ...samples(form), channels: [values] });
    const gain: Operation = { kind: 'gain', gainDb: -6 };
    const { ours } = await besideSox([{ bytes, ending: 'wav' }], [gain], []);
    const wanted = 1001 * 10 ** (-6 / 20);
    const errors = Array.from(ours, (x) => x * 2 ** 15 - wanted);
    const mean = errors.reduce((sum, e) => sum + e, 0) / errors.length;
    const power = errors.reduce((sum, e) => sum + e * e, 0) / errors.length;
    expect(Math.abs(mean)).toBeLessThan(0.02);
    expect(power).toBeGreaterThan(0.23);
    expect(power).toBeLessThan(0.27);
    const next = errors.slice(1).reduce((sum, e, i) => sum + e * errors[i]!, 0) / errors.length;
    expect(Math.abs(next)).toBeLessThan(0.01);
  });
});

describe('renderEntry as a source', () => {
  const stereo = writeTestWave(samples({ encoding: 'pcm', bits: 24 }, 2));
  const operations: Operation[] = [
    { kind: 'gain', gainDb: -3 },
    { kind: 'fade', shape: 'in', startFrame: 0, endFrame: 100, channel: 0 },
    { kind: 'fade', shape: 'cross', startFrame: 400, endFrame: 460, channel: null },
    { kind: 'fade', shape: 'out', startFrame: 900, endFrame: 997, channel: 1 },
    { kind: 'move', byFrames: 50 },
    { kind: 'pad', toFrames: 1200 },
  ];
  const withFilter: Operation[] = [{ kind: 'high-pass', cutoffHz: 5 }, ...operations];

  it.each([
    ['without', operations],
    ['with', withFilter],
  ])('has the same bytes from any place on (%s a filter)', async (_, list) => {
    const whole = await allBytes(await rendered([stereo], list));
    await fc.assert(
      fc.asyncProperty(
        fc.nat(whole.length + 10),
        fc.nat(300),
        fc.integer({ min: 7, max: 4000 }),
        async (offset, length, blockBytes) => {
          const source = await rendered([stereo], list, blockBytes);
          expect(source.size).toBe(whole.length);
          expect(Buffer.from(await source.read(offset, length))).toEqual(
            whole.subarray(offset, offset + length),
          );
          expect(await allBytes(source, offset)).toEqual(whole.subarray(offset));
        },
      ),
      { numRuns: 60 },
    );
  });

  it('does not put silence where a file has become shorter', async () => {
    const shorter = { ...droppedBytes('Organ.wav', stereo.subarray(0, 4000)), size: stereo.length };
    const reading = await readWave(bytesSource(stereo), 'Organ.wav');
    if (reading.kind !== 'track') throw new Error('no track');
    const entry = {
      ...{ from: ['Organ.wav'], to: 'Organ.wav', folder: '' as const, rewriteAsWav: true },
      operations: [{ kind: 'pad' as const, toFrames: 2000 }],
    };
    const track = { file: shorter, reading, crc32: null };
    const source = await (await renderEntry(entry, [track])).open();
    await expect(allBytes(source)).rejects.toEqual(
      new AppError('file-changed', { path: 'Organ.wav' }),
    );
  });

  it('grows beyond 4 GiB as RF64, and is read there at once', async () => {
    const toFrames = 1_500_000_000;
    const source = await rendered(
      [wave({ encoding: 'pcm', bits: 24 })],
      [{ kind: 'pad', toFrames }],
    );
    expect(source.size).toBeGreaterThan(3 * toFrames);
    expect(Buffer.from(await source.read(0, 4)).toString()).toBe('RF64');
    const reading = await readWave(source, 'out.wav');
    expect(reading).toMatchObject({ kind: 'track', format: { frames: toFrames } });
    expect(await source.read(source.size - 9, 9)).toEqual(new Uint8Array(9));
    await withFolder(async (folder) => {
      // ffprobe reads the header of a sparse file that has only the header in it.
      const path = await savedIn(folder, 'large.wav', await source.read(0, 4096));
      await truncate(path, source.size);
      const frames = ['-show_entries', 'stream=duration_ts', '-of', 'csv=p=0', path];
      expect((await run('ffprobe', ['-v', 'error', ...frames])).trim()).toBe(String(toFrames));
    });
  });
});
