import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Finding, RepairKind } from '#shared/findings/finding.ts';
import { chooseRepair } from '#shared/repair/choose-repairs.ts';
import { starterSets } from '#shared/rules/starter-sets.ts';
import { bextChunk, cueChunks, writeTestAiff } from '../../support/audio-writer.ts';
import { run, withFolder } from '../../support/outside-programs.ts';
import { savedIn, soxSamples } from '../../support/rendering.ts';
import {
  cleanPart,
  cleanSession,
  findAgain,
  noise,
  storyFrames,
  storyRateHz,
  tellStory,
  unpacked,
  waveOf,
  type StoryOptions,
} from '../../support/story.ts';

/*
 * Every repair is taken, packed, and the saved zip checked as if it had been dropped: the finding
 * must be gone, and sox must read the same samples where the repair had nothing to do. What sox
 * is told to do to the dropped file is what the repair promises.
 */

/** Takes one repair of one code, for every finding that offers it. */
const take = (code: string, repair: RepairKind) => (findings: readonly Finding[]) =>
  findings
    .filter((finding) => finding.code === code && finding.repairs.includes(repair))
    .map((finding) => chooseRepair(finding, repair));

/** A clean session in which `files` stand in for the organ. */
function sessionWith(files: Record<string, Buffer>): Record<string, Buffer> {
  const session = { ...cleanSession(), ...files };
  return Object.fromEntries(
    Object.entries(session).filter(([path]) => path !== 'Organ.wav' || path in files),
  );
}

type Case = {
  code: string;
  repair: RepairKind;
  files: Record<string, Buffer>;
  /** Path of the repaired entry in the package. */
  to: string;
  /** What sox does to which files to get the samples the entry must have. */
  sox: { inputs: string[]; effects?: string[]; combine?: string[] };
  /** Where they must agree, [startFrame, endFrame); everywhere without it, nowhere with null. */
  same?: [number, number] | null;
  options?: StoryOptions;
};

const part = cleanPart({ seed: 7 });
const other = cleanPart({ seed: 8 });
const loud = cleanPart({ seed: 5, peak: 1.2 });
const edgeFrames = 144;
const soundAtOnce = (() => {
  const next = noise(3);
  return cleanPart({ seed: 3 }).map((x, i) => (i < 4800 ? 0.4 * next() : x));
})();

const organ = (file: Buffer, ending = 'wav') => ({ [`Organ.${ending}`]: file });
const onOrgan = (effects: string[] = []) => ({ inputs: ['Organ.wav'], effects });

const cases: [string, Case][] = [
  [
    'rename',
    {
      code: 'name-breaks-rule',
      repair: 'rename',
      files: { 'ORGAN_01 copy.wav': waveOf([part]) },
      to: 'Organ.wav',
      sox: { inputs: ['ORGAN_01 copy.wav'] },
      options: { rules: starterSets.plain },
    },
  ],
  [
    'rewrite AIFF as WAV',
    {
      code: 'not-wav',
      repair: 'rewrite-container',
      files: organ(
        writeTestAiff({
          sampleRateHz: storyRateHz,
          encoding: 'pcm',
          bits: 24,
          channels: [part.map((x) => Math.round(x * 2 ** 23))],
        }),
        'aif',
      ),
      to: 'Organ.wav',
      sox: { inputs: ['Organ.aif'] },
    },
  ],
  [
    'join left and right',
    {
      code: 'split-stereo',
      repair: 'join',
      files: {
        'Organ L.wav': waveOf([part]),
        'Organ R.wav': waveOf([part.map((x, i) => 0.8 * x + 0.2 * other[i]!)]),
      },
      to: 'Organ.wav',
      sox: { inputs: ['Organ L.wav', 'Organ R.wav'], combine: ['-M'] },
    },
  ],
  [
    'keep one of two identical sides',
    {
      code: 'dual-mono',
      repair: 'keep-one-side',
      files: organ(waveOf([part, part])),
      to: 'Organ.wav',
      sox: onOrgan(['remix', '1']),
    },
  ],
  [
    'keep the side that sounds',
    {
      code: 'one-side-silent',
      repair: 'keep-one-side',
      files: organ(waveOf([part.map(() => 0), part])),
      to: 'Organ.wav',
      sox: onOrgan(['remix', '2']),
    },
  ],
  [
    'add silence at the end',
    {
      code: 'length-differs',
      repair: 'add-silence',
      files: organ(waveOf([part.slice(0, storyFrames - 4000)])),
      to: 'Organ.wav',
      sox: onOrgan(['pad', '0', '4000s']),
    },
  ],
  [
    'fade in at the start',
    {
      code: 'starts-on-sound',
      repair: 'fade',
      files: organ(waveOf([soundAtOnce])),
      to: 'Organ.wav',
      sox: onOrgan(),
      same: [edgeFrames, storyFrames],
    },
  ],
  [
    'fade out at the end',
    {
      code: 'ends-on-sound',
      repair: 'fade',
      files: organ(waveOf([[...soundAtOnce].reverse()])),
      to: 'Organ.wav',
      sox: onOrgan(),
      same: [0, storyFrames - edgeFrames],
    },
  ],
  [
    'turn down under the ceiling',
    {
      code: 'above-ceiling',
      repair: 'gain',
      files: organ(waveOf([loud.map((x) => 0.8 * x)])),
      to: 'Organ.wav',
      sox: onOrgan(),
      same: [0, 2400],
    },
  ],
  [
    'turn down what is above full scale',
    {
      code: 'over-full-scale',
      repair: 'gain',
      files: organ(waveOf([loud.map((x) => 1.5 * x)], { encoding: 'float' })),
      to: 'Organ.wav',
      sox: onOrgan(),
      same: [0, 2400],
    },
  ],
  [
    'take an offset out',
    {
      code: 'dc-offset',
      repair: 'high-pass',
      files: organ(waveOf([part.map((x) => x + 0.04)])),
      to: 'Organ.wav',
      sox: onOrgan(),
      same: null,
    },
  ],
];

