import { describe, expect, it } from 'vitest';
import type { Level } from '#shared/findings/finding.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { judgeCase, quietRules } from '../../support/finding-cases/finding-case.ts';
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
