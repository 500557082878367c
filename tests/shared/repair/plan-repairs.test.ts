import { describe, expect, it } from 'vitest';
import { checkSession, repairSession } from '#shared/check.ts';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import type { Finding } from '#shared/findings/finding.ts';
import { chooseRepair, safeRepairs } from '#shared/repair/choose-repairs.ts';
import { draftEntries, type DraftedTrack } from '#shared/repair/draft-entries.ts';
import { rememberRenders } from '#shared/repair/remember-renders.ts';
import type { ChosenRepair } from '#shared/repair/repair-plan.ts';
import { defaultRules, starterSets } from '#shared/rules/starter-sets.ts';
import { measureHere, type MeasureFile } from '#shared/session/measure-file.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { loadMeters } from '../../../server/cli/load-meters.ts';
import { droppedBytes } from '../../support/rendering.ts';
import { cleanPart, cleanSession, storyFrames, tellStory, waveOf } from '../../support/story.ts';

const part = cleanPart({ seed: 7 });
const short = waveOf([part.slice(0, storyFrames - 4000)]);

async function draftedTrack(path: string, bytes: Uint8Array): Promise<DraftedTrack> {
  const reading = await readWave(bytesSource(bytes), path);
  if (reading.kind !== 'track') throw new Error('no track');
  return { path, format: reading.format, channelMask: reading.layout.channelMask };
}

function findingOf(more: Partial<Finding> & Pick<Finding, 'code' | 'files' | 'repairs'>): Finding {
  return {
    level: 'look',
    channel: null,
    places: 1,
    ranges: [],
    args: {},
    rule: 'levels',
    answer: null,
    ...more,
  };
}

describe('names in the plan', () => {
  it('are those given by hand, before any proposal', async () => {
    const { plan } = await tellStory(
      { ...cleanSession(), 'Snare copy.wav': waveOf([part]) },
      {
        rules: starterSets.numbered,
        information: { names: { 'Snare copy.wav': 'Bass: the "big" one?' } },
        choose: safeRepairs,
      },
    );
    const entry = plan.entries.find(({ from }) => from[0] === 'Snare copy.wav');
    expect(entry?.to).toBe('Bass_ the _big_ one_.wav');
  });

  it('stay as they are where nobody asked for proper ones, but for what no disk takes', async () => {
    const { plan } = await tellStory({
      'drums/01.wav': waveOf([part]),
      'bass/01.WAV': short,
      'keys/100%.wav': waveOf([cleanPart({ seed: 8 })]),
    });
    expect(plan.entries.map(({ from, to }) => [from[0], to])).toEqual([
      ['keys/100%.wav', '100_.wav'],
      ['bass/01.WAV', 'bass 01.WAV'],
      ['drums/01.wav', 'drums 01.wav'],
    ]);
  });

  it('never hide what is made for the package', async () => {
    const { plan } = await tellStory({
      ...cleanSession(),
      'Guitars/Notes.wav': waveOf([part]),
      'Guitars/Track sheet.pdf': Buffer.from('old'),
    });
    expect(plan.entries.map(({ to }) => to)).toContain('Notes.wav');
    expect(plan.entries.find(({ from }) => from[0] === 'Guitars/Track sheet.pdf')?.to).toBe(
      'Notes/Track sheet.pdf',
    );
  });
});

