import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { bextChunk, writeTestAiff, writeTestWave } from '../support/audio-writer.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import {
  checkIsOver,
  downloadZip,
  findingsOn,
  openBench,
  packedEntries,
  soxDigest,
} from '../support/on-the-bench.ts';
import { run, runForMessages, withFolder } from '../support/outside-programs.ts';

/**
 * Every repair on offer, proved by what comes out: the saved zip is dropped again and the finding
 * is gone; sox finds all samples that no repair may touch the same as before.
 */

const rate = 48_000;
const frames = 2 * rate;
const scale = 2 ** 23;

/** Rises from nothing over a tenth of a second, and falls back at the end. */
const swell = (frame: number, length: number): number =>
  Math.min(1, frame / 4800, (length - 1 - frame) / 4800);

/** Noise between -peak and peak that swells and dies away; never the same for two seeds. */
function noise(seed: number, length = frames, peak = 0.1): number[] {
  let state = seed;
  return Array.from({ length }, (_, frame) => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return (state / 2 ** 31 - 1) * peak * swell(frame, length);
  });
}

/** All say that they begin an hour after midnight: that proves where a shorter one belongs. */
const sameStart = bextChunk({ timeReference: BigInt(3600 * rate) });

const wave = (...channels: number[][]): Buffer =>
  writeTestWave({
    ...{ sampleRateHz: rate, encoding: 'pcm', bits: 24, before: [sameStart] },
    channels: channels.map((samples) => samples.map((sample) => Math.round(sample * scale))),
  });

const same = noise(3);
const left = noise(4);
const right = noise(5).map((sample, frame) => 0.3 * sample + 0.9 * left[frame]!);
const startsAtOnce = noise(6).map((sample, frame) =>
  frame < 4800 ? 0.2 * Math.cos(frame / 30) : sample,
);
const tooLoud = noise(7, frames, 1.4);

const files: Record<string, Buffer> = {
  'Audio 7 Bass copy.wav': wave(noise(1)),
  'Organ L.wav': wave(left),
  'Organ R.wav': wave(right),
  'Piano.wav': wave(same, same),
  'Vocal.wav': wave(noise(8, frames - rate / 2)),
  'Guitar.wav': wave(noise(9).map(() => 0)),
  'Synth Pad.wav': wave(startsAtOnce),
  'Kick.wav': writeTestWave({
    ...{ sampleRateHz: rate, encoding: 'float', bits: 32, before: [sameStart] },
    channels: [tooLoud.map(Math.fround)],
  }),
  'Tambourine.wav': wave(noise(10).map((sample) => sample + 0.05)),
  'Strings.aif': writeTestAiff({
    ...{ sampleRateHz: rate, encoding: 'pcm', bits: 24 },
    channels: [noise(11).map((sample) => Math.round(sample * scale))],
  }),
};

/** Buttons of repairs that are chosen one by one, and the heading of the finding they answer. */
const oneByOne: [button: string, part: string, heading: RegExp][] = [
  ['Leave it out', 'Guitar', /Nothing in it/],
  ['Fade', 'Synth Pad', /Starts in the middle of a sound/],
  ['Turn it down', 'Kick', /Peaks at/],
  ['Centre it (high-pass)', 'Tambourine', /Off centre by/],
];

/** Gone after the repairs, whether they were taken in one go, one by one or unasked. */
const repaired = [
  ...oneByOne.map(([, , heading]) => heading),
  /Leftovers in the name/,
  /Left and right are two files/,
  /Both sides identical/,
  /shorter than the session/,
  /not WAV/,
];

async function soxStat(path: string, name: RegExp): Promise<number> {
  const said = await runForMessages('sox', [path, '-n', 'stat']);
  return Number(name.exec(said)?.[1]);
}

/** A mono file as ffmpeg decodes it. */
async function floatsOf(path: string, folder: string): Promise<Float32Array> {
  const raw = join(folder, 'decoded.raw');
  await run('ffmpeg', ['-v', 'error', '-y', '-i', path, '-f', 'f32le', raw]);
  const bytes = await readFile(raw);
  return Float32Array.from({ length: bytes.length / 4 }, (_, at) => bytes.readFloatLE(4 * at));
}

