import { createHash } from 'node:crypto';
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parseBuffer } from 'music-metadata';
import wavefile from 'wavefile';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { inPairs, run, runForMessages } from '../../support/outside-programs.ts';
import { readTrack, type TrackReading } from '../../support/reading.ts';

/**
 * Files written by sox and ffmpeg, described by soxi, ffmpeg, ffprobe, Python's wave, wavefile and
 * music-metadata. Every expected value comes from one of them.
 */
type Recipe = {
  name: string;
  rate: number;
  channels: number;
  writer: 'sox' | 'ffmpeg';
  /** Encoding options of the program. */
  options: readonly string[];
};

const rates = [44100, 48000, 88200, 96000, 176400, 192000];
const frames = 1237;
const short = (options: readonly string[]) => options.join('').replace(/^-/, '');

function sox(ending: string, options: readonly string[], rate: number, channels: number): Recipe {
  const name = `sox-${short(options)}-${rate}-${channels}.${ending}`;
  return { name, rate, channels, writer: 'sox', options };
}

function ffmpeg(
  ending: string,
  codec: string,
  rate: number,
  channels: number,
  more: readonly string[] = [],
): Recipe {
  const options = ['-c:a', codec, ...more];
  const name = `ffmpeg-${short(options)}-${rate}-${channels}.${ending}`;
  return { name, rate, channels, writer: 'ffmpeg', options };
}

const soxFloat = ['-e', 'floating-point'];
const recipes: readonly Recipe[] = [
  ...rates.flatMap((rate, i) => [
    sox('wav', ['-b', '16'], rate, 1 + (i % 2)),
    sox('wav', ['-b', '24'], rate, 1 + ((i + 1) % 2)),
    sox('aiff', ['-b', '24'], rate, 1 + (i % 2)),
    ffmpeg('wav', 'pcm_s24le', rate, 1 + (i % 2)),
  ]),
  ...[1, 2, 3, 4, 5, 6, 7, 8].flatMap((channels) => [
    sox('wav', ['-b', '24'], 48000, channels),
    sox('aiff', ['-b', '16'], 44100, channels),
    ffmpeg('wav', 'pcm_f32le', 48000, channels),
  ]),
  sox('wav', ['-b', '8'], 48000, 2),
  sox('wav', ['-b', '32'], 48000, 2),
  sox('wav', [...soxFloat, '-b', '32'], 48000, 2),
  sox('wav', [...soxFloat, '-b', '64'], 48000, 2),
  sox('aiff', ['-b', '8'], 48000, 2),
  sox('aiff', ['-b', '32'], 48000, 2),
  sox('aifc', ['-b', '16'], 48000, 2),
  ...['pcm_u8', 'pcm_s16le', 'pcm_s32le', 'pcm_f32le', 'pcm_f64le'].map((codec) =>
    ffmpeg('wav', codec, 44100, 2),
  ),
  ffmpeg('wav', 'pcm_s24le', 48000, 2, ['-rf64', 'always']),
  ffmpeg('wav', 'pcm_f32le', 96000, 1, ['-rf64', 'always']),
  ffmpeg('wav', 'pcm_s16le', 48000, 2, ['-rf64', 'auto']),
  ffmpeg('wav', 'pcm_s24le', 48000, 1, [
    '-write_bext',
    '1',
    '-metadata',
    'time_reference=172800000',
  ]),
  ...['pcm_s8', 'pcm_s16be', 'pcm_s24be', 'pcm_s32be'].map((codec) =>
    ffmpeg('aiff', codec, 48000, 2),
  ),
  // These codecs make an AIFC of it.
  ...['pcm_f32be', 'pcm_f64be', 'pcm_s16le'].map((codec) => ffmpeg('aiff', codec, 48000, 2)),
];

type Written = { recipe: Recipe; path: string; bytes: Buffer; reading: TrackReading };

