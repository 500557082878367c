import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { kWeighting } from '#shared/measure/k-weighting.ts';
import { measureLoudness } from '#shared/measure/loudness.ts';
import { recordingsFolder } from '../../../server/dev/test-tools.mjs';
import { writeTestWave } from '../../support/audio-writer.ts';
import { sampled } from '../../support/measuring.ts';
import { inPairs, run, runForMessages, withFolder } from '../../support/outside-programs.ts';
import { readTrack } from '../../support/reading.ts';

async function loudnessOf(bytes: Uint8Array): Promise<number | null> {
  return measureLoudness(bytesSource(bytes), await readTrack(bytes));
}

/** Stretches of a 1 kHz tone: peak level in dBFS and seconds. */
function tones(stretches: readonly (readonly [number, number])[], rate: number): Float64Array {
  const levels = stretches.flatMap(([level, seconds]) =>
    Array.from({ length: Math.round(seconds * rate) }, () => 10 ** (level / 20)),
  );
  return sampled(levels.length, (frame) => {
    return levels[frame]! * Math.sin((2 * Math.PI * 1000 * frame) / rate);
  });
}

function floatFile(channels: readonly ArrayLike<number>[], sampleRateHz = 48_000): Buffer {
  return writeTestWave({ sampleRateHz, encoding: 'float', bits: 32, channels });
}

describe('K-weighting', () => {
  // ITU-R BS.1770-5, Annex 1, tables 1 and 2: the coefficients at 48 kHz.
  it('has the coefficients of BS.1770 at 48 kHz', () => {
    const [shelf, highPass] = kWeighting(48_000);
    expect(shelf.b0).toBeCloseTo(1.53512485958697, 12);
    expect(shelf.b1).toBeCloseTo(-2.69169618940638, 12);
    expect(shelf.b2).toBeCloseTo(1.19839281085285, 12);
    expect(shelf.a1).toBeCloseTo(-1.69065929318241, 12);
    expect(shelf.a2).toBeCloseTo(0.73248077421585, 12);
    expect([highPass.b0, highPass.b1, highPass.b2]).toEqual([1, -2, 1]);
    expect(highPass.a1).toBeCloseTo(-1.99004745483398, 12);
    expect(highPass.a2).toBeCloseTo(0.99007225036621, 12);
  });
});

describe('integrated loudness', { timeout: 30_000 }, () => {
  // EBU Tech 3341, table 1: 1 kHz in phase on both sides, peak levels; tolerance 0.1 LU.
  const cases: Record<string, readonly [expected: number, ...(readonly [number, number])[]]> = {
    '1, one level': [-23, [-23, 20]],
    '2, one low level': [-33, [-33, 20]],
    '3, the relative gate': [-23, [-36, 10], [-23, 60], [-36, 10]],
    '4, the absolute gate': [-23, [-72, 10], [-36, 10], [-23, 60], [-36, 10], [-72, 10]],
    '5, blocks that overlap': [-23, [-26, 20], [-20, 20.1], [-26, 20]],
  };
  it.each(Object.entries(cases))(
    'of EBU Tech 3341 case %s',
    async (_, [expected, ...stretches]) => {
      const tone = tones(stretches, 48_000);
      const loudness = await loudnessOf(floatFile([tone, tone]));
      expect(Math.abs(loudness! - expected)).toBeLessThanOrEqual(0.1);
    },
  );

  it('of EBU Tech 3341 case 6, surround channels counting 1.41 times', async () => {
    const [side, middle, rear] = [-28, -24, -30].map((level) => tones([[level, 20]], 48_000));
    const channels = [side!, side!, middle!, rear!, rear!];
    expect(Math.abs((await loudnessOf(floatFile(channels)))! + 23)).toBeLessThanOrEqual(0.1);
    // The low-frequency channel of 5.1 does not count.
    const withLfe = [side!, side!, middle!, tones([[-3, 20]], 48_000), rear!, rear!];
    expect(Math.abs((await loudnessOf(floatFile(withLfe)))! + 23)).toBeLessThanOrEqual(0.1);
  });

  it.each([22_050, 44_100, 88_200, 96_000, 192_000])('is the same at %i Hz', async (rate) => {
    const tone = tones([[-23, 3]], rate);
    const loudness = await loudnessOf(floatFile([tone, tone], rate));
    expect(Math.abs(loudness! + 23)).toBeLessThanOrEqual(0.1);
  });

  // ITU-R BS.1770-5, Annex 1: a 997 Hz sine at full scale on one channel reads -3.01 LKFS.
  it('of a full-scale tone at 997 Hz on one channel is -3.01 LUFS', async () => {
    const tone = sampled(480_000, (frame) => Math.sin((2 * Math.PI * 997 * frame) / 48_000));
    expect(await loudnessOf(floatFile([tone]))).toBeCloseTo(-3.01, 2);
    expect(await loudnessOf(floatFile([tone, tone]))).toBeCloseTo(0, 2);
  });

  it('is none in silence, below the gate, and below 400 ms', async () => {
    expect(await loudnessOf(floatFile([new Float64Array(96_000)]))).toBeNull();
    expect(await loudnessOf(floatFile([tones([[-75, 2]], 48_000)]))).toBeNull();
    expect(await loudnessOf(floatFile([tones([[-20, 0.399]], 48_000)]))).toBeNull();
    expect(await loudnessOf(floatFile([tones([[-20, 0.4]], 48_000)]))).not.toBeNull();
  });

  it('is what ffmpeg finds in recordings', async () => {
    const names = ['loop_amen_full', 'ambi_choir', 'guit_em9', 'loop_tabla', 'ambi_lunar_land'];
    await withFolder(async (folder) => {
      const pairs = await inPairs(names, async (name) => {
        const path = join(folder, `${name}.wav`);
        await run('sox', [`${recordingsFolder}/${name}.flac`, '-b', '24', '-c', '2', path]);
        const args = ['-hide_banner', '-nostats', '-i', path, '-af', 'ebur128', '-f', 'null', '-'];
        const said = await runForMessages('ffmpeg', args);
        const theirs = Number(/Integrated loudness:\s+I:\s+(-?[\d.]+) LUFS/.exec(said)![1]);
        const ours = await loudnessOf(await readFile(path));
        return { name, difference: Math.abs(ours! - theirs) };
      });
      // ffmpeg prints one decimal.
      expect(pairs.filter(({ difference }) => !(difference <= 0.11))).toEqual([]);
    });
  }, 30_000);
});
