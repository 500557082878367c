import { boundedReader } from '../bytes/bounded-reader.ts';
import type { ByteSource } from '../bytes/byte-source.ts';
import { AppError } from '../errors.ts';
import { readAiff } from './read-aiff.ts';
import { readRiff } from './read-riff.ts';
import { recogniseAudio } from './recognise-audio.ts';
import type { UnreadableReason, WaveReading } from './track-format.ts';
import { chunkId } from './walk-chunks.ts';

const riffContainers = { RIFF: 'wav', RF64: 'rf64', BW64: 'bw64' } as const;

const forms = [...Object.keys(riffContainers), 'FORM'];

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
    // Without a name nothing speaks against audio.
    return await recognise(source, name === '' || audioEnding.test(name));
  } catch (error) {
    if (error instanceof AppError && ['no-access', 'zip-refused'].includes(error.code)) {
      return { kind: 'unreadable', reason: 'could-not-be-read', byteOffset: 0 };
    }
    throw error;
  }
}

async function recognise(source: ByteSource, claimsAudio: boolean): Promise<WaveReading> {
  const reader = boundedReader(source);
  const start = await reader.read(0, 12);
  if (start.length === 0) {
    return claimsAudio ? unreadable('empty-file', 0) : { kind: 'not-audio' };
  }
  const form = chunkId(start, 0);
  const kind = chunkId(start, 8);
  if (start.length === 12 && kind === 'WAVE' && isRiffForm(form)) {
    return readRiff(reader, riffContainers[form]);
  }
  if (start.length === 12 && form === 'FORM' && (kind === 'AIFF' || kind === 'AIFC')) {
    return readAiff(reader, kind === 'AIFF' ? 'aiff' : 'aifc');
  }
  // A recording that stopped within its first twelve bytes.
  const begun = form.slice(0, Math.min(start.length, 4));
  if (claimsAudio && start.length < 12 && forms.some((known) => known.startsWith(begun))) {
    return unreadable('header-cut-short', source.size);
  }
  const other = await recogniseAudio(source, claimsAudio);
  if (other) return { kind: 'other-audio', formatName: other.formatName, lossy: other.lossy };
  return claimsAudio ? unreadable('no-audio-header', 0) : { kind: 'not-audio' };
}

function isRiffForm(form: string): form is keyof typeof riffContainers {
  return Object.hasOwn(riffContainers, form);
}

function unreadable(reason: UnreadableReason, byteOffset: number): WaveReading {
  return { kind: 'unreadable', reason, byteOffset };
}