let folder: string;
let written: Written[] = [];
const by = (writer: Recipe['writer']) => recipes.filter((recipe) => recipe.writer === writer);
const place = (recipe: Recipe) => join(folder, recipe.name);

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'flightcase-matrix-'));
  await inPairs(by('sox'), (recipe) => {
    const { rate, channels, options } = recipe;
    const tone = ['synth', '1', 'sine', '440', 'vol', '0.5', 'trim', '0', `${frames}s`];
    const silence = ['-D', '-r', `${rate}`, '-n', '-c', `${channels}`];
    return run('sox', [...silence, ...options, place(recipe), ...tone]);
  });
  // One process for all of them: starting it costs more than the work.
  const tones = by('ffmpeg').flatMap(({ rate, channels }) => {
    const voices = Array.from({ length: channels }, (_, i) => `0.4*sin(${300 + 40 * i}*t*6.28)`);
    return ['-f', 'lavfi', '-i', `aevalsrc=${voices.join('|')}:s=${rate}:d=1`];
  });
  const files = by('ffmpeg').flatMap((recipe, i) => {
    const cut = ['-map', `${i}:a`, '-af', `atrim=end_sample=${frames}`];
    return [...cut, ...recipe.options, place(recipe)];
  });
  await run('ffmpeg', ['-v', 'error', '-y', ...tones, ...files]);
  written = await Promise.all(
    recipes.map(async (recipe) => {
      const path = place(recipe);
      const bytes = await readFile(path);
      return { recipe, path, bytes, reading: await readTrack(bytes, recipe.name) };
    }),
  );
}, 120_000);

afterAll(() => rm(folder, { recursive: true, force: true }));

/** The sample data as our layout finds it. */
function dataOf({ bytes, reading: { layout } }: Written): Buffer {
  return bytes.subarray(layout.dataOffset, layout.dataOffset + layout.dataBytes);
}

