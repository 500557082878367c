import { createHash } from 'node:crypto';
import { existsSync, statSync } from 'node:fs';
import { mkdir, rename } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { join } from 'node:path';
import type { DroppedFile } from '#shared/bytes/byte-source.ts';
import { checkSession, type SessionCheck } from '#shared/check.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { measureHere, type MeasureFile } from '#shared/session/measure-file.ts';
import type { MeasuredFile } from '#shared/session/measured-file.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import { loadMeters } from '../../server/cli/load-meters.ts';
import { openNodeFile } from '../../server/cli/node-files.ts';
import { run } from './outside-programs.ts';

/*
 * Audio files made by sox and ffmpeg from recordings that Debian ships (package sonic-pi-samples,
 * public domain by its copyright file). Each is made once, under a name that stands for the
 * command that made it, and kept in .cache.
 */

const folder = fileURLToPath(new URL('../../.cache/real-sounds/', import.meta.url));
const recordings = '/usr/share/sonic-pi/samples';

/** Stands for the file that is made, in the arguments of the command that makes it. */
export const made = '{made}';

export function recording(name: string): string {
  return join(recordings, `${name}.flac`);
}

/** Runs one command unless its file is there already; answers where the file is. */
export async function make(
  program: 'sox' | 'ffmpeg',
  args: readonly string[],
  extension = 'wav',
): Promise<string> {
  const recipe = createHash('sha256').update(JSON.stringify([program, args]));
  const path = join(folder, `${recipe.digest('hex').slice(0, 24)}.${extension}`);
  if (existsSync(path)) return path;
  await mkdir(folder, { recursive: true });
  const unfinished = path.replace(/\.(\w+)$/, `.${process.pid}.$1`);
  await run(
    program,
    args.map((argument) => (argument === made ? unfinished : argument)),
  );
  await rename(unfinished, path);
  return path;
}

/** sox without dither: from `inputs` to 24-bit WAV at 48 kHz, through `effects`. */
export function sox(inputs: readonly string[], effects: readonly string[]): Promise<string> {
  return make('sox', ['-V1', '-D', ...inputs, '-b', '24', '-r', '48000', made, ...effects]);
}

/** ffmpeg with one input and the rest of its arguments, the encoder among them. */
export function ffmpeg(input: string, args: readonly string[], extension = 'wav'): Promise<string> {
  return make('ffmpeg', ['-v', 'error', '-y', '-i', input, ...args, made], extension);
}

/** Files as if they had been dropped: their names, and where their bytes are. */
export function droppedSounds(sounds: Readonly<Record<string, string>>): DroppedFile[] {
  return Object.entries(sounds).map(([path, place]) => ({
    path,
    size: statSync(place).size,
    open: () => openNodeFile(place),
  }));
}

export type CheckOptions = { rules: HouseRules; information?: Partial<SessionInformation> };

const measuredBefore = new Map<string, MeasuredFile>();

/** Checks sounds the way the product does, each file measured once whatever sets it is in. */
export async function checkSounds(
  sounds: Readonly<Record<string, string>>,
  { rules, information }: CheckOptions,
): Promise<SessionCheck> {
  const measure = measureHere(await loadMeters());
  const measureFile: MeasureFile = async (file, options) => {
    const place = sounds[file.path] ?? '';
    const known = measuredBefore.get(place) ?? (await measure(file, options));
    measuredBefore.set(place, known);
    return { ...known, path: file.path };
  };
  return checkSession({
    files: droppedSounds(sounds),
    rules,
    information: { ...emptySessionInformation(), ...information },
    measureFile,
  });
}

/** All findings: those of files in their order, then the session's. */
export function findingsOf({ judgement }: SessionCheck): Finding[] {
  return [...judgement.files.flatMap((file) => file.findings), ...judgement.session.findings];
}

/** `must-fix clipped Lead Vocal.wav`, for comparing and for reading in a failed test. */
export function inShort({ level, code, files }: Finding): string {
  return `${level} ${code} ${files.map((path) => path.replace(/\.\w+$/, '')).join(' + ')}`.trim();
}
