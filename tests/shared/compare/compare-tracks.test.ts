import { beforeAll, describe, expect, it } from 'vitest';
import { compareTracks } from '#shared/compare/compare-tracks.ts';
import { AppError } from '#shared/errors.ts';
import {
  atBits,
  comparedSounds,
  decodeMono,
  placed,
  recordings,
} from '../../support/compared-sounds.ts';

/** 20 s at 48 kHz. */
const frames = 960_000;
let piano: Float32Array;
let choir: Float32Array;
let loop: Float32Array;

beforeAll(async () => {
  [piano, choir, loop] = (await Promise.all(
    ['ambi_piano', 'ambi_choir', 'loop_amen_full'].map((name) =>
      decodeMono(`${recordings}/${name}.flac`),
    ),
  )) as [Float32Array, Float32Array, Float32Array];
}, 60_000);

const gained = (sound: Float32Array, gain: number): Float32Array =>
  sound.map((sample) => sample * gain);

describe('compareTracks: the same audio', { timeout: 60_000 }, () => {
  it('finds a copy that is quieter and later, by how much and how exactly', async () => {
    const sounds = comparedSounds({
      'Loop.wav': [atBits(placed(loop, 48_000, frames), 24)],
      'Piano.wav': [atBits(placed(piano, 48_000, frames), 24)],
      // -6.0206 dB is half of the amplitude: arithmetic.
      'Loop copy.wav': [atBits(placed(gained(loop, 0.5), 48_000 + 12_345, frames), 24)],
    });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches).toEqual([
      {
        first: 'Loop.wav',
        second: 'Loop copy.wav',
        gainDb: -6.02,
        shiftFrames: 12_345,
        inverted: false,
        differenceUnderDb: expect.any(Number) as number,
      },
    ]);
    expect(matches[0]?.differenceUnderDb).toBeGreaterThan(80);
    expect(sounds.framesRead()).toBeLessThan(500_000);
  });

  it('finds a copy upside down', async () => {
    const sounds = comparedSounds({
      'Choir.wav': [atBits(placed(choir, 9_000, frames), 24)],
      'Choir flipped.wav': [atBits(placed(gained(choir, -1), 9_000, frames), 16)],
    });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches).toMatchObject([{ inverted: true, gainDb: 0, shiftFrames: 0 }]);
  });

  it('finds a stereo copy only where both sides agree', async () => {
    const left = placed(piano, 2_000, frames);
    const sounds = comparedSounds({
      'Keys.wav': [left, placed(choir, 100, frames)],
      'Keys again.wav': [gained(left, 0.25), gained(placed(choir, 100, frames), 0.25)],
      'Keys other.wav': [gained(left, 0.25), placed(loop, 100, frames)],
    });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches).toMatchObject([{ first: 'Keys.wav', second: 'Keys again.wav' }]);
  });

  it('says how much a copy differs that was changed a little', async () => {
    const noise = Float32Array.from(
      { length: frames },
      (_, index) => 0.003 * Math.sin(index * index * 0.37),
    );
    const sound = placed(loop, 3_000, frames);
    const sounds = comparedSounds({
      'A.wav': [sound],
      'B.wav': [sound.map((sample, index) => sample * 0.7 + noise[index]! * 0.01)],
    });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches).toHaveLength(1);
    expect(matches[0]?.differenceUnderDb).toBeGreaterThan(50);
    expect(matches[0]?.differenceUnderDb).toBeLessThan(110);
  });

  it('says nothing of different sounds, of bits that are equal anyway, and of other rates', async () => {
    const sound = placed(piano, 0, frames);
    const sounds = comparedSounds({
      'Piano.wav': [sound],
      'Same.wav': [sound],
      'Choir.wav': [placed(choir, 0, frames)],
      'Loop.wav': [placed(loop, 0, frames)],
      'Looped twice.wav': [placed(loop, 0, frames).map((s, i) => s + (loop[i - 200_000] ?? 0))],
      'Silence.wav': [new Float32Array(frames)],
    });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches).toEqual([]);
  });

  it('does not compare every file with every other', async () => {
    const hundred = Object.fromEntries(
      Array.from({ length: 100 }, (_, index) => {
        const slow = (index + 1) / 40_000;
        const part = piano.subarray(0, 250_000).map((s, i) => s * (1 + 0.9 * Math.sin(i * slow)));
        return [`Part ${index}.wav`, [placed(part, 0, 300_000)]];
      }),
    );
    const sounds = comparedSounds(hundred);
    const start = process.cpuUsage();
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    const { user, system } = process.cpuUsage(start);
    expect(matches).toEqual([]);
    expect((user + system) / 1e6).toBeLessThan(4);
    // All 4,950 pairs read would be more than 400 million frames.
    expect(sounds.framesRead()).toBeLessThan(5_000_000);
  });

  it('finds the one copy among hundreds of files that all look alike', async () => {
    let state = 1;
    const noise = () => {
      state = (Math.imul(state, 1_103_515_245) + 12_345) >>> 0;
      return (state / 2 ** 31 - 1) * 0.4;
    };
    const alike = Object.fromEntries(
      Array.from({ length: 300 }, (_, index) => [
        `Hiss ${index}.wav`,
        [Float32Array.from({ length: 24_000 }, noise)],
      ]),
    );
    const copy = gained(alike['Hiss 7.wav']![0]!, 0.5);
    const sounds = comparedSounds({ ...alike, 'Copy.wav': [copy] });
    const { matches } = await compareTracks(sounds.tracks, sounds.read);
    expect(matches.map(({ first, second }) => [first, second])).toEqual([
      ['Hiss 7.wav', 'Copy.wav'],
    ]);
  });

  it('leaves out a file that has gone, and stops when told to', async () => {
    const sound = placed(loop, 0, frames);
    const sounds = comparedSounds({ 'A.wav': [sound], 'B.wav': [gained(sound, 0.5)] });
    const gone = () => Promise.reject(new AppError('no-access', { path: 'B.wav' }));
    expect(await compareTracks(sounds.tracks, gone)).toEqual({ matches: [], sides: [] });
    const stop = new AbortController();
    stop.abort();
    await expect(compareTracks(sounds.tracks, sounds.read, stop.signal)).rejects.toThrow();
  });
});

describe('compareTracks: left and right as two files', { timeout: 60_000 }, () => {
  it('measures how alike they are', async () => {
    const sound = placed(piano, 5_000, frames);
    const sounds = comparedSounds({
      'Room L.wav': [sound],
      // The other microphone: 1 ms later, quieter, with some of its own.
      'Room R.wav': [
        placed(piano, 5_048, frames).map((s, i) => 0.8 * s + 0.1 * (sound[i - 700] ?? 0)),
      ],
      'Gtr_L.wav': [placed(loop, 0, frames)],
      'Gtr_R.wav': [placed(choir, 0, frames)],
      '07 Lead.wav': [placed(choir, 99, frames)],
    });
    const { sides } = await compareTracks(sounds.tracks, sounds.read);
    expect(sides.map(({ left, right }) => [left, right])).toEqual([
      ['Room L.wav', 'Room R.wav'],
      ['Gtr_L.wav', 'Gtr_R.wav'],
    ]);
    expect(sides[0]?.correlation).toBeGreaterThan(0.9);
    expect(sides[1]?.correlation).toBeLessThan(0.2);
    expect(sides[1]?.loudnessCorrelation).toBeLessThan(0.5);
  });
});
