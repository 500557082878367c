import { boundedReader } from '../bytes/bounded-reader.ts';
import type { ByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import { readRiff } from './read-riff.ts';
import type { WaveReading } from './track-format.ts';
import { chunkId } from './walk-chunks.ts';

const riffContainers = { RIFF: 'wav', RF64: 'rf64', BW64: 'bw64' } as const;

/** Endings by which people recognise audio: such a file is damaged if there is none in it. */
const audioEnding = /\.(wave?|bwf|rf64|bw64|w64|aif[fc]?|flac|mp3|m4a|aac|ogg|opus|wma|ape|wv)$/i;

/**
 * Finds out what a file is from its own bytes; the name only tells a damaged recording from a
 * file that never was one. Reads headers, never the audio: pieces of at most 64 KiB, a few
 * thousand chunks at most. Answers for every content, throws for none (a source that cannot be
 * read is `unreadable` too).
 */
export async function readWave(source: ByteSource, name = ''): Promise<WaveReading> {
  try {
    return await recognise(source, audioEnding.test(name));
  } catch (error) {
    if (error instanceof AppError && error.code === 'no-access') {
      return { kind: 'unreadable', reason: 'could-not-be-read', byteOffset: 0 };
    }
    throw error;
  }
}

async function recognise(source: ByteSource, claimsAudio: boolean): Promise<WaveReading> {
  const reader = boundedReader(source);
  const start = await reader.read(0, 12);
  if (start.length === 0) return { kind: 'unreadable', reason: 'empty-file', byteOffset: 0 };
  const form = chunkId(start, 0);
  if (start.length === 12 && form in riffContainers && chunkId(start, 8) === 'WAVE') {
    return readRiff(reader, riffContainers[form as keyof typeof riffContainers]);
  }
  return claimsAudio
    ? { kind: 'unreadable', reason: 'no-audio-header', byteOffset: 0 }
    : { kind: 'not-audio' };
}
