import { mkdir, open, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { partNames, phraseFrames, playPart } from './play-parts.ts';

/** Raised when the recipe changes: an older session is made anew. */
const recipe = 1;
const rate = 48_000;

export type BenchFile = { path: string; channels: number; frames: number; bytes: number };

export type SessionShape = {
  name: string;
  /** Number of channels of each file. */
  files: readonly number[];
  seconds: number;
};

/**
 * A folder of 24-bit WAV files at 48 kHz, made once and kept. Every file plays one part: a phrase
 * repeated at changing levels, now and then resting, as songs have verses.
 */
export async function makeSession(
  cache: string,
  shape: SessionShape,
): Promise<{ folder: string; files: BenchFile[] }> {
  const folder = join(cache, `${shape.name}-${recipe}`);
  const list = join(folder, '..', `${shape.name}-${recipe}.json`);
  const kept = await readFile(list, 'utf8').catch(() => null);
  if (kept !== null) return { folder, files: JSON.parse(kept) as BenchFile[] };
  await rm(folder, { recursive: true, force: true });
  await mkdir(folder, { recursive: true });
  const files: BenchFile[] = [];
  for (const [index, channels] of shape.files.entries()) {
    files.push(await makeFile(folder, index, channels, Math.round(shape.seconds * rate)));
  }
  await writeFile(`${list}.new`, JSON.stringify(files));
  await rename(`${list}.new`, list);
  return { folder, files };
}

async function makeFile(
  folder: string,
  index: number,
  channels: number,
  frames: number,
): Promise<BenchFile> {
  const part = partNames[index % partNames.length]!;
  const path = join(folder, `${String(index + 1).padStart(2, '0')} ${part}.wav`);
  const dataBytes = frames * channels * 3;
  const phrases = Array.from({ length: channels }, (_, c) => playPart(part, 100 * index + c + 1));
  const file = await open(path, 'w');
  try {
    await file.write(waveHeader(channels, dataBytes));
    for (let from = 0; from < frames; from += phraseFrames) {
      const length = Math.min(phraseFrames, frames - from);
      await file.write(renderPhrase(phrases, length, levelOf(from / phraseFrames, index)));
    }
  } finally {
    await file.close();
  }
  return { path, channels, frames, bytes: 44 + dataBytes };
}

/** A quieter verse, a louder chorus, a rest: never the same bits twice. */
function levelOf(phrase: number, index: number): number {
  if ((phrase + index) % 7 === 6) return 0;
  return 0.62 + 0.031 * ((5 * phrase + 3 * index) % 11);
}

function renderPhrase(phrases: Float32Array[], frames: number, level: number): Buffer {
  const bytes = Buffer.alloc(frames * phrases.length * 3);
  const scale = level * 2 ** 23;
  let at = 0;
  for (let frame = 0; frame < frames; frame++) {
    for (const phrase of phrases) {
      const sample = Math.round(phrase[frame]! * scale);
      bytes[at] = sample;
      bytes[at + 1] = sample >> 8;
      bytes[at + 2] = sample >> 16;
      at += 3;
    }
  }
  return bytes;
}

/** RIFF, `fmt ` with 16 bytes, `data`. */
function waveHeader(channels: number, dataBytes: number): Buffer {
  const header = Buffer.alloc(44);
  header.write('RIFF', 0, 'latin1');
  header.writeUInt32LE(36 + dataBytes, 4);
  header.write('WAVEfmt ', 8, 'latin1');
  header.writeUInt32LE(16, 16);
  header.writeUInt16LE(1, 20);
  header.writeUInt16LE(channels, 22);
  header.writeUInt32LE(rate, 24);
  header.writeUInt32LE(rate * channels * 3, 28);
  header.writeUInt16LE(channels * 3, 32);
  header.writeUInt16LE(24, 34);
  header.write('data', 36, 'latin1');
  header.writeUInt32LE(dataBytes, 40);
  return header;
}
