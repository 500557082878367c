import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import type { ComparedTrack } from '#shared/compare/match-candidates.ts';
import type { ReadFrames } from '#shared/compare/verify-match.ts';
import { measuredFile } from './measure-builders.ts';

/** Sounds in memory, as the comparison sees them, with reads that are counted. */
export type ComparedSounds = {
  tracks: ComparedTrack[];
  read: ReadFrames;
  framesRead: () => number;
};

export const recordings = '/usr/share/sonic-pi/samples';

/** Decodes a recording with ffmpeg: one array, mono, 48 kHz. */
export async function decodeMono(path: string): Promise<Float32Array> {
  const { stdout: bytes } = await promisify(execFile)(
    'ffmpeg',
    ['-v', 'error', '-i', path, '-ac', '1', '-ar', '48000', '-f', 'f32le', '-'],
    { maxBuffer: 1 << 28, encoding: 'buffer' },
  );
  return new Float32Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length));
}

/** Sound with silence around it: `before` frames in front, `frames` in all. */
export function placed(sound: Float32Array, before: number, frames: number): Float32Array {
  const whole = new Float32Array(frames);
  whole.set(sound.subarray(0, Math.max(0, frames - before)), before);
  return whole;
}

/** Rounded to a number of bits, as saving it would. */
export function atBits(sound: Float32Array, bits: number): Float32Array {
  const step = 2 ** (1 - bits);
  return sound.map((sample) => Math.round(sample / step) * step);
}

export function comparedSounds(sounds: Readonly<Record<string, Float32Array[]>>): ComparedSounds {
  let framesRead = 0;
  return {
    tracks: Object.entries(sounds).map(([path, channels]) => comparedTrack(path, channels)),
    read: (path, startFrame, frames) => {
      framesRead += frames;
      const channels = sounds[path] ?? [];
      return Promise.resolve(
        channels.map((channel) => channel.subarray(startFrame, startFrame + frames)),
      );
    },
    framesRead: () => framesRead,
  };
}

function comparedTrack(path: string, channels: Float32Array[]): ComparedTrack {
  const frames = channels[0]?.length ?? 0;
  const file = measuredFile({
    path,
    format: { channels: channels.length, frames },
    channels: channels.map(levelsOf),
  });
  const { format, measures } = file;
  if (!format || !measures) throw new Error('a built track has both');
  const framesPerColumn = Math.max(1, Math.ceil(frames / 2048));
  return {
    path,
    format,
    measures: { ...measures, channelHashes: channels.map(simpleHash) },
    overview: {
      framesPerColumn,
      channels: channels.map((channel) => drawn(channel, framesPerColumn)),
    },
  };
}

function levelsOf(channel: Float32Array) {
  let peak = 0;
  let energy = 0;
  let first: number | null = null;
  let last: number | null = null;
  channel.forEach((sample, frame) => {
    const size = Math.abs(sample);
    peak = Math.max(peak, size);
    energy += sample * sample;
    if (size <= 0.001) return;
    first ??= frame;
    last = frame;
  });
  return {
    peakDbfs: peak > 0 ? 20 * Math.log10(peak) : null,
    rmsDbfs: energy > 0 ? 10 * Math.log10(energy / channel.length) : null,
    firstSoundFrame: first,
    lastSoundFrame: last,
  };
}

function simpleHash(channel: Float32Array): string {
  let hash = 7;
  for (const sample of channel) hash = (Math.imul(hash, 31) + Math.round(sample * 2 ** 23)) | 0;
  return (hash >>> 0).toString(16).padStart(32, '0');
}

function drawn(channel: Float32Array, framesPerColumn: number): Int8Array {
  const columns = new Int8Array(2 * Math.ceil(channel.length / framesPerColumn));
  for (let column = 0; column < columns.length / 2; column += 1) {
    let low = Infinity;
    let high = -Infinity;
    const end = Math.min(channel.length, (column + 1) * framesPerColumn);
    for (let frame = column * framesPerColumn; frame < end; frame += 1) {
      low = Math.min(low, channel[frame] ?? 0);
      high = Math.max(high, channel[frame] ?? 0);
    }
    columns[2 * column] = Math.round(low * 127);
    columns[2 * column + 1] = Math.round(high * 127);
  }
  return columns;
}
