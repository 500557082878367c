import { spawnSync } from 'node:child_process';
import { mkdir, readFile, rm } from 'node:fs/promises';
import os from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { createOracle } from '#shared/measure/oracle/create-oracle.ts';
import type { MeterEngine } from '#shared/measure/meter.ts';
import { readWave } from '#shared/wave/read-wave.ts';
import { inCheckout } from '../../server/dev/checkout.mjs';
import { loadMeters } from '../../server/cli/load-meters.ts';
import { makeSession, type BenchFile } from './make-session.ts';
import { median, openProcessTimer, type Cost, type ProcessTimer } from './time-process.ts';

/**
 * What the check costs, against programs that do part of it: on a session of about 1 GB
 * (40 files, 24-bit/48 kHz, mono and stereo), alternating, in one run.
 *
 *     npm run bench -- check [--rounds 3] [--quick]
 *
 * --quick leaves out ffmpeg and how cost grows. Aims: check / sox at most 0.9, better 0.5; check /
 * (astats + ebur128) at most 0.16, better 0.08; WebAssembly / plain TypeScript at most 1/5, better
 * 1/10; peak memory at most 350 MB, better 200, whatever the session.
 */

const { values: options } = parseArgs({
  options: {
    rounds: { type: 'string', default: '3' },
    quick: { type: 'boolean', default: false },
  },
});
const rounds = Number(options.rounds);

const cache = inCheckout('.cache', 'bench');
const checkProgram = inCheckout('dist', 'cli', 'check.js');

/** A program over some files. Slow ones see every fourth file, counted four times. */
type Contender = {
  name: string;
  every: 1 | 4;
  commands(files: readonly string[], folder: string): string[][];
  expected?: readonly number[];
};

const ffmpeg = (filter: string) => (files: readonly string[]) =>
  files.map((file) => ['ffmpeg', '-nostats', '-i', file, '-af', filter, '-f', 'null', '-']);

const zipPath = join(cache, 'timed.zip');

const contenders: Contender[] = [
  {
    name: 'check',
    every: 1,
    commands: (_, folder) => [[process.execPath, checkProgram, folder, '--json']],
    // 1: something must be fixed.
    expected: [0, 1],
  },
  {
    name: 'sox stats',
    every: 1,
    commands: (files) => files.map((file) => ['sox', file, '-n', 'stats']),
  },
  ...(options.quick
    ? []
    : ([
        { name: 'ffmpeg astats', every: 4, commands: ffmpeg('astats') },
        { name: 'ffmpeg ebur128', every: 4, commands: ffmpeg('ebur128=peak=true') },
      ] satisfies Contender[])),
  { name: 'sha256sum', every: 1, commands: (files) => [['sha256sum', ...files]] },
  { name: 'zip -0', every: 1, commands: (files) => [['zip', '-q', '-0', '-j', zipPath, ...files]] },
  { name: 'cat', every: 1, commands: (files) => [['cat', ...files]] },
];

async function timeOnce(timer: ProcessTimer, contender: Contender, session: Session) {
  await rm(zipPath, { force: true });
  const paths = session.files.map(({ path }) => path);
  const chosen = paths.filter((_, index) => index % contender.every === 0);
  const cost = await timer.time(
    contender.commands(chosen, session.folder),
    contender.expected ?? [0],
  );
  await rm(zipPath, { force: true });
  const bytes = (files: readonly BenchFile[]) => files.reduce((sum, file) => sum + file.bytes, 0);
  const seen = session.files.filter((_, index) => index % contender.every === 0);
  const share = bytes(session.files) / bytes(seen);
  return {
    ...cost,
    cpuSeconds: cost.cpuSeconds * share,
    wallSeconds: cost.wallSeconds * share,
  };
}

type Session = { folder: string; files: BenchFile[] };

function samplesOf({ files }: Session): number {
  return files.reduce((sum, file) => sum + file.frames * file.channels, 0);
}

