import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { measureTrack } from '#shared/measure/measure-track.ts';
import type { ChannelMeasures } from '#shared/measure/measures.ts';
import { recordingsFolder } from '../../../server/dev/test-tools.mjs';
import { loadMeters } from '../../../server/cli/load-meters.ts';
import { inPairs, run, runForMessages, withFolder } from '../../support/outside-programs.ts';
import { readTrack } from '../../support/reading.ts';

/**
 * Peak, RMS, mean, length and bits of every supported encoding against what `sox ... stats` and
 * `ffmpeg ... astats` print about the same file (two and six decimals).
 */

/** How sox writes each encoding; the last four come from ffmpeg. */
const soxEncodings = {
  'u8.wav': ['-e', 'unsigned-integer', '-b', '8'],
  's16.wav': ['-b', '16'],
  's24.wav': ['-b', '24'],
  's32.wav': ['-b', '32'],
  'f32.wav': ['-e', 'floating-point', '-b', '32'],
  'f64.wav': ['-e', 'floating-point', '-b', '64'],
  's8.aiff': ['-b', '8'],
  's16.aiff': ['-b', '16'],
  's24.aiff': ['-b', '24'],
  's32.aiff': ['-b', '32'],
};
const ffmpegEncodings = {
  's24.rf64.wav': ['-rf64', 'always', '-c:a', 'pcm_s24le'],
  'f32.ext.wav': ['-c:a', 'pcm_f32le'],
  'sowt.aifc': ['-f', 'aiff', '-c:a', 'pcm_s16le'],
  'fl32.aifc': ['-f', 'aiff', '-c:a', 'pcm_f32be'],
};

/** Sounds as sox makes them, whole files of Debian's recordings among them. */
const sounds: Record<string, string[]> = {
  sine: ['-n', '-r', '48000', '-c', '1', 'synth', '1.3', 'sine', '997', 'gain', '-3'],
  'two notes': [
    '-n',
    '-r',
    '44100',
    '-c',
    '2',
    'synth',
    '1',
    'saw',
    '110',
    'sine',
    '333',
    'gain',
    '-8',
  ],
  'off centre': [
    '-n',
    '-r',
    '22050',
    '-c',
    '2',
    'synth',
    '0.9',
    'sine',
    '60',
    'gain',
    '-10',
    'dcshift',
    '0.06',
  ],
  noise: ['-n', '-r', '96000', '-c', '1', 'synth', '0.7', 'pinknoise', 'gain', '-12'],
  loop: [`${recordingsFolder}/loop_amen.flac`],
  kick: [`${recordingsFolder}/bd_haus.flac`],
};

type Made = { path: string; name: string };

async function makeFiles(folder: string): Promise<Made[]> {
  const perSound = await inPairs(Object.entries(sounds), async ([sound, source]) => {
    const [input, ...effects] = splitSource(source);
    const base = join(folder, `${sound.replace(' ', '-')}.base.wav`);
    await run('sox', ['-D', '-V1', ...input, '-e', 'floating-point', '-b', '32', base, ...effects]);
    const files: Made[] = [];
    for (const [ending, options] of Object.entries(soxEncodings)) {
      const path = join(folder, `${sound.replace(' ', '-')}.${ending}`);
      await run('sox', ['-D', '-V1', base, ...options, path, 'gain', '-0.5']);
      files.push({ path, name: `${sound}, ${ending}` });
    }
    for (const [ending, options] of Object.entries(ffmpegEncodings)) {
      const path = join(folder, `${sound.replace(' ', '-')}.${ending}`);
      await run('ffmpeg', ['-v', 'error', '-i', base, ...options, path]);
      files.push({ path, name: `${sound}, ${ending}` });
    }
    return files;
  });
  return perSound.flat();
}

/** sox wants the output's name between the input and the effects. */
function splitSource(source: string[]): [string[], ...string[]] {
  const effects = source.findIndex((word) => ['synth', 'trim'].includes(word));
  return effects < 0 ? [source] : [source.slice(0, effects), ...source.slice(effects)];
}