describe('choices', () => {
  it('change nothing when their finding is gone', async () => {
    const stale: ChosenRepair[] = [
      { repair: 'gain', code: 'above-ceiling', files: ['Kick.wav'] },
      { repair: 'leave-out', code: 'silent', files: ['Bass.wav'] },
      { repair: 'add-silence', code: 'length-differs', files: ['gone.wav'] },
    ];
    const { plan } = await tellStory(cleanSession(), { choose: () => stale });
    expect(plan.entries.every(({ operations }) => operations.length === 0)).toBe(true);
    expect(plan.entries.length).toBe(4);
  });

  it('about a line that stands for many files are taken for each of them', async () => {
    const track = await draftedTrack('a.wav', short);
    const tracks = ['a.wav', 'b.wav', 'c.wav'].map((path) => ({ ...track, path }));
    const line = findingOf({
      code: 'length-differs',
      files: ['a.wav', 'b.wav', 'c.wav'],
      repairs: ['add-silence'],
      perFile: tracks.map(({ path }, index) => ({
        ...{ path, channel: null, places: 1, ranges: [] },
        args: { differenceFrames: -1000 * (index + 1) },
      })),
    });
    const all = draftEntries(tracks, [line], [chooseRepair(line, 'add-silence')]);
    expect(all.drafts.map(({ operations }) => operations)).toEqual(
      [1, 2, 3].map((n) => [{ kind: 'pad', toFrames: track.format.frames + 1000 * n }]),
    );
    const one: ChosenRepair = { repair: 'add-silence', code: 'length-differs', files: ['b.wav'] };
    const some = draftEntries(tracks, [line], [one]);
    expect(some.drafts.map(({ operations }) => operations.length)).toEqual([0, 1, 0]);
  });

  it('leave out the files they name, and of equal files all but the first', async () => {
    const track = await draftedTrack('a.wav', short);
    const tracks = ['a.wav', 'b.wav', 'c.wav'].map((path) => ({ ...track, path }));
    const files = tracks.map(({ path }) => path);
    const same = findingOf({ code: 'same-audio', files, repairs: ['leave-out'] });
    const left = (choice: ChosenRepair) =>
      draftEntries(tracks, [same], [choice]).leftOut.map(({ path }) => path);
    expect(left(chooseRepair(same, 'leave-out'))).toEqual(['b.wav', 'c.wav']);
    expect(left({ ...chooseRepair(same, 'leave-out'), files: ['a.wav'] })).toEqual(['a.wav']);
  });

  it('are rendered in one order, whatever order they were chosen in', async () => {
    const track = await draftedTrack('a.wav', waveOf([part, part]));
    const findings = [
      findingOf({ code: 'ends-on-sound', files: ['a.wav'], repairs: ['fade'] }),
      findingOf({
        code: 'start-differs',
        files: ['a.wav'],
        repairs: ['move'],
        args: { differenceFrames: 500 },
      }),
      findingOf({
        code: 'above-ceiling',
        files: ['a.wav'],
        repairs: ['gain'],
        args: { peakDbfs: -0.25, ceilingDbfs: -1 },
      }),
      findingOf({ code: 'dc-offset', files: ['a.wav'], repairs: ['high-pass'] }),
      findingOf({
        code: 'dual-mono',
        files: ['a.wav'],
        repairs: ['keep-one-side'],
        args: { gainDb: 2 },
      }),
      findingOf({
        code: 'length-differs',
        files: ['a.wav'],
        repairs: ['add-silence'],
        args: { differenceFrames: -1000 },
      }),
    ];
    const chosen = findings.map((finding) => chooseRepair(finding, finding.repairs[0]!));
    const { frames } = track.format;
    expect(draftEntries([track], findings, chosen).drafts[0]?.operations).toEqual([
      // The louder side: right is 2 dB over left.
      { kind: 'take-channel', channel: 1 },
      { kind: 'high-pass', cutoffHz: 5 },
      // Down to the ceiling, in steps of a tenth, never above it.
      { kind: 'gain', gainDb: -0.8 },
      // 3 ms at 48 kHz.
      { kind: 'fade', shape: 'out', startFrame: frames - 144, endFrame: frames, channel: null },
      { kind: 'move', byFrames: 500 },
      { kind: 'pad', toFrames: frames + 1000 },
    ]);
  });

  it('are safe in one go only where nothing sounds different', () => {
    const findings = [
      findingOf({
        code: 'dual-mono',
        files: ['same.wav'],
        repairs: ['keep-one-side'],
        args: { gainDb: 0 },
      }),
      findingOf({
        code: 'dual-mono',
        files: ['panned.wav'],
        repairs: ['keep-one-side'],
        args: { gainDb: 3 },
      }),
      findingOf({
        code: 'one-side-silent',
        files: ['left.wav'],
        repairs: ['keep-one-side'],
        args: { silentSide: 'right' },
      }),
      findingOf({ code: 'silent', files: ['silent.wav'], repairs: ['leave-out'] }),
      findingOf({ code: 'starts-on-sound', files: ['edge.wav'], repairs: ['fade'] }),
      findingOf({ code: 'name-breaks-rule', files: ['name.wav'], repairs: ['rename'] }),
    ];
    expect(safeRepairs(findings).map(({ files }) => files[0])).toEqual(['same.wav', 'name.wav']);
  });
});

