import { beforeAll, describe, expect, it } from 'vitest';
import type { Finding } from '#shared/findings/finding.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { goodSession, songSeconds } from '../../support/good-sessions.ts';
import { inPairs } from '../../support/outside-programs.ts';
import { placed } from '../../support/real-defects/real-defect.ts';
import { checkSounds, ffmpeg, findingsOf, inShort, sox } from '../../support/real-sounds.ts';

/*
 * Sessions nothing is wrong with, of the kinds that are easily taken for faulty. The budget for a
 * session of forty files is one wrong must-fix and five wrong looks; here every look is named.
 */

const information = {
  tempo: { kind: 'fixed' as const, bpm: 112 },
  roles: {},
};

type Sounds = Record<string, string>;
let session: Sounds;
beforeAll(async () => {
  session = await goodSession();
}, 240_000);

async function pressing(sounds: Sounds): Promise<string[]> {
  const findings = findingsOf(await checkSounds(sounds, { rules: defaultRules, information }));
  return findings.filter(({ level }) => level !== 'note').map(lineOf);
}

/** A line for many files is named by their number. */
function lineOf(finding: Finding): string {
  const { level, code, files } = finding;
  return finding.perFile ? `${level} ${code} in ${files.length} files` : inShort(finding);
}

/** Puts every file of a session through sox. */
async function throughSox(sounds: Sounds, effects: (name: string) => string[]): Promise<Sounds> {
  const names = Object.keys(sounds);
  const places = await inPairs(names, (name) => sox([sounds[name]!], effects(name)));
  return Object.fromEntries(names.map((name, index) => [name, places[index]!]));
}

describe('a good session', () => {
  it('of 48 recordings is quiet', async () => {
    expect(Object.keys(session)).toHaveLength(48);
    expect(await pressing(session)).toEqual([]);
  }, 60_000);

  it('cut from a longer recording, sound running through both borders, is quiet', async () => {
    const cut = await throughSox(session, () => ['trim', '1.5', '1.5']);
    // Hits that were over by then leave silence.
    const looks = await pressing(cut);
    expect(looks.filter((line) => !/ (silent|nearly-silent)\b/.test(line))).toEqual([]);
  }, 120_000);

  it('exported only up to the last sound of each track has one line about its lengths', async () => {
    const trimmed = await throughSox(session, () => [
      ...['reverse', 'silence', '1', '0.01', '-80d', 'reverse', 'pad', '0', '0.1'],
    ]);
    expect(await pressing(trimmed)).toEqual(['look length-differs in 47 files']);
  }, 120_000);

  it('of which a few tracks end early at a silent end is quiet', async () => {
    const early = ['Cowbell.wav', 'Crash.wav', 'Tom 1.wav', 'Choir.wav', 'Snare Sample.wav'];
    const some = await throughSox(
      Object.fromEntries(early.map((name) => [name, session[name]!])),
      (name) => ['trim', '0', name === 'Choir.wav' ? '11.5' : '11.2'],
    );
    expect(await pressing({ ...session, ...some })).toEqual([]);
  }, 60_000);

  it('that begins on the first beat without a count-in is quiet', async () => {
    const atOnce = await throughSox(session, () => ['trim', '1']);
    // Hiss has no beginning of its own.
    expect(await pressing(atOnce)).toEqual(['look starts-on-sound Vinyl Noise']);
  }, 120_000);
});