type Stated = { peakDb: number; rmsDb: number; dcOffset: number; usedBits: number };

/** One column a channel, behind the one for all of them where there are several. */
async function askSox(path: string, channels: number): Promise<Stated[]> {
  const lines = (await runForMessages('sox', [path, '-n', 'stats'])).split('\n');
  const row = (label: string) =>
    lines
      .find((line) => line.startsWith(label))!
      .slice(label.length)
      .trim()
      .split(/\s+/)
      .slice(-channels);
  return Array.from({ length: channels }, (_, channel) => ({
    peakDb: Number(row('Pk lev dB')[channel]),
    rmsDb: Number(row('RMS lev dB')[channel]),
    dcOffset: Number(row('DC offset')[channel]),
    usedBits: Number(row('Bit-depth')[channel]!.split('/')[1]),
  }));
}

/** For ffmpeg full scale is 32767 in files of up to 16 bits: `scale` makes that ours. */
async function askFfmpeg(path: string, scale: number): Promise<Stated[]> {
  const filter = 'astats=measure_overall=none';
  const args = ['-hide_banner', '-nostats', '-i', path, '-af', filter, '-f', 'null', '-'];
  const printed = await runForMessages('ffmpeg', args);
  return printed
    .split(/Channel: \d+/)
    .slice(1)
    .map((part) => {
      const value = (label: string) => new RegExp(`${label}: ([-\\d.]+)`).exec(part)![1];
      return {
        peakDb: Number(value('Peak level dB')) + 20 * Math.log10(scale),
        rmsDb: Number(value('RMS level dB')) + 20 * Math.log10(scale),
        dcOffset: Number(value('DC offset')) * scale,
        usedBits: Number(value('Bit depth')),
      };
    });
}

describe('measures of every encoding', () => {
  it('agree with sox and ffmpeg', async () => {
    await withFolder(async (folder) => {
      const files = await makeFiles(folder);
      expect(files.length).toBeGreaterThanOrEqual(60);
      const meters = await loadMeters();
      const failures = await inPairs(files, async ({ path, name }) => {
        const bytes = await readFile(path);
        const reading = await readTrack(bytes, path);
        const { measures } = await measureTrack(bytesSource(bytes), reading, meters);
        const soxFrames = Number(await run('soxi', ['-s', path]));
        const isFloat = reading.format.encoding === 'float';
        const scale = reading.format.bits <= 16 ? 32767 / 32768 : 1;
        const [sox, ffmpeg] = [
          await askSox(path, measures.channels.length),
          await askFfmpeg(path, scale),
        ];
        return [
          ...(measures.frames === soxFrames ? [] : [`${name}: ${measures.frames} frames`]),
          ...measures.channels.flatMap((channel, index) => [
            ...disagree(`${name}, sox`, channel, sox[index]!, 0.006, !isFloat),
            ...disagree(`${name}, ffmpeg`, channel, ffmpeg[index]!, 2e-6, false),
          ]),
        ];
      });
      expect(failures.flat()).toEqual([]);
    });
  }, 120_000);
});

function disagree(
  name: string,
  channel: ChannelMeasures,
  stated: Stated,
  toleranceDb: number,
  compareBits: boolean,
): string[] {
  const failures: string[] = [];
  const near = (label: string, ours: number | null, theirs: number, tolerance: number) => {
    if (ours === null || !(Math.abs(ours - theirs) <= tolerance)) {
      failures.push(`${name}: ${label} ${ours} instead of ${theirs}`);
    }
  };
  near('peak', channel.peakDbfs, stated.peakDb, toleranceDb);
  near('RMS', channel.rmsDbfs, stated.rmsDb, toleranceDb);
  near('mean', channel.dcOffset, stated.dcOffset, 0.0000011);
  if (compareBits) near('bits', channel.realBits, stated.usedBits, 0);
  return failures;
}