describe('fades', () => {
  const fade = (channel: number | null, path = 'a.wav') =>
    findingOf({ code: 'starts-on-sound', files: [path], repairs: ['fade'], channel });
  const faded = { kind: 'fade', shape: 'in', startFrame: 0, endFrame: 144 };

  it('follow the side that is kept, and are dropped with the other', async () => {
    const track = await draftedTrack('a.wav', waveOf([part, part]));
    const keep = findingOf({
      code: 'one-side-silent',
      files: ['a.wav'],
      repairs: ['keep-one-side'],
      args: { silentSide: 'left' },
    });
    const operations = (channel: number) => {
      const findings = [fade(channel), keep];
      const chosen = findings.map((finding) => chooseRepair(finding, finding.repairs[0]!));
      return draftEntries([track], findings, chosen).drafts[0]?.operations;
    };
    const take = { kind: 'take-channel', channel: 1 };
    expect(operations(1)).toEqual([take, { ...faded, channel: null }]);
    expect(operations(0)).toEqual([take]);
  });

  it('stay on their own side of what is joined', async () => {
    const track = await draftedTrack('a L.wav', short);
    const tracks = [track, { ...track, path: 'a R.wav' }];
    const findings = [
      fade(0, 'a R.wav'),
      findingOf({
        code: 'split-stereo',
        files: ['a L.wav', 'a R.wav'],
        repairs: ['join'],
        args: { left: 'a L.wav', right: 'a R.wav' },
      }),
    ];
    const chosen = findings.map((finding) => chooseRepair(finding, finding.repairs[0]!));
    expect(draftEntries(tracks, findings, chosen).drafts).toMatchObject([
      {
        from: ['a L.wav', 'a R.wav'],
        channels: 2,
        operations: [{ kind: 'join' }, { ...faded, channel: 1 }],
      },
    ]);
  });

  it('across an edit are as long on both sides of it', async () => {
    const track = await draftedTrack('a.wav', short);
    const range = (startFrame: number) => ({
      ...{ startFrame, endFrame: startFrame + 1, confidence: 'sure' as const },
    });
    const edits = findingOf({
      code: 'dropout',
      files: ['a.wav'],
      repairs: ['fade'],
      ranges: [range(40), range(5000)],
    });
    const { drafts } = draftEntries([track], [edits], [chooseRepair(edits, 'fade')]);
    expect(drafts[0]?.operations).toMatchObject([
      { shape: 'cross', startFrame: 0, endFrame: 80 },
      { shape: 'cross', startFrame: 4904, endFrame: 5096 },
    ]);
  });
});

describe('a split file', () => {
  it.each([
    [0x3f, 6, ['L', 'R', 'C', 'LFE', 'Ls', 'Rs']],
    [0x33, 4, ['L', 'R', 'Ls', 'Rs']],
    [0, 4, ['1', '2', '3', '4']],
  ])('names its channels by mask %i', async (channelMask, channels, labels) => {
    const rows = Array.from({ length: channels }, () => [0, 0.1, 0]);
    const track = await draftedTrack('a.wav', waveOf(rows, { channelMask }));
    const finding = findingOf({ code: 'too-many-channels', files: ['a.wav'], repairs: ['split'] });
    const { drafts } = draftEntries([track], [finding], [chooseRepair(finding, 'split')]);
    expect(drafts.map(({ channelLabel }) => channelLabel)).toEqual(labels);
  });
});

describe('rememberRenders', () => {
  it('renders again only what was not made before', async () => {
    const session = { ...cleanSession(), 'Organ.wav': short, 'Snare.wav': waveOf([part, part]) };
    const measure = measureHere(await loadMeters());
    const measured: string[] = [];
    const counting: MeasureFile = (file, options) => {
      measured.push(file.path);
      return measure(file, options);
    };
    const input = {
      files: Object.entries(session).map(([path, bytes]) => droppedBytes(path, bytes)),
      rules: defaultRules,
      information: emptySessionInformation(),
      measureFile: rememberRenders(counting),
    };
    const check = await checkSession(input);
    const findings = check.judgement.files.flatMap((file) => file.findings);
    measured.length = 0;
    const first = await repairSession(input, check, safeRepairs(findings));
    expect(measured).toEqual(['Organ.wav', 'Snare.wav']);
    const renamed = { ...input.information, names: { 'Organ.wav': 'Hammond' } };
    const second = await repairSession(
      { ...input, information: renamed },
      check,
      safeRepairs(findings),
    );
    expect(measured.length).toBe(2);
    const organ = second.after.files.find(({ path }) => path === 'Hammond.wav');
    expect(organ?.measures).toEqual(
      first.after.files.find(({ path }) => path === 'Organ.wav')?.measures,
    );
  });
});