test('what the repairs promise is true of the saved zip, and nothing else changed', async ({
  page,
}) => {
  test.setTimeout(90_000);
  await withFolder(async (folder) => {
    const dropped = join(folder, 'Salt on the Windows');
    await mkdir(dropped);
    for (const [name, bytes] of Object.entries(files)) await writeFile(join(dropped, name), bytes);
    await openBench(page);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    const headings = findingsOn(page).getByRole('heading', { level: 3 });
    for (const finding of repaired) {
      await expect(headings.filter({ hasText: finding }).first()).toBeVisible();
    }
    for (const [button, part, heading] of oneByOne) {
      const item = findingsOn(page)
        .getByRole('listitem')
        .filter({ hasText: heading })
        .filter({ hasText: part })
        .first();
      await item.getByRole('button', { name: button, exact: true }).click();
      await expect(item.getByRole('button', { name: 'Undo' })).toBeVisible();
    }
    await page.getByRole('button', { name: /^Fix (these \d+|this one) for me$/ }).click();
    await checkIsOver(page);

    const zip = join(folder, 'saved.zip');
    const zipName = await downloadZip(page, zip);
    await run('unzip', ['-q', zip, '-d', folder]);
    const packed = join(folder, zipName.replace(/\.zip$/, ''));
    await run('sh', ['-c', 'cd "$1" && sha256sum -c --strict SHA256SUMS.txt', 'sh', packed]);
    const entries = await packedEntries(packed);
    const before = (name: string): string => join(dropped, name);
    const after = (name: string): string => {
      const entry = entries.find(({ from }) => from.includes(name));
      if (!entry) throw new Error(`Nothing was packed from ${name}.`);
      return join(packed, entry.to);
    };

    // Renamed, rewritten: the same samples.
    expect(after('Audio 7 Bass copy.wav')).toMatch(/\/Bass[^/]*\.wav$/);
    expect(after('Strings.aif')).toMatch(/\.wav$/);
    for (const name of ['Audio 7 Bass copy.wav', 'Strings.aif']) {
      expect(await soxDigest([after(name)])).toBe(await soxDigest([before(name)]));
    }
    // Joined: each side is what it was.
    expect(after('Organ L.wav')).toBe(after('Organ R.wav'));
    for (const [side, name] of [['1', 'Organ L.wav'] as const, ['2', 'Organ R.wav'] as const]) {
      expect(await soxDigest([after(name)], 'remix', side)).toBe(await soxDigest([before(name)]));
    }
    expect(await soxDigest([after('Piano.wav')])).toBe(
      await soxDigest([before('Piano.wav')], 'remix', '1'),
    );
    expect(await soxDigest([after('Vocal.wav')])).toBe(
      await soxDigest([before('Vocal.wav')], 'pad', '0', '0.5'),
    );
    expect(entries.some(({ from }) => from.includes('Guitar.wav'))).toBe(false);
    // Faded over less than a tenth of a second, beginning in silence; the rest is untouched.
    const afterFade = ['trim', '0.1'];
    expect(await soxDigest([after('Synth Pad.wav')], ...afterFade)).toBe(
      await soxDigest([before('Synth Pad.wav')], ...afterFade),
    );
    const firstFrame = await run('sox', [
      after('Synth Pad.wav'),
      '-t',
      'dat',
      '-',
      'trim',
      '0',
      '1s',
    ]);
    expect(Math.abs(Number(firstFrame.trim().split(/\s+/).at(-1)))).toBeLessThan(0.001);
    // Turned down as a whole: under full scale, and the same wave but for its level. By ffmpeg,
    // since sox cuts off what is above full scale while it reads.
    const turnedDown = await floatsOf(after('Kick.wav'), folder);
    const peak = Math.max(...turnedDown.map(Math.abs));
    expect(turnedDown).toHaveLength(frames);
    expect(peak).toBeLessThan(1);
    expect(peak).toBeGreaterThan(0.8);
    const gain = peak / Math.max(...tooLoud.map(Math.abs));
    expect(
      Math.max(...turnedDown.map((sample, frame) => Math.abs(sample - gain * tooLoud[frame]!))),
    ).toBeLessThan(1e-6);
    // Centred: no more than a thousandth of full scale beside the middle line.
    expect(
      Math.abs(await soxStat(after('Tambourine.wav'), /Mean\s+amplitude:\s+(\S+)/)),
    ).toBeLessThan(0.001);

    // The same zip on the bench again.
    await openBench(page);
    await dropOnPage(page, [zip]);
    await checkIsOver(page);
    for (const finding of repaired) {
      await expect(headings.filter({ hasText: finding })).toHaveCount(0);
    }
  });
});
