import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { ChannelMeasures, Measures } from '#shared/measure/measures.ts';
import { defaultThresholds } from '#shared/rules/thresholds.ts';
import { recordingsFolder } from '../../../server/dev/test-tools.mjs';
import { floatMono, measureBytes, measureSamples, pcm, sampled } from '../../support/measuring.ts';
import { inPairs, run, withFolder } from '../../support/outside-programs.ts';

/** As the rules have it: so many runs, or so many samples in them, or one at full scale. */
function showsClipping({ clippedRuns, clipping }: ChannelMeasures): boolean {
  const { clippedRuns: runs, clippedSamples: samples } = defaultThresholds;
  return clippedRuns >= runs || clipping.samples >= samples || clipping.fullScaleRuns > 0;
}

function isClipped({ channels }: Measures): boolean {
  return channels.some(
    (channel) =>
      showsClipping(channel) && channel.clipping.flatCycleShare <= defaultThresholds.flatTopsShare,
  );
}

function isFlatByDesign({ channels }: Measures): boolean {
  return channels.some(
    (channel) =>
      showsClipping(channel) && channel.clipping.flatCycleShare > defaultThresholds.flatTopsShare,
  );
}

/** Sounds of several kinds whose raised versions sox really clips. */
const recordings = [
  ...['ambi_choir', 'ambi_glass_rub', 'ambi_piano', 'ambi_swoosh', 'bass_thick_c', 'bass_voxy_c'],
  ...['bass_woodsy_c', 'drum_cowbell', 'drum_snare_hard', 'drum_tom_mid_hard', 'guit_e_fifths'],
  ...['guit_e_slide', 'loop_garzul', 'loop_perc1', 'loop_tabla', 'misc_burp', 'perc_snap2'],
  ...['sn_dolf', 'tabla_ghe2', 'tabla_ghe7', 'tabla_ke1', 'vinyl_backspin', 'loop_mehackit2'],
  ...['perc_door', 'ambi_soft_buzz', 'elec_twang', 'tabla_tun1'],
];

/** Peaks at full scale, at another rate than the original's: nothing of its own clipping stays. */
async function makeClean(folder: string, name: string): Promise<string> {
  const path = join(folder, `${name}.wav`);
  const input = `${recordingsFolder}/${name}.flac`;
  await run('sox', [
    '-D',
    '-V1',
    input,
    '-e',
    'floating-point',
    '-b',
    '32',
    '-r',
    '48000',
    path,
    'norm',
    '-0.1',
  ]);
  return path;
}

async function measureFile(path: string): Promise<Measures> {
  return measureBytes(await readFile(path));
}

describe('clipped runs in recordings', () => {
  it('are found after a raise that clips, also when turned down or dithered afterwards', async () => {
    await withFolder(async (folder) => {
      const missed = await inPairs(recordings, async (name) => {
        const clean = await makeClean(folder, name);
        const make = async (label: string, from: string, options: string[], effects: string[]) => {
          const path = join(folder, `${name}.${label}.wav`);
          await run('sox', ['-V1', from, ...options, path, ...effects]);
          return path;
        };
        // sox holds samples below full scale wherever it works on them: that is the clipping.
        const raised = await make('raised', clean, ['-b', '24'], ['norm', '0', 'gain', '1']);
        const files = {
          raised,
          'raised by 3 dB': await make('raised3', clean, ['-b', '24'], ['norm', '0', 'gain', '3']),
          'turned down': await make('down', raised, ['-b', '24'], ['vol', '0.62']),
          'turned down, float': await make(
            'float',
            raised,
            ['-e', 'float', '-b', '32'],
            ['vol', '0.62'],
          ),
          dithered: await make('dithered', raised, ['-b', '16'], ['vol', '0.62', 'dither']),
        };
        const failures: string[] = [];
        if (isClipped(await measureFile(clean))) failures.push(`${name}: clean`);
        for (const [label, path] of Object.entries(files)) {
          if (!isClipped(await measureFile(path))) failures.push(`${name}: ${label}`);
        }
        return failures;
      });
      expect(missed.flat()).toEqual([]);
    });
  }, 120_000);

  it('are found in none of the recordings brought to another rate and level', async () => {
    const all = (await readdir(recordingsFolder)).filter((file) => file.endsWith('.flac'));
    const short = all.filter((file) => !file.startsWith('loop_') && !file.startsWith('ambi_'));
    await withFolder(async (folder) => {
      const names = short.slice(0, 60).map((file) => file.replace('.flac', ''));
      const flagged = await inPairs(names, async (name) => {
        const measures = await measureFile(await makeClean(folder, name));
        return isClipped(measures) || isFlatByDesign(measures) ? [name] : [];
      });
      expect(flagged.flat()).toEqual([]);
    });
  }, 120_000);
});

