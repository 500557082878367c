import { describe, expect, it } from 'vitest';
import { judgeSession } from '#shared/judge/judge-session.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { measuredFile, session } from '../../support/measure-builders.ts';

const information = emptySessionInformation();
const names = ['Kick.wav', 'Snare.wav', 'Bass.wav', 'Piano.wav', 'Lead Vocal.wav'];

describe('judgeSession', () => {
  it('finds nothing in files that agree', () => {
    const good = session(names.map((path) => measuredFile({ path })));
    const judgement = judgeSession(good, defaultRules, information);
    expect(judgement.files.flatMap((file) => file.findings)).toEqual([]);
    expect(judgement.session).toMatchObject({
      sampleRateHz: 48_000,
      bits: 24,
      frames: 8_640_000,
      startsProven: true,
    });
  });

  it('reports a file that is shorter at its silent end, and offers silence', () => {
    const short = measuredFile({
      path: 'Tambourine.wav',
      format: { frames: 4_800_000 },
      channel: { lastSoundFrame: 4_700_000 },
    });
    const files = [...names.map((path) => measuredFile({ path })), short];
    const judgement = judgeSession(session(files), defaultRules, information);
    expect(judgement.files.at(-1)?.findings).toEqual([
      {
        code: 'length-differs',
        level: 'note',
        files: ['Tambourine.wav'],
        channel: null,
        places: 0,
        ranges: [],
        args: {
          lengthSeconds: 100,
          sessionLengthSeconds: 180,
          differenceFrames: -3_840_000,
          differenceSeconds: -80,
          startProven: true,
          shiftSeconds: null,
          soundsAtOnce: false,
        },
        rule: 'startAndLength.lengthToleranceFrames',
        repairs: ['add-silence'],
        answer: null,
      },
    ]);
  });
});
