import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { checkSession, packSession, repairSession } from '#shared/check.ts';
import { bytesSource } from '#shared/bytes/byte-source.ts';
import { openZip } from '#shared/bytes/zip-source.ts';
import type { Finding } from '#shared/findings/finding.ts';
import { plainChecksums } from '#shared/pack/checksums.ts';
import { drawTrackSheet } from '#shared/pack/track-sheet/draw-track-sheet.ts';
import { buildReport } from '#shared/report/build-report.ts';
import { droppedFindings } from '#shared/report/compare-reports.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import type { ChosenRepair, RepairPlan } from '#shared/repair/repair-plan.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { withoutCommonFolder } from '#shared/session/common-folder.ts';
import { isJunk } from '#shared/session/junk-files.ts';
import { measureHere } from '#shared/session/measure-file.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import type { DroppedFile } from '#shared/bytes/byte-source.ts';
import { loadMeters } from '../../server/cli/load-meters.ts';
import { loadSheetFont } from '../../server/cli/load-sheet-font.ts';
import { writeTestWave } from './audio-writer.ts';
import { run } from './outside-programs.ts';
import { droppedBytes } from './rendering.ts';

export type StoryOptions = {
  rules?: HouseRules;
  information?: Partial<SessionInformation>;
  /** Draw the track sheet, which takes a second; a placeholder stands for it otherwise. */
  sheet?: boolean;
  /** Which repairs to take; none without it. */
  choose?: (findings: readonly Finding[]) => ChosenRepair[];
};

export type Story = {
  report: CheckReport;
  plan: RepairPlan;
  /** Everything that was found in the files as they were dropped. */
  found: Finding[];
  zip: Buffer;
};

/** The whole way from files to a zip, in this thread, with the meters that run in the product. */
export async function tellStory(
  files: Record<string, Uint8Array> | readonly DroppedFile[],
  { rules = defaultRules, information = {}, sheet = false, choose = () => [] }: StoryOptions = {},
): Promise<Story> {
  const engine = await loadMeters();
  const dropped = Array.isArray(files)
    ? (files as readonly DroppedFile[])
    : Object.entries(files as Record<string, Uint8Array>).map(([path, bytes]) =>
        droppedBytes(path, bytes),
      );
  const input = {
    files: dropped,
    rules,
    information: { ...emptySessionInformation(), ...information },
    measureFile: measureHere(engine),
  };
  const check = await checkSession(input);
  const { files: judged, session } = check.judgement;
  const found = [...judged.flatMap((file) => file.findings), ...session.findings];
  const repaired = await repairSession(input, check, choose(found));
  const report = await buildReport({ ...input, check, repaired, engine: engine.name });
  const pack = await packSession({
    files: dropped,
    check,
    repaired,
    report,
    trackSheet: sheet ? await drawTrackSheet(report, loadSheetFont) : Buffer.from('no sheet'),
    checksums: plainChecksums,
  });
  const blocks: Buffer[] = [];
  for await (const block of pack.stream()) blocks.push(Buffer.from(block));
  const zip = Buffer.concat(blocks);
  if (zip.length !== pack.bytes) throw new Error('the package has another length than promised');
  return { report, plan: repaired.plan, found, zip };
}

/** The files of a saved zip, as if its folder had been dropped. */
export async function droppedZip(zip: Uint8Array): Promise<DroppedFile[]> {
  const { files, problems } = await openZip(bytesSource(zip));
  if (problems.length > 0) throw new Error(JSON.stringify(problems));
  return withoutCommonFolder(files, isJunk);
}

/** What is found in a saved zip. */
export async function findAgain(zip: Uint8Array, options: StoryOptions = {}): Promise<Finding[]> {
  const { report } = await tellStory(await droppedZip(zip), { ...options, choose: () => [] });
  return droppedFindings(report);
}

/** Unpacks with unzip and answers the folder the package makes. */
export async function unpacked(folder: string, { zip, report }: Story): Promise<string> {
  const path = join(folder, 'package.zip');
  await writeFile(path, zip);
  await run('unzip', ['-q', path, '-d', folder]);
  return join(folder, report.package.folderName);
}

export const storyRateHz = 48_000;
export const storyFrames = 72_000;

/** Repeatable noise in [-1, 1): a linear congruential generator (Numerical Recipes, ranqd1). */
export function noise(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 31 - 1;
  };
}

export type ToneOptions = {
  seed: number;
  frames?: number;
  /** Frames of digital silence before and after the sound. */
  silentStart?: number;
  silentEnd?: number;
  peak?: number;
};

/**
 * A part nothing can be found in: noise that swells and dies away four times a second, from
 * silence to silence. Full scale = 1.
 */
export function cleanPart({
  seed,
  frames = storyFrames,
  silentStart = 2400,
  silentEnd = 9600,
  peak = 0.3,
}: ToneOptions): number[] {
  const next = noise(seed);
  const end = frames - silentEnd;
  const period = storyRateHz / 4;
  return Array.from({ length: frames }, (_, i) => {
    const x = next();
    if (i < silentStart || i >= end) return 0;
    const edge = Math.min(1, (i - silentStart) / 480, (end - i) / 4800);
    const swell = 0.55 - 0.45 * Math.cos((2 * Math.PI * (i - silentStart)) / period + seed);
    return peak * edge * swell * x;
  });
}

/** A 24-bit WAV file (or float) of channels given at full scale = 1. */
export function waveOf(
  channels: readonly (readonly number[])[],
  options: Partial<Parameters<typeof writeTestWave>[0]> = {},
): Buffer {
  const { encoding = 'pcm', bits = encoding === 'float' ? 32 : 24 } = options;
  const top = 2 ** (bits - 1);
  return writeTestWave({
    sampleRateHz: storyRateHz,
    encoding,
    bits,
    ...options,
    channels: channels.map((samples) =>
      encoding === 'float'
        ? samples
        : samples.map((x) => Math.max(-top, Math.min(top - 1, Math.round(x * top)))),
    ),
  });
}

/** A session nothing can be found in but what the options of the rules ask for. */
export function cleanSession(): Record<string, Buffer> {
  return {
    'Bass.wav': waveOf([cleanPart({ seed: 11 })]),
    'Kick.wav': waveOf([cleanPart({ seed: 22 })]),
    'Organ.wav': waveOf([cleanPart({ seed: 33 })]),
    'Snare.wav': waveOf([cleanPart({ seed: 44 })]),
  };
}
