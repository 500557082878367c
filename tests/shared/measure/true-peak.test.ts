import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { measureTruePeak } from '#shared/measure/oracle/measure-true-peak.ts';
import { recordingsFolder } from '../../../server/dev/test-tools.mjs';
import {
  floatMono,
  measureBytes,
  measureSamples,
  noise,
  sampled,
} from '../../support/measuring.ts';
import { inPairs, run, runForMessages, withFolder } from '../../support/outside-programs.ts';

/** A second at 48 kHz that comes and goes in 10 ms: a tone cut hard has other true peaks. */
function tone(amplitude: number, cyclesPerSample: number, degrees: number): Float64Array {
  return sampled(48_000, (frame) => {
    const fade = Math.min(1, frame / 480, (47_999 - frame) / 480);
    const phase = 2 * Math.PI * cyclesPerSample * frame + (degrees * Math.PI) / 180;
    return amplitude * fade * Math.sin(phase);
  });
}

describe('true peak', () => {
  // EBU Tech 3341 (v3), table 1, cases 15 to 19, tolerance +0.2 / -0.4 dB.
  it.each([
    { name: '15', amplitude: 0.5, cyclesPerSample: 1 / 4, degrees: 0, expected: -6 },
    { name: '16', amplitude: 0.5, cyclesPerSample: 1 / 4, degrees: 45, expected: -6 },
    { name: '17', amplitude: 0.5, cyclesPerSample: 1 / 6, degrees: 60, expected: -6 },
    { name: '18', amplitude: 0.5, cyclesPerSample: 1 / 8, degrees: 67.5, expected: -6 },
    { name: '19', amplitude: 1.41, cyclesPerSample: 1 / 4, degrees: 45, expected: 3 },
  ])('of EBU Tech 3341 case $name', async ({ amplitude, cyclesPerSample, degrees, expected }) => {
    const samples = tone(amplitude, cyclesPerSample, degrees);
    const { truePeakDbtp } = await measureSamples(floatMono(samples));
    expect(truePeakDbtp! - expected).toBeGreaterThan(-0.4);
    expect(truePeakDbtp! - expected).toBeLessThan(0.2);
  });

  it('is found between the samples: 3 dB above those of a tone at a quarter of the rate', async () => {
    const { truePeakDbtp, channels } = await measureSamples(floatMono(tone(0.5, 1 / 4, 45)));
    expect(channels[0]!.peakDbfs).toBeCloseTo(20 * Math.log10(0.5 * Math.SQRT1_2), 5);
    expect(truePeakDbtp! - channels[0]!.peakDbfs!).toBeGreaterThan(2.9);
  });

  it('is never below the sample peak, and null in silence', async () => {
    const spike = sampled(4000, (frame) => (frame === 2000 ? 0.7 : 0));
    const { truePeakDbtp } = await measureSamples(floatMono(spike));
    expect(truePeakDbtp).toBeCloseTo(20 * Math.log10(Math.fround(0.7)), 12);
    expect((await measureSamples(floatMono(new Float64Array(4000)))).truePeakDbtp).toBeNull();
  });

  it('is found behind a spike that is hardly lower', async () => {
    // Most samples are passed over because they cannot beat the peak so far: none too many.
    const random = noise(4);
    const sounds: Record<string, Float64Array> = {
      'a quarter of the rate': tone(0.4, 1 / 4, 45),
      'a sixth': tone(0.4, 1 / 6, 60),
      'a third': tone(0.4, 1 / 3, 30),
      'a low note': tone(0.4, 1 / 480, 1),
      'a high note': tone(0.4, 0.4583, 10),
      noise: sampled(48_000, () => 0.4 * random()),
      'single steps': sampled(48_000, () => (random() < 0 ? -0.4 : 0.4)),
    };
    for (const [name, sound] of Object.entries(sounds)) {
      const peak = measureTruePeak(sound.map(Math.fround));
      for (const share of [0.9, 0.99, 0.9999]) {
        const samples = new Float64Array(3000 + sound.length);
        samples[100] = share * peak;
        samples.set(sound, 3000);
        const { truePeakDbtp } = await measureSamples(floatMono(samples));
        expect(truePeakDbtp, `${name} behind ${share}`).toBe(20 * Math.log10(peak));
      }
    }
  });

  it('is what ffmpeg finds in recordings, within the 0.3 dB of EBU R 128', async () => {
    const names = [
      'loop_amen',
      'drum_cymbal_open',
      'guit_em9',
      'bd_haus',
      'ambi_choir',
      'elec_ping',
    ];
    await withFolder(async (folder) => {
      const pairs = await inPairs(names, async (name) => {
        const path = join(folder, `${name}.wav`);
        await run('sox', [
          '-D',
          `${recordingsFolder}/${name}.flac`,
          '-b',
          '24',
          path,
          'gain',
          '-6',
        ]);
        const filter = ['-af', 'ebur128=peak=true', '-f', 'null', '-'];
        const said = await runForMessages('ffmpeg', [
          '-hide_banner',
          '-nostats',
          '-i',
          path,
          ...filter,
        ]);
        const theirs = Number(/True peak:\s+Peak:\s+(-?[\d.]+) dBFS/.exec(said)![1]);
        const { truePeakDbtp } = await measureBytes(await readFile(path));
        return { name, difference: Math.abs(truePeakDbtp! - theirs) };
      });
      expect(pairs.filter(({ difference }) => !(difference <= 0.3))).toEqual([]);
    });
  }, 30_000);
});
