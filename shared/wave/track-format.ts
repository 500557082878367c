import { z } from 'zod';
import { maxChannels } from './format-limits.ts';

/**
 * What a measured file is, in the words of its own header. Plain data: it travels in reports.
 */
export const trackFormatSchema = z.strictObject({
  /** The container as found: RIFF/WAVE, RF64 (EBU Tech 3306), BW64 (ITU-R BS.2088), AIFF, AIFC. */
  container: z.enum(['wav', 'rf64', 'bw64', 'aiff', 'aifc']),
  /** Integer PCM (8-bit WAVE is unsigned, everything else signed) or IEEE 754 float. */
  encoding: z.enum(['pcm', 'float']),
  sampleRateHz: z.number().int().positive(),
  /** Valid bits of a sample: 20 for 20-in-24. */
  bits: z.number().int().min(1).max(64),
  /** Bits a sample takes up in the file, a multiple of 8. */
  containerBits: z.number().int().min(8).max(64),
  channels: z.number().int().min(1).max(maxChannels),
  /** Frames that are really there (a frame is one sample of every channel). */
  frames: z.number().int().nonnegative(),
  /** bext TimeReference (EBU Tech 3285): frames since midnight at the file's rate; null if absent. */
  timeReferenceFrames: z.number().int().nonnegative().nullable(),
});
export type TrackFormat = z.infer<typeof trackFormatSchema>;

/** One chunk of a RIFF or IFF file; offsets in bytes from the start of the file. */
export type ChunkPlace = {
  id: string;
  /** Where the chunk's contents begin, after its 8-byte header. */
  contentOffset: number;
  /** Length of the contents as it really is in the file, without the pad byte. */
  contentBytes: number;
};

/** Where things are in the file: needed to read samples and to rewrite chunks, never stored. */
export type WaveLayout = {
  chunks: ChunkPlace[];
  dataOffset: number;
  /** Whole frames only: `frames * bytesPerFrame`. */
  dataBytes: number;
  /** What the header promised; null where it promises nothing (streamed headers). */
  promisedDataBytes: number | null;
  bytesPerFrame: number;
  bigEndian: boolean;
  /** 8-bit WAVE samples are unsigned with silence at 0x80. */
  unsigned: boolean;
  /** WAVE_FORMAT_EXTENSIBLE speaker mask; null where the header has none. */
  channelMask: number | null;
};

/** A marker from `cue ` and its label, in frames from the start of the file. */
export type Marker = { startFrame: number; label: string };

/**
 * Reading a header always answers, it never throws for what the file holds.
 * Byte offsets count from the start of the file.
 */
export type WaveReading =
  | {
      kind: 'track';
      format: TrackFormat;
      layout: WaveLayout;
      markers: Marker[];
      trackName: string | null;
    }
  /** Damaged beyond use, or an encoding that is not measured; reason is one of a closed list. */
  | { kind: 'unreadable'; reason: UnreadableReason; byteOffset: number }
  /** Audio in another format, recognised by content. */
  | { kind: 'other-audio'; formatName: string; lossy: boolean }
  | { kind: 'not-audio' };

export const unreadableReasons = [
  'empty-file',
  /** Called audio by its name, but it begins like nothing we know (often a failed copy: zeros). */
  'no-audio-header',
  'header-cut-short',
  'no-format-chunk',
  'no-data-chunk',
  'no-audio-in-data',
  'impossible-format',
  'unsupported-encoding',
  'could-not-be-read',
] as const;
export type UnreadableReason = (typeof unreadableReasons)[number];
