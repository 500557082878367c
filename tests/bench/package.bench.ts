import { mkdir, open, rm, truncate } from 'node:fs/promises';
import os from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { inCheckout } from '../../server/dev/checkout.mjs';
import { writeTestWave } from '../support/audio-writer.ts';
import { makeSession } from './make-session.ts';
import { median, openProcessTimer, type Cost, type ProcessTimer } from './time-process.ts';

/**
 * What packing costs: CPU against `zip -0` on a session of about 1 GB, alternating, and the most
 * memory the command holds while sessions grow to 20 GB (sparse files, so that no disk is needed;
 * both with every file copied and with every file repaired).
 *
 *     npm run bench -- package [--rounds 3] [--gigabytes 20]
 *
 * Aims: packing with SHA-256 sums / `zip -0` at most 1.8, better 1.4; peak memory at most 350 MB,
 * better 200, the same for any size.
 */
const { values: options } = parseArgs({
  options: {
    rounds: { type: 'string', default: '3' },
    gigabytes: { type: 'string', default: '20' },
  },
});

const cache = inCheckout('.cache', 'bench');
const check = [process.execPath, inCheckout('dist', 'cli', 'check.js')];
/** Something may have to be fixed. */
const exits = [0, 1];

async function comparePacking(timer: ProcessTimer): Promise<void> {
  const { folder, files } = await makeSession(cache, {
    name: 'session',
    files: Array.from({ length: 40 }, (_, index) => (index % 3 === 1 ? 2 : 1)),
    seconds: 131,
  });
  const bytes = files.reduce((sum, file) => sum + file.bytes, 0);
  const ours = join(cache, 'ours.zip');
  const theirs = join(cache, 'theirs.zip');
  const ratios: number[] = [];
  for (let round = 0; round < Number(options.rounds); round++) {
    const checked = await timer.time([[...check, folder]], exits);
    const packed = await timer.time([[...check, folder, '--out', ours]], exits);
    const zipped = await timer.time(
      [['zip', '-q', '-0', '-j', theirs, ...files.map(({ path }) => path)]],
      [0],
    );
    await rm(theirs);
    ratios.push((packed.cpuSeconds - checked.cpuSeconds) / zipped.cpuSeconds);
    console.log(
      `  check ${show(checked)}\n  check and pack ${show(packed)}\n  zip -0 ${show(zipped)}`,
    );
  }
  await rm(ours, { force: true });
  console.log(
    `Packing ${(bytes / 1e9).toFixed(2)} GB with sums / zip -0, CPU: ${median(ratios).toFixed(2)}\n`,
  );
}

const fileBytes = 2_000_000_000;

/** Stereo files of 2 GB with a little sound at their start, else holes. */
async function makeSparseSession(gigabytes: number): Promise<string> {
  const folder = join(cache, `sparse-${gigabytes}`);
  await rm(folder, { recursive: true, force: true });
  await mkdir(folder, { recursive: true });
  const dataBytes = fileBytes - (fileBytes % 6);
  for (let index = 0; index < gigabytes / 2; index++) {
    const sound = Array.from({ length: 48_000 }, (_, i) => Math.round(1e6 * Math.sin(i * index)));
    const head = writeTestWave({
      sampleRateHz: 48_000,
      encoding: 'pcm',
      bits: 24,
      channels: [sound, sound],
      lies: { dataBytes, riffBytes: dataBytes + 36 },
    });
    const path = join(folder, `Guitar ${index + 1}.wav`);
    const file = await open(path, 'w');
    await file.write(head);
    await file.close();
    await truncate(path, 44 + dataBytes);
  }
  return folder;
}

async function watchMemory(timer: ProcessTimer): Promise<void> {
  const largest = Number(options.gigabytes);
  for (const gigabytes of [2, largest]) {
    const folder = await makeSparseSession(gigabytes);
    const copied = await timer.time([[...check, folder, '--out', '/dev/null']], exits);
    console.log(`  ${gigabytes} GB checked and packed: ${show(copied)}`);
    const safe = ['--repair', 'safe', '--out', '/dev/null'];
    const repaired = await timer.time([[...check, folder, ...safe]], exits);
    console.log(`  ${gigabytes} GB checked, every file repaired, packed: ${show(repaired)}`);
    await rm(folder, { recursive: true });
  }
}

function show({ cpuSeconds, wallSeconds, peakBytes }: Cost): string {
  return `${cpuSeconds.toFixed(2)} s CPU, ${wallSeconds.toFixed(1)} s wall, ${(peakBytes / 1e6).toFixed(0)} MB`;
}

console.log(`Load of the machine ${os.loadavg()[0]!.toFixed(1)} on ${os.cpus().length} cores`);
const timer = openProcessTimer();
try {
  await comparePacking(timer);
  await watchMemory(timer);
} finally {
  timer.close();
}