describe('every repair, in the saved zip', () => {
  it.each(cases)('%s', async (_, { code, repair, files, to, sox, same, options }) => {
    const session = sessionWith(files);
    const choose = take(code, repair);
    const story = await tellStory(session, { ...options, choose });
    expect(story.found.map((finding) => finding.code)).toContain(code);
    const entry = story.report.package.entries.find((one) => one.to === to);
    expect(entry?.repairs).toContain(repair);

    const again = await findAgain(story.zip, options);
    expect(
      again.filter((finding) => finding.files.includes(to)).map((one) => one.code),
    ).not.toContain(code);
    await withFolder(async (folder) => {
      for (const [name, bytes] of Object.entries(session)) await savedIn(folder, name, bytes);
      const saved = await unpacked(folder, story);
      const ours = await soxSamples([join(saved, to)]);
      const inputs = sox.inputs.map((name) => join(folder, name));
      const theirs = await soxSamples(inputs, sox.effects, sox.combine);
      expect(ours.length).toBe(theirs.length);
      const [startFrame, endFrame] = same === null ? [0, 0] : (same ?? [0, ours.length]);
      expect(ours.slice(startFrame, endFrame)).toEqual(theirs.slice(startFrame, endFrame));
      // What no repair touched is the same file, byte for byte.
      for (const name of ['Bass.wav', 'Kick.wav', 'Snare.wav']) {
        await run('cmp', [join(folder, name), join(saved, name)]);
      }
    });
  });

  it('splits a file of four channels', async () => {
    const channels = [part, other, cleanPart({ seed: 9 }), cleanPart({ seed: 10 })];
    const session = sessionWith(organ(waveOf(channels)));
    const choose = take('too-many-channels', 'split');
    const story = await tellStory(session, { choose });
    const entries = story.report.package.entries.filter(({ repairs }) => repairs.includes('split'));
    expect(entries.map(({ to }) => to)).toEqual([1, 2, 3, 4].map((n) => `Organ ${n}.wav`));
    expect((await findAgain(story.zip)).map(({ code }) => code)).not.toContain('too-many-channels');
    await withFolder(async (folder) => {
      const dropped = await savedIn(folder, 'Organ.wav', session['Organ.wav']!);
      const saved = await unpacked(folder, story);
      for (const [channel, { to }] of entries.entries()) {
        expect(await soxSamples([join(saved, to)])).toEqual(
          await soxSamples([dropped], ['remix', String(channel + 1)]),
        );
      }
    });
  });

  it.each([
    ['silent', waveOf([part.map(() => 0)])],
    ['nearly-silent', waveOf([part.map((x) => x / 1000)])],
    ['same-audio', cleanSession()['Kick.wav']!],
  ])('leaves out what is %s', async (code, file) => {
    const choose = take(code, 'leave-out');
    const story = await tellStory(sessionWith(organ(file)), { choose });
    expect(story.found.map((finding) => finding.code)).toContain(code);
    expect(story.report.package.leftOut).toEqual([
      { path: 'Organ.wav', reason: code === 'same-audio' ? 'duplicate' : 'chosen' },
    ]);
    expect((await findAgain(story.zip)).map((finding) => finding.code)).not.toContain(code);
  });

  it('moves a file to where the others begin, with its stamp and its markers', async () => {
    const stamped = (timeReference: bigint, samples: number[]) =>
      waveOf([samples], {
        before: [bextChunk({ timeReference, version: 1 })],
        after: cueChunks([{ startFrame: 6000, label: 'Verse' }]),
      });
    const late = 4800;
    const session = {
      'Bass.wav': stamped(1000n, cleanPart({ seed: 11 })),
      'Kick.wav': stamped(1000n, cleanPart({ seed: 22 })),
      'Snare.wav': stamped(1000n, cleanPart({ seed: 44 })),
      'Organ.wav': stamped(1000n + BigInt(late), part.slice(0, storyFrames - late)),
    };
    const story = await tellStory(session, { choose: take('start-differs', 'move') });
    expect(story.found.map(({ code }) => code)).toContain('start-differs');
    const again = await findAgain(story.zip);
    expect(again.map(({ code }) => code)).not.toContain('start-differs');
    expect(again.map(({ code }) => code)).not.toContain('length-differs');
    await withFolder(async (folder) => {
      const dropped = await savedIn(folder, 'Organ.wav', session['Organ.wav']);
      const organFile = join(await unpacked(folder, story), 'Organ.wav');
      expect(await soxSamples([organFile])).toEqual(
        await soxSamples([dropped], ['pad', `${late}s`, '0']),
      );
      // ffprobe shows the time reference and the marker as ffmpeg reads them from bext and cue.
      const shown = await run('ffprobe', [
        ...['-v', 'error', '-show_format', '-show_chapters', '-of', 'json', organFile],
      ]);
      const probe = JSON.parse(shown) as {
        format: { tags: { time_reference: string } };
        chapters: { start_time: string }[];
      };
      expect(probe.format.tags.time_reference).toBe('1000');
      expect(Number(probe.chapters[0]?.start_time) * storyRateHz).toBeCloseTo(6000 + late, 0);
    });
  });
});
