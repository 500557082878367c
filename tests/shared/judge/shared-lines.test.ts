import { describe, expect, it } from 'vitest';
import { maxFindingRanges, maxSharedRanges } from '#shared/findings/finding.ts';
import { answerPath } from '#shared/judge/answers.ts';
import {
  findingsOf,
  goodTracks,
  judgeCase,
  quietRules,
} from '../../support/finding-cases/finding-case.ts';
import { clippedChannel } from '../../support/finding-cases/signal.ts';
import { measuredFile } from '../../support/measure-builders.ts';

const vocals = (count: number, channel = clippedChannel(4)) =>
  Array.from({ length: count }, (_, index) =>
    measuredFile({ path: `Backing Vocal ${index + 1}.wav`, channel }),
  );

describe('one line for many files', () => {
  it('stands where at least half of the files share a finding', () => {
    const judgement = judgeCase({ add: vocals(5) });
    expect(judgement.files.flatMap(({ findings }) => findings)).toEqual([]);
    const [line] = judgement.session.findings;
    expect(line).toMatchObject({
      code: 'clipped',
      level: 'must-fix',
      files: [1, 2, 3, 4, 5].map((number) => `Backing Vocal ${number}.wav`),
      places: 20,
      ranges: [],
      channel: null,
    });
    expect(line?.perFile).toHaveLength(5);
    expect(line?.perFile?.[0]).toMatchObject({
      path: 'Backing Vocal 1.wav',
      places: 4,
      args: { runs: 4 },
    });
    expect(judgement.counts['must-fix']).toBe(1);
  });

  it('does not where fewer than half do', () => {
    const judgement = judgeCase({ add: vocals(4) });
    expect(judgement.session.findings).toEqual([]);
    expect(judgement.counts['must-fix']).toBe(4);
  });

  it('does not in a set so small that two are half of it', () => {
    const judgement = judgeCase({ instead: vocals(2) });
    expect(judgement.session.findings).toEqual([]);
  });

  it('keeps levels apart, and carries the arguments of the worst', () => {
    const files = [
      ...vocals(2),
      measuredFile({ path: 'Backing Vocal 3.wav', channel: clippedChannel(9) }),
      measuredFile({ path: 'Snare.wav', channel: clippedChannel(3) }),
      measuredFile({ path: 'Kick.wav', channel: clippedChannel(3) }),
      measuredFile({ path: 'Piano.wav' }),
    ];
    const lines = judgeCase({ instead: files }).session.findings;
    expect(lines.map(({ level, files: of, args }) => [level, of.length, args.runs])).toEqual([
      ['must-fix', 3, 9],
      ['look', 2, 3],
    ]);
  });

  it('keeps apart what can be repaired and what cannot', () => {
    const file = (path: string, frames: number) => measuredFile({ path, format: { frames } });
    const judgement = judgeCase({
      instead: goodTracks(),
      add: [
        ...[1, 2, 3, 4].map((number) => file(`Backing Vocal ${number}.wav`, 8_000_000)),
        file('Vocal Reverb.wav', 9_000_000),
      ],
    });
    expect(judgement.session.findings).toMatchObject([
      { code: 'length-differs', level: 'note', repairs: ['add-silence'] },
    ]);
    expect(judgement.session.findings[0]?.files).toHaveLength(4);
    expect(judgement.files.at(-1)?.findings).toMatchObject([{ level: 'note', repairs: [] }]);
  });

  it('keeps a few places of each file, and says how many there are', () => {
    const many = clippedChannel(250);
    const [line] = judgeCase({ add: vocals(6, many) }).session.findings;
    expect(line?.places).toBe(1500);
    expect(line?.perFile?.[0]?.ranges).toHaveLength(maxSharedRanges);
    const [alone] = findingsOf({ add: vocals(1, many) });
    expect(alone?.places).toBe(250);
    expect(alone?.ranges).toHaveLength(maxFindingRanges);
  });

  it('stands earlier for what cuts all files at once', () => {
    const cut = measuredFile({
      path: 'Organ.wav',
      channel: { lastSoundFrame: 8_639_999, endEdge: { peakDbfs: -20, ramps: false } },
    });
    const alike = ['Violin.wav', 'Cello.wav'].map((path) => ({ ...cut, path }));
    expect(findingsOf({ add: [cut, ...alike] })).toMatchObject([
      { code: 'ends-on-sound', level: 'look', files: ['Organ.wav', 'Violin.wav', 'Cello.wav'] },
      // Built from one file, so they are one sound as well.
      { code: 'same-audio' },
    ]);
  });
});

