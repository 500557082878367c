import { describe, expect, it } from 'vitest';
import type { Level } from '#shared/findings/finding.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { JudgedFile } from '#shared/judge/judged-session.ts';
import {
  findingsOf,
  judgeCase,
  quietRules,
  type JudgedCase,
} from '../../support/finding-cases/finding-case.ts';
import { clippedChannel } from '../../support/finding-cases/signal.ts';
import { measuredFile } from '../../support/measure-builders.ts';

const withLevels = (levels: HouseRules['levels']): HouseRules => ({
  ...quietRules,
  levels: { ...quietRules.levels, ...levels },
});

function levelOfClipping(
  name: string,
  channel: ReturnType<typeof clippedChannel>,
  rules: HouseRules = quietRules,
): Level | null {
  const path = `${name}.wav`;
  const judgement = judgeCase({ add: [measuredFile({ path, channel })], rules });
  const file = judgement.files.find((judged) => judged.path === path);
  return file?.findings.find(({ code }) => code === 'clipped')?.level ?? null;
}

/** 48 frames at 48 kHz are 1 ms. */
const oneMillisecond = { longestRunFrames: 48 };
const atFullScale = { fullScaleRuns: 1 };

describe('the level of clipping', () => {
  it.each([
    'Lead Vocal',
    'Violin',
    'Trumpet',
    'Grand Piano',
    'Acoustic Guitar',
    'Banjo',
    'Bass Guitar DI 2',
    'Electric Guitar DI',
  ])('is must-fix on %s, however little', (name) => {
    expect(levelOfClipping(name, clippedChannel(3))).toBe('must-fix');
  });

  it.each(['Snare', 'Overheads L', 'Electric Guitar Amp', 'Bass Amp', 'Synth Lead', 'Riser'])(
    'is look on %s, but must-fix in number at full scale',
    (name) => {
      expect(levelOfClipping(name, clippedChannel(10, atFullScale))).toBe('look');
      expect(levelOfClipping(name, clippedChannel(11, atFullScale))).toBe('must-fix');
      expect(levelOfClipping(name, clippedChannel(3, oneMillisecond))).toBe('look');
      expect(levelOfClipping(name, clippedChannel(3, { ...oneMillisecond, ...atFullScale }))).toBe(
        'must-fix',
      );
    },
  );

  it('follows number and length where the part is not known', () => {
    expect(levelOfClipping('Audio 07', clippedChannel(10, { longestRunFrames: 47 }))).toBe('look');
    expect(levelOfClipping('Audio 07', clippedChannel(11))).toBe('must-fix');
    expect(levelOfClipping('Audio 07', clippedChannel(3, oneMillisecond))).toBe('must-fix');
  });

  it.each([
    [clippedChannel(2, { samples: 7 }), null],
    [clippedChannel(3, { samples: 7 }), 'must-fix'],
    [clippedChannel(2, { samples: 8 }), 'must-fix'],
    [clippedChannel(1, { samples: 3, fullScaleRuns: 1 }), 'must-fix'],
    [clippedChannel(900, { flatCycleShare: 0.79 }), 'must-fix'],
    [clippedChannel(900, { flatCycleShare: 0.8 }), null],
  ] as const)('counts from three runs, eight samples or full scale on (%#)', (channel, level) => {
    expect(levelOfClipping('Organ', channel)).toBe(level);
  });

  it('is no matter of thousands of places where a fuzz made them', () => {
    // 9,000 runs in three minutes are 50 a second.
    const fuzz = clippedChannel(9_000, { flatCycleShare: 0.3, ranges: [] });
    expect(levelOfClipping('Electric Guitar Fuzz', fuzz)).toBe(null);
    expect(levelOfClipping('Lead Vocal', fuzz)).toBe('must-fix');
    expect(
      levelOfClipping('Electric Guitar Fuzz', clippedChannel(8_999, { flatCycleShare: 0.3 })),
    ).toBe('look');
    expect(
      levelOfClipping('Electric Guitar Fuzz', clippedChannel(9_000, { flatCycleShare: 0.29 })),
    ).toBe('look');
  });
});

/** The findings of files that are added to good ones, without their arguments. */
function found(add: JudgedFile[], information: JudgedCase['information'] = {}): string[] {
  return findingsOf({ add, information }).map(
    ({ level, code, files }) => `${level} ${code} ${files.join(' + ')}`,
  );
}