function sha256(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

describe('files written by sox and ffmpeg', () => {
  it('are read as they were asked for', () => {
    const ours = written.map(({ recipe: { name }, reading: { format } }) => {
      return [name, format.sampleRateHz, format.channels, format.frames];
    });
    expect(ours).toEqual(recipes.map(({ name, rate, channels }) => [name, rate, channels, frames]));
    for (const { reading } of written) {
      expect(reading.layout.promisedDataBytes).toBe(reading.layout.dataBytes);
    }
    expect(written.length).toBeGreaterThanOrEqual(60);
  });

  it('soxi says the same', async () => {
    const paths = written.map(({ path }) => path);
    const said = await Promise.all(
      ['-r', '-c', '-s', '-b', '-e'].map(async (option) =>
        (await run('soxi', [option, ...paths])).trim().split('\n'),
      ),
    );
    for (const [i, { recipe, reading }] of written.entries()) {
      const { sampleRateHz, channels, frames: length, bits, encoding } = reading.format;
      const answers = said.map((lines) => lines[i]!);
      expect([recipe.name, sampleRateHz, channels, length, bits].map(String)).toEqual([
        recipe.name,
        ...answers.slice(0, 4),
      ]);
      expect(answers[4]!.includes('Floating')).toBe(encoding === 'float');
    }
  });

  it('ffmpeg says the same, and its samples lie where ours do', async () => {
    // ffmpeg's names for speaker layouts: full channels and, after the point, low ones.
    const speakers = (layout: string): number => {
      const named = { mono: 1, stereo: 2, quad: 4 }[layout];
      const [, full, low] = /^(\d)(?:\.(\d)| channels)/.exec(layout) ?? [];
      return named ?? Number(full) + Number(low ?? 0);
    };
    const raw = (i: number) => join(folder, `${i}.raw`);
    const inputs = written.flatMap(({ path }) => ['-i', path]);
    const outputs = written.flatMap((_, i) => [
      '-map',
      `${i}:a`,
      '-c',
      'copy',
      '-f',
      'data',
      raw(i),
    ]);
    const messages = await runForMessages('ffmpeg', ['-hide_banner', '-y', ...inputs, ...outputs]);
    const described = messages.slice(0, messages.indexOf('Output #0'));
    const streams = [
      ...described.matchAll(/Stream #(\d+):0.*?: Audio: (\w+).*?, (\d+) Hz, ([^,]+),/g),
    ];
    expect(streams.length).toBe(written.length);
    for (const [, index, codec, rate, layout] of streams) {
      const file = written[Number(index)]!;
      const { format } = file.reading;
      const type = format.encoding === 'float' ? 'f' : file.reading.layout.unsigned ? 'u' : 's';
      const order = format.containerBits === 8 ? '' : file.reading.layout.bigEndian ? 'be' : 'le';
      expect([file.recipe.name, codec, Number(rate)]).toEqual([
        file.recipe.name,
        `pcm_${type}${format.containerBits}${order}`,
        format.sampleRateHz,
      ]);
      expect(speakers(layout!), `${file.recipe.name}: ${layout}`).toBe(format.channels);
      expect(sha256(dataOf(file)), file.recipe.name).toBe(
        sha256(await readFile(raw(Number(index)))),
      );
    }
  }, 60_000);

  it("Python's wave says the same of plain PCM", async () => {
    const script = `
import hashlib, json, sys, wave
for path in sys.argv[1:]:
    try:
        with wave.open(path) as w:
            print(json.dumps([path, w.getframerate(), w.getnchannels(), w.getsampwidth() * 8, w.getnframes(),
                hashlib.sha256(w.readframes(w.getnframes())).hexdigest()]))
    except wave.Error:
        pass
`;
    const out = await run('python3', ['-c', script, ...written.map(({ path }) => path)]);
    const said = out.trim().split('\n');
    expect(said.length).toBeGreaterThanOrEqual(8);
    for (const line of said) {
      const [path, ...answers] = JSON.parse(line) as unknown[];
      const file = written.find((candidate) => candidate.path === path)!;
      const { sampleRateHz, channels, bits, frames: length } = file.reading.format;
      expect([sampleRateHz, channels, bits, length, sha256(dataOf(file))]).toEqual(answers);
    }
  });

  it('wavefile says the same of every WAV', () => {
    const waves = written.filter(({ recipe }) => recipe.name.endsWith('.wav'));
    for (const file of waves) {
      const { sampleRateHz, channels, containerBits } = file.reading.format;
      const wave = new wavefile.WaveFile(file.bytes);
      const fmt = wave.fmt as { sampleRate: number; numChannels: number; bitsPerSample: number };
      const { samples } = wave.data as { samples: Uint8Array };
      expect([fmt.sampleRate, fmt.numChannels, fmt.bitsPerSample], file.recipe.name).toEqual([
        sampleRateHz,
        channels,
        containerBits,
      ]);
      // It hands out the pad byte as well.
      const data = samples.subarray(0, file.reading.layout.dataBytes);
      expect(sha256(data), file.recipe.name).toBe(sha256(dataOf(file)));
    }
    expect(waves.length).toBeGreaterThan(40);
  });

  it('music-metadata says the same of all but RF64, which it does not know', async () => {
    const known = written.filter(({ reading }) => reading.format.container !== 'rf64');
    for (const { recipe, bytes, reading } of known) {
      const { format } = await parseBuffer(bytes, { path: recipe.name });
      const { sampleRateHz, channels, frames: length } = reading.format;
      expect([sampleRateHz, channels, length], recipe.name).toEqual([
        format.sampleRate,
        format.numberOfChannels,
        format.numberOfSamples,
      ]);
    }
  });

  it('ffprobe says the same of the time reference', async () => {
    const stamped = written.find(({ recipe }) => recipe.name.includes('write_bext'))!;
    const out = await run('ffprobe', ['-v', 'error', '-of', 'json', '-show_format', stamped.path]);
    const { format } = JSON.parse(out) as { format: { tags: { time_reference: string } } };
    const { timeReferenceFrames } = stamped.reading.format;
    expect(timeReferenceFrames).toBe(Number(format.tags.time_reference));
    expect(timeReferenceFrames).toBe(172_800_000);
  });
});

describe('files written to a pipe, whose writers could not come back', () => {
  const raw = 'head -c 6000 /dev/zero | sox -t raw -r 48000 -e signed -b 24 -c 1 -';
  it.each([
    ['sox, WAV', `${raw} -t wav -`],
    ['sox, AIFF', `${raw} -t aiff -`],
    ['ffmpeg, WAV', `${raw} -t wav - | ffmpeg -v error -i - -c:a pcm_s24le -f wav -`],
    ['ffmpeg, AIFF', `${raw} -t wav - | ffmpeg -v error -i - -c:a pcm_s24be -f aiff -`],
  ])('%s', async (_name, pipe) => {
    const path = join(folder, 'piped');
    await run('sh', ['-c', `(${pipe}) 2>/dev/null | cat > "${path}"`]);
    const { format, layout } = await readTrack(await readFile(path), 'piped.wav');
    // 6000 bytes of three a frame.
    expect(format).toMatchObject({ sampleRateHz: 48000, bits: 24, channels: 1, frames: 2000 });
    expect(layout.promisedDataBytes).toBeNull();
  });
});