describe('answers', () => {
  const clipped = { code: 'clipped', answer: 'on-purpose' as const };

  it('stay with the finding of their file', () => {
    const [one, two] = findingsOf({
      add: vocals(2),
      information: { answers: [{ ...clipped, path: 'Backing Vocal 1.wav' }] },
    });
    expect([one?.answer, two?.answer]).toEqual(['on-purpose', null]);
  });

  it('can be given to a line for many files, and keep what was said of one file', () => {
    const answers = [
      { ...clipped, path: null },
      { code: 'clipped', path: 'Backing Vocal 2.wav', answer: 'cannot-export-again' as const },
    ];
    const { files, session } = judgeCase({ add: vocals(6), information: { answers } });
    expect(session.findings.map(({ answer, files: of }) => [answer, of.length])).toEqual([
      ['on-purpose', 5],
    ]);
    expect(files.flatMap(({ findings }) => findings.map(({ answer }) => answer))).toEqual([
      'cannot-export-again',
    ]);
  });

  it('are kept under the path that answerPath names', () => {
    const [line] = judgeCase({ add: vocals(6) }).session.findings;
    expect(answerPath(line!)).toBeNull();
    const [alone] = findingsOf({ add: vocals(1) });
    expect(answerPath(alone!)).toBe('Backing Vocal 1.wav');
  });

  it('settle what is worth a look, never what must be fixed', () => {
    const look = { channel: { peakDbfs: null, rmsDbfs: null } };
    const silent = measuredFile({ path: 'Organ.wav', ...look });
    const verdict = (answer: 'on-purpose' | 'all-there-is' | 'cannot-export-again') =>
      judgeCase({
        add: [silent],
        information: { answers: [{ code: 'silent', path: 'Organ.wav', answer }] },
      }).verdict;
    expect(judgeCase({ add: [silent] }).verdict).toBe('look');
    expect(verdict('on-purpose')).toBe('ready');
    expect(verdict('all-there-is')).toBe('ready');
    expect(verdict('cannot-export-again')).toBe('look');
    const answers = [{ ...clipped, path: 'Backing Vocal 1.wav' }];
    expect(judgeCase({ add: vocals(1), information: { answers } }).verdict).toBe('must-fix');
    expect(judgeCase({}).verdict).toBe('ready');
  });
});

describe('roles', () => {
  it('set by hand win over names, and a rough mix is not checked as a track', () => {
    const loud = measuredFile({
      path: 'Song v7.wav',
      format: { channels: 2, sampleRateHz: 44_100, bits: 16, frames: 1_000 },
      channel: { ...clippedChannel(500), peakDbfs: 0 },
    });
    expect(findingsOf({ add: [loud] }).length).toBeGreaterThan(2);
    const information = { roles: { 'Song v7.wav': 'rough-mix' as const } };
    expect(findingsOf({ add: [loud], information })).toEqual([]);
    const judgement = judgeCase({ add: [loud], information });
    expect(judgement.files.at(-1)?.role).toBe('rough-mix');
  });

  it('leave a file out, and spare the click what is meant for music', () => {
    const click = measuredFile({
      path: 'Click.wav',
      format: { channels: 2 },
      pair: { identical: true },
      channel: { ...clippedChannel(99), peakDbfs: 0 },
    });
    expect(findingsOf({ add: [click] })).toEqual([]);
    const take = measuredFile({ path: 'Violin.wav', format: { sampleRateHz: 44_100 } });
    const information = { roles: { 'Violin.wav': 'leave-out' as const } };
    expect(findingsOf({ add: [take], information })).toEqual([]);
  });

  it('make everything that is no audio a note', () => {
    const rules = { ...quietRules, bring: { ...quietRules.bring, notes: 'required' as const } };
    const lyrics = { path: 'Lyrics.txt', bytes: 100, format: null, measures: null };
    const files = [{ ...lyrics, reading: { kind: 'not-audio' as const } }];
    const judgement = judgeCase({ add: files, rules });
    expect(judgement.files.at(-1)).toMatchObject({ role: 'note', findings: [] });
    expect(judgement.session.findings).toEqual([]);
  });
});
