import { beforeAll, describe, expect, it } from 'vitest';
import { compareTracks } from '#shared/compare/compare-tracks.ts';
import { comparedSounds, decodeMono, placed, recordings } from '../../support/compared-sounds.ts';

/** 14 s at 48 kHz. */
const frames = 672_000;
const silence = 96_000;
/** 1.31 s, no number of beats. */
const missing = 62_880;

let beat: Float32Array;
let piano: Float32Array;
beforeAll(async () => {
  beat = await decodeMono(`${recordings}/loop_amen_full.flac`);
  piano = await decodeMono(`${recordings}/ambi_piano.flac`);
}, 60_000);

/** The same hits with another sound, so that it is no copy. */
const dirty = (sound: Float32Array): Float32Array =>
  sound.map((sample) => 0.4 * Math.tanh(20 * sample * sample) * Math.sign(sample));

function session(short: Float32Array) {
  return comparedSounds({
    'Beat.wav': [placed(beat, silence, frames)],
    'Beat 2.wav': [placed(dirty(beat), silence + 40, frames)],
    'Piano.wav': [placed(piano, silence, frames)],
    'Short.wav': [short],
  });
}

describe('compareTracks: a file of another length', () => {
  const whole = () =>
    placed(
      dirty(beat).map((sample) => sample * 0.7 + 0.001),
      silence,
      frames,
    );

  it('keeps time at the start where its end was trimmed', async () => {
    const sounds = session(whole().slice(0, frames - missing));
    const { alignments } = await compareTracks(sounds.tracks, sounds.read);
    expect(alignments).toMatchObject([{ path: 'Short.wav', lackingFrames: missing }]);
    expect(alignments![0]!.agreementFromStart).toBeGreaterThan(0.5);
    expect(alignments![0]!.agreementFromEnd).toBeLessThan(0.4);
    expect(sounds.framesRead()).toBeLessThan(5_000_000);
  }, 60_000);

  it('keeps time at the end where its start was cut, in silence', async () => {
    const sounds = session(whole().slice(missing));
    const { alignments } = await compareTracks(sounds.tracks, sounds.read);
    expect(alignments![0]!.agreementFromEnd).toBeGreaterThan(0.5);
    expect(alignments![0]!.agreementFromStart).toBeLessThan(0.4);
  }, 60_000);

  it('is not asked about where all lengths agree, or hardly two do', async () => {
    const equal = session(whole());
    expect(await compareTracks(equal.tracks, equal.read)).not.toHaveProperty('alignments');
    const sounds = comparedSounds({
      'A.wav': [placed(beat, 0, frames)],
      'B.wav': [placed(piano, 0, frames - 100_000)],
      'C.wav': [placed(piano, 9, frames - 200_000)],
    });
    expect(await compareTracks(sounds.tracks, sounds.read)).not.toHaveProperty('alignments');
  }, 60_000);
});