function printTable(rows: readonly (readonly string[])[]): void {
  const widths = rows[0]!.map((_, column) => Math.max(...rows.map((row) => row[column]!.length)));
  for (const row of rows) {
    console.log(
      row.map((cell, i) => (i ? cell.padStart(widths[i]!) : cell.padEnd(widths[i]!))).join('   '),
    );
  }
}

async function compare(timer: ProcessTimer, session: Session): Promise<void> {
  const bytes = session.files.reduce((sum, file) => sum + file.bytes, 0);
  console.log(
    `\n${session.files.length} files, ${(bytes / 1e9).toFixed(2)} GB, ` +
      `${(samplesOf(session) / 1e6).toFixed(0)} million samples, ${rounds} rounds, medians; ` +
      `load of the machine ${os.loadavg()[0]!.toFixed(1)} on ${os.cpus().length} cores\n`,
  );
  const costs = new Map<string, Cost[]>(contenders.map(({ name }) => [name, []]));
  // The files are in the page cache for all of them.
  await timeOnce(timer, contenders.at(-1)!, session);
  for (let round = 0; round < rounds; round++) {
    for (const contender of contenders) {
      costs.get(contender.name)!.push(await timeOnce(timer, contender, session));
    }
  }
  const cpu = (name: string) => costs.get(name)!.map(({ cpuSeconds }) => cpuSeconds);
  printTable([
    ['', 'CPU s', 'wall s', 'MB/s', 'ns/sample', 'peak MB'],
    ...contenders.map(({ name, every }) => {
      const all = costs.get(name)!;
      const wall = median(all.map(({ wallSeconds }) => wallSeconds));
      return [
        every === 1 ? name : `${name} (every fourth file)`,
        median(cpu(name)).toFixed(2),
        wall.toFixed(2),
        (bytes / 1e6 / wall).toFixed(0),
        ((median(cpu(name)) / samplesOf(session)) * 1e9).toFixed(2),
        (median(all.map(({ peakBytes }) => peakBytes)) / 1e6).toFixed(0),
      ];
    }),
  ]);
  const ratio = (others: readonly string[]) =>
    median(
      cpu('check').map((own, round) => own / others.reduce((sum, o) => sum + cpu(o)[round]!, 0)),
    ).toFixed(2);
  console.log('\nRatios of CPU time, median of the rounds');
  printTable([
    ...(options.quick
      ? []
      : [['check / (astats + ebur128)', ratio(['ffmpeg astats', 'ffmpeg ebur128'])]]),
    ...contenders.slice(1).map(({ name }) => [`check / ${name}`, ratio([name])]),
  ]);
}