describe('levels that keep good sessions quiet', () => {
  it('let loops and samples be as loud as they came', () => {
    const loud = clippedChannel(99, atFullScale);
    expect(levelOfClipping('Drum Loop', loud)).toBe('look');
    expect(levelOfClipping('Vocal Chops', loud)).toBe('look');
  });

  it('let a return ring on after everything else, and ends be rounded by a millisecond', () => {
    const ringing = { tailPeakDbfs: -50, floorDbfs: -55 };
    const longer = (path: string, frames: number) =>
      measuredFile({ path, format: { frames: 8_640_000 + frames }, channel: ringing });
    expect(found([longer('Vocal Reverb.wav', 96_000), longer('Organ.wav', 96_000)])).toEqual([
      'note length-differs Vocal Reverb.wav',
      'look length-differs Organ.wav',
    ]);
    const rounded = measuredFile({ path: 'Organ.wav', format: { frames: 8_640_048 } });
    expect(found([rounded])).toEqual(['note length-differs Organ.wav']);
  });

  it('know the side of a mid/side pair', () => {
    const pair = { midUnderSideDb: 90, sideUnderMidDb: -90, correlation: -1 };
    const stereo = (path: string) => measuredFile({ path, format: { channels: 2 }, pair });
    expect(found([stereo('Overheads S.wav'), stereo('Organ.wav')])).toEqual([
      'note sides-cancel Overheads S.wav',
      'must-fix sides-cancel Organ.wav',
    ]);
  });

  it('let several tracks stop together with the beat', () => {
    // At 120 BPM a thirty-second is 62.5 ms, 3,000 frames at 48 kHz.
    const stop = (path: string, start: number, frames = 3_000) =>
      measuredFile({
        path,
        channel: {
          dropouts: { count: 1, ranges: [{ startFrame: start, endFrame: start + frames }] },
        },
      });
    const tempo = { kind: 'fixed' as const, bpm: 120 };
    const stops = [stop('Organ.wav', 480_000), stop('Violin.wav', 480_000)];
    expect(found(stops, { tempo })).toEqual(['look dropout Organ.wav', 'look dropout Violin.wav']);
    expect(found(stops)).toEqual(['must-fix dropout Organ.wav', 'must-fix dropout Violin.wav']);
    // 97 frames are 2.02 ms beside it.
    const beside = [stop('Organ.wav', 480_097), stop('Violin.wav', 480_097)];
    expect(found(beside, { tempo })).toEqual([
      'must-fix dropout Organ.wav',
      'must-fix dropout Violin.wav',
    ]);
  });

  it('count gaps of one instrument once, and only within 5 ms', () => {
    const gap = (path: string, startFrame: number) =>
      measuredFile({
        path,
        channel: { dropouts: { count: 1, ranges: [{ startFrame, endFrame: startFrame + 480 }] } },
      });
    expect(found([gap('Kick Out.wav', 99_999), gap('Kick Sub.wav', 99_999)])).toEqual([
      'look dropout Kick Out.wav',
      'look dropout Kick Sub.wav',
    ]);
    // 240 frames at 48 kHz are 5 ms.
    expect(found([gap('Organ.wav', 99_999), gap('Violin.wav', 100_239)])[0]).toMatch(/^must-fix/);
    expect(found([gap('Organ.wav', 99_999), gap('Violin.wav', 100_241)])[0]).toMatch(/^look/);
  });

  it('take five gaps for gaps, and six for a style', () => {
    const gaps = (count: number) =>
      measuredFile({
        path: 'Organ.wav',
        channel: {
          dropouts: {
            count,
            ranges: Array.from({ length: count }, (_, index) => ({
              startFrame: index * 100_000,
              endFrame: index * 100_000 + 480,
            })),
          },
        },
      });
    expect(found([gaps(5)])).toEqual(['look dropout Organ.wav']);
    expect(found([gaps(6)])).toEqual([]);
  });

  it('only note how a guide track sounds', () => {
    const guide = measuredFile({ path: 'Guide Vocal.wav', channel: clippedChannel(99) });
    expect(found([guide])).toEqual(['note clipped Guide Vocal.wav']);
  });
});

describe('house rules', () => {
  it('change a level, for all or for a group, or turn the check off', () => {
    const rules = withLevels({
      clipped: { level: 'look', byGroup: { vocals: 'note', drums: 'off' } },
    });
    expect(levelOfClipping('Violin', clippedChannel(99), rules)).toBe('look');
    expect(levelOfClipping('Lead Vocal', clippedChannel(99), rules)).toBe('note');
    expect(levelOfClipping('Snare', clippedChannel(99), rules)).toBe(null);
    const off = withLevels({ clipped: { level: 'off' } });
    expect(levelOfClipping('Lead Vocal', clippedChannel(99), off)).toBe(null);
  });

  it('leave the default where they only say why', () => {
    const rules = withLevels({ clipped: { why: 'I hear it.', byGroup: { drums: 'note' } } });
    expect(levelOfClipping('Lead Vocal', clippedChannel(3), rules)).toBe('must-fix');
  });

  it('move a threshold', () => {
    const rules: HouseRules = {
      ...quietRules,
      signal: { ...quietRules.signal, ceilingDbfs: -6 },
    };
    const judgement = judgeCase({
      add: [
        measuredFile({ path: 'Organ.wav', channel: { peakDbfs: -6 } }),
        measuredFile({ path: 'Violin.wav', channel: { peakDbfs: -5.9 } }),
      ],
      rules,
    });
    expect(judgement.files.filter(({ findings }) => findings.length > 0)).toMatchObject([
      { path: 'Violin.wav', findings: [{ code: 'above-ceiling', rule: 'signal.ceilingDbfs' }] },
    ]);
  });

  it('say peaks are too high on top of clipping only if they have a level for it', () => {
    const add = [
      measuredFile({ path: 'Organ.wav', channel: { ...clippedChannel(5), peakDbfs: 0 } }),
    ];
    const codes = (rules: HouseRules) =>
      judgeCase({ add, rules })
        .files.flatMap(({ findings }) => findings)
        .map(({ code }) => code);
    expect(codes(quietRules)).toEqual(['clipped']);
    expect(codes(withLevels({ 'above-ceiling': { level: 'must-fix' } }))).toEqual([
      'clipped',
      'above-ceiling',
    ]);
  });
});