describe('clipped runs', { timeout: 30_000 }, () => {
  const loud = (frame: number) => 1.2 * Math.sin((2 * Math.PI * 220 * frame) / 48_000);
  const held = (level: number) => (sample: number) => Math.max(-level, Math.min(level, sample));

  it('are counted on both sides, with their places, longest and ceiling', async () => {
    // A cycle of 100 frames held at 0.8, three times, with a smaller one behind each.
    const samples = sampled(600, (frame) => {
      const size = Math.floor(frame / 100) % 2 === 0 ? 1 : 0.3;
      return held(0.8)(size * Math.sin((2 * Math.PI * (frame + 0.5)) / 100));
    });
    const { channels } = await measureSamples(floatMono(samples));
    // asin(0.8) is 14.76 frames behind the start: frames 15 to 34 and 65 to 84 are held.
    const ranges = [0, 200, 400].flatMap((start) => [
      { startFrame: start + 15, endFrame: start + 35 },
      { startFrame: start + 65, endFrame: start + 85 },
    ]);
    expect(channels[0]!.clippedRuns).toBe(6);
    expect(channels[0]!.clipping).toMatchObject({ samples: 120, longestRunFrames: 20, ranges });
    expect(channels[0]!.clipping.ceilingDbfs).toBeCloseTo(20 * Math.log10(0.8), 5);
    expect(channels[0]!.clipping.fullScaleRuns).toBe(0);
  });

  it('at full scale are those at 32767 too, which is not 1.0', async () => {
    const samples = sampled(4800, loud);
    const { channels } = await measureSamples(pcm(16, [samples]));
    expect(channels[0]!.peakDbfs).toBe(0);
    // Only the lower side reaches -32768; both are full scale.
    const { clippedRuns, clipping } = channels[0]!;
    expect(clipping.fullScaleRuns).toBe(clippedRuns);
    expect(clippedRuns).toBe(44);
  });

  it.each([30, 45, 60, 100])('are not the flat peaks of a %i Hz note', async (hertz) => {
    // A smooth peak of 16 bits has up to eleven equal samples at its top.
    const note = sampled(96_000, (frame) => {
      const decay = Math.exp(-frame / 48_000);
      return 0.98 * decay * Math.sin((2 * Math.PI * hertz * frame) / 48_000);
    });
    const steady = note.map((_, frame) => 0.98 * Math.sin((2 * Math.PI * hertz * frame) / 48_000));
    for (const bits of [16, 24]) {
      for (const samples of [note, steady]) {
        expect((await measureSamples(pcm(bits, [samples]))).channels[0]!.clippedRuns).toBe(0);
      }
    }
  });

  it('below -34 dBFS are none', async () => {
    const quiet = (level: number) => sampled(4800, (frame) => held(level)(loud(frame) * 0.1));
    const above = await measureSamples(floatMono(quiet(0.021)));
    const below = await measureSamples(floatMono(quiet(0.019)));
    expect(above.channels[0]!.clippedRuns).toBeGreaterThan(40);
    expect(below.channels[0]!.clippedRuns).toBe(0);
  });

  it('that end nearly every cycle are flat by design', async () => {
    const square = sampled(48_000, (frame) => (Math.floor(frame / 55) % 2 === 0 ? 0.7 : -0.7));
    const notes = square.map(
      (sample, frame) => sample * [1, 0.6, 0.8, 0.4][Math.floor(frame / 12_000)]!,
    );
    const fuzz = sampled(96_000, (frame) => {
      const swell = Math.exp(-frame / 60_000);
      return 0.9 * swell * held(1)(20 * Math.sin((2 * Math.PI * 98 * frame) / 48_000));
    });
    const crushed = sampled(
      48_000,
      (frame) => Math.round(loud(Math.floor(frame / 6) * 6) * 7) / 10,
    );
    for (const samples of [square, notes, crushed]) {
      const measures = await measureSamples(pcm(24, [samples]));
      expect(isFlatByDesign(measures)).toBe(true);
      expect(isClipped(measures)).toBe(false);
    }
    // A falling top is not even flat.
    expect(isClipped(await measureSamples(pcm(24, [fuzz])))).toBe(false);
  });
});