/** A program that fails at once would win every comparison. */
function proveThatItChecks({ folder, files }: Session): void {
  const { stdout } = spawnSync(process.execPath, [checkProgram, folder, '--json'], {
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  const report = JSON.parse(stdout) as { files: unknown[] };
  if (report.files.length !== files.length) throw new Error('The check did not see all files.');
}

const excerptSeconds = 60;

/** The meters alone, on bytes that are in memory already. */
async function compareEngines(session: Session): Promise<void> {
  const file = session.files.find(({ channels }) => channels === 2)!;
  const whole = await readFile(file.path);
  const excerpt = new Uint8Array(whole.subarray(0, 44 + 6 * excerptSeconds * 48_000));
  const engines = [await loadMeters(), await createOracle()];
  const seconds: number[][] = [[], []];
  // Compiled first by the quick compiler, then by the good one: not what is asked here.
  for (const engine of engines) await timeEngine(engine, excerpt);
  for (let round = 0; round < rounds; round++) {
    for (const [index, engine] of engines.entries()) {
      seconds[index]!.push(await timeEngine(engine, excerpt));
    }
  }
  const [fast, plain] = seconds.map(median) as [number, number];
  const perSample = (value: number) => ((value / (2 * excerptSeconds * 48_000)) * 1e9).toFixed(2);
  console.log(`\nMeters alone, ${excerptSeconds} s of stereo, without reading`);
  printTable([
    ['', 'ns/sample'],
    ['WebAssembly', perSample(fast)],
    ['plain TypeScript', perSample(plain)],
    ['ratio', `1 / ${(plain / fast).toFixed(1)}`],
  ]);
}

async function timeEngine(engine: MeterEngine, bytes: Uint8Array): Promise<number> {
  const reading = await readWave(bytesSource(bytes), 'excerpt.wav');
  if (reading.kind !== 'track') throw new Error('The excerpt is no track.');
  const before = process.cpuUsage();
  const meter = engine.open(reading.format, reading.layout);
  for (let at = 0; at < bytes.length; at += 1 << 20)
    meter.write(bytes.subarray(at, at + (1 << 20)));
  meter.finish();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

/** The check's own cost by length, number and channels of the files. */
async function showGrowth(timer: ProcessTimer): Promise<void> {
  const mono = (count: number) => Array.from({ length: count }, () => 1);
  const shapes = [
    { name: 'length-15', files: mono(4), seconds: 15 },
    { name: 'length-60', files: mono(4), seconds: 60 },
    { name: 'length-240', files: mono(4), seconds: 240 },
    { name: 'length-960', files: mono(4), seconds: 960 },
    { name: 'count-10', files: mono(10), seconds: 20 },
    { name: 'count-40', files: mono(40), seconds: 20 },
    { name: 'count-160', files: mono(160), seconds: 20 },
    { name: 'channels-1', files: [1, 1, 1, 1], seconds: 60 },
    { name: 'channels-2', files: [2, 2, 2, 2], seconds: 60 },
    { name: 'channels-6', files: [6, 6, 6, 6], seconds: 60 },
  ];
  const rows = [['', 'files', 'channels', 's each', 'CPU s', 'ns/sample', 'peak MB']];
  const tiny = await makeSession(cache, { name: 'start-up', files: [1], seconds: 0.1 });
  const startUps: number[] = [];
  for (let round = 0; round < rounds; round++) {
    startUps.push((await timeOnce(timer, contenders[0]!, tiny)).cpuSeconds);
  }
  const startUp = median(startUps);
  for (const shape of shapes) {
    const session = await makeSession(cache, shape);
    const costs: Cost[] = [];
    for (let round = 0; round < rounds; round++) {
      costs.push(await timeOnce(timer, contenders[0]!, session));
    }
    const cpuSeconds = median(costs.map((cost) => cost.cpuSeconds));
    rows.push([
      shape.name,
      String(shape.files.length),
      String(shape.files[0]),
      String(shape.seconds),
      cpuSeconds.toFixed(2),
      (((cpuSeconds - startUp) / samplesOf(session)) * 1e9).toFixed(2),
      (median(costs.map(({ peakBytes }) => peakBytes)) / 1e6).toFixed(0),
    ]);
  }
  console.log(
    `\nHow cost grows (the ${startUp.toFixed(2)} s of a tiny file taken off the ns/sample)`,
  );
  printTable(rows);
}

await mkdir(cache, { recursive: true });
const built = spawnSync(
  process.execPath,
  [inCheckout('server', 'dev', 'build.mjs'), '--quiet', 'wasm', 'cli'],
  { stdio: 'inherit' },
);
if (built.status !== 0) throw new Error('The command line could not be built.');
console.log('Making the session, unless it is there already.');
const session = await makeSession(cache, {
  name: 'session',
  files: Array.from({ length: 40 }, (_, index) => (index % 3 === 1 ? 2 : 1)),
  seconds: 131,
});
proveThatItChecks(session);
const timer = openProcessTimer();
try {
  await compare(timer, session);
  await compareEngines(session);
  if (!options.quick) await showGrowth(timer);
} finally {
  timer.close();
}