describe('good tracks that look faulty', () => {
  const beside = async (sounds: () => Promise<Sounds>): Promise<string[]> =>
    pressing({ ...session, ...(await sounds()) });

  it('chops, stutters and gates', async () => {
    const gate = 'aeval=val(0)*lt(mod(n\\,9600)\\,4800)|val(1)*lt(mod(n\\,9600)\\,4800):c=same';
    const chopped = 'aeval=val(0)*gt(mod(n\\,3000)\\,900)|val(1)*gt(mod(n\\,3000)\\,900):c=same';
    const looks = await beside(async () => ({
      'Synth Pad Gated.wav': await ffmpeg(session['Synth Pad.wav']!, [
        ...['-af', gate, '-c:a', 'pcm_s24le'],
      ]),
      'Piano Chops.wav': await ffmpeg(session['Piano.wav']!, [
        ...['-af', chopped, '-c:a', 'pcm_s24le'],
      ]),
      'Loop Stutter.wav': await ffmpeg(session['Loop.wav']!, [
        ...['-af', chopped, '-c:a', 'pcm_s24le'],
      ]),
    }));
    expect(looks).toEqual([]);
  }, 60_000);

  it('fuzz, bit-crush, squares, and a snare clipped on purpose', async () => {
    const looks = await beside(async () => ({
      'Fuzz Guitar.wav': await ffmpeg(session['Electric Guitar.wav']!, [
        ...['-af', 'volume=40dB:precision=float,asoftclip=hard,volume=-8dB'],
        ...['-c:a', 'pcm_s24le'],
      ]),
      'Bass Fuzz.wav': await ffmpeg(session['Bass.wav']!, [
        ...['-af', 'volume=30dB:precision=float,asoftclip=tanh,volume=-12dB,highpass=f=20'],
        ...['-c:a', 'pcm_s24le'],
      ]),
      'Synth Crush.wav': await ffmpeg(session['Synth Hum.wav']!, [
        ...['-af', 'acrusher=bits=5:mix=1:mode=lin:samples=8', '-c:a', 'pcm_s24le'],
      ]),
      'Hi-Hat Crush.wav': await ffmpeg(session['Hi-Hat.wav']!, [
        ...['-af', 'acrusher=bits=4:mix=1:samples=4', '-c:a', 'pcm_s24le'],
      ]),
      'Snare Clip.wav': await sox([session['Snare Top.wav']!], ['norm', '8', 'gain', '-3']),
    }));
    // Clipping stays worth a look where it is not the whole sound.
    expect(looks).toEqual(['look clipped Snare Clip']);
  }, 60_000);

  it('doubles, parallel copies, mid and side, a looped chorus', async () => {
    const looks = await beside(async () => ({
      'Electric Guitar Double.wav': await placed('guit_e_slide', ['speed', '1.004', 'pad', '0.02']),
      'Kick Parallel.wav': await ffmpeg(session['Kick In.wav']!, [
        ...['-af', 'acompressor=threshold=-30dB:ratio=8:attack=1:release=60:makeup=8'],
        ...['-c:a', 'pcm_s24le'],
      ]),
      'Snare Parallel.wav': await sox([session['Snare Top.wav']!], ['gain', '-6']),
      'Piano Mid.wav': await sox([session['Piano.wav']!], ['remix', '1,2']),
      'Piano Side.wav': await sox([session['Piano.wav']!], ['remix', '1,2i']),
      'Choir Chorus 2.wav': await sox(
        [session['Choir.wav']!],
        ['pad', '1.5', 'trim', '0', String(songSeconds), 'fade', 't', '0', '-0', '0.5'],
      ),
    }));
    expect(looks).toEqual([]);
  }, 60_000);

  it('backing vocals 1 to 8, reverb returns, a riser, one hit', async () => {
    const voices = [
      'bass_voxy_c',
      'ambi_choir',
      'glitch_robot1',
      'glitch_robot2',
      'mehackit_robot3',
      'mehackit_robot4',
      'mehackit_robot5',
      'mehackit_robot6',
    ];
    const looks = await beside(async () => {
      const sung = await inPairs(voices, (voice, index) =>
        placed(voice, ['pad', String(0.1 * index)]),
      );
      const vocals = sung.map((place, index) => [`Backing Vocal ${index + 1}.wav`, place] as const);
      const wet = ['reverb', '-w', '60', 'gain', '-50', 'trim', '0', String(songSeconds)];
      return {
        ...Object.fromEntries(vocals),
        'Vocal Reverb.wav': await sox([session['Choir.wav']!], wet),
        'Riser.wav': await placed('ambi_sauna', ['fade', 'l', '5', '8', '0.05'], 2),
        'Tambourine.wav': await placed('elec_cymbal', ['pad', '6']),
      };
    });
    expect(looks).toEqual([]);
  }, 120_000);
});
