import { emptyComparison, type Comparison } from '#shared/compare/comparison.ts';
import type { JudgedFile, JudgedReading, JudgedSession } from '#shared/judge/judged-session.ts';
import type { ChannelMeasures, Measures, PairMeasures } from '#shared/measure/measures.ts';
import type { TrackFormat } from '#shared/wave/track-format.ts';

/**
 * Builds measured files by hand, for tests of the judge alone. The default is a good track:
 * 24-bit mono at 48 kHz, three minutes, silent at both ends, peak -9 dBFS, no two with the same
 * audio.
 */
export type BuiltFile = {
  path?: string;
  reading?: JudgedReading;
  format?: Partial<TrackFormat>;
  /** For all channels alike. */
  channel?: Partial<ChannelMeasures>;
  /** For one channel each, over `channel`. */
  channels?: Partial<ChannelMeasures>[];
  pair?: Partial<PairMeasures>;
  measures?: Partial<Measures>;
};

const threeMinutes = 8_640_000;
let built = 0;

export function channelMeasures(changes: Partial<ChannelMeasures> = {}): ChannelMeasures {
  return {
    peakDbfs: -9,
    rmsDbfs: -24,
    dcOffset: 0,
    soundingDcOffset: 0,
    clippedRuns: 0,
    clipping: {
      samples: 0,
      longestRunFrames: 0,
      ceilingDbfs: null,
      fullScaleRuns: 0,
      flatCycleShare: 0,
      ranges: [],
    },
    overFullScale: { count: 0, ranges: [] },
    notANumber: { count: 0, ranges: [] },
    firstSoundFrame: 96_000,
    lastSoundFrame: 8_400_000,
    longestDigitalSilence: { startFrame: 0, endFrame: 95_000 },
    dropouts: { count: 0, ranges: [] },
    realBits: 24,
    startEdge: { peakDbfs: null, ramps: false },
    endEdge: { peakDbfs: null, ramps: false },
    tailPeakDbfs: null,
    floorDbfs: null,
    ...changes,
  };
}

export function measuredFile(file: BuiltFile = {}): JudgedFile {
  built += 1;
  const format: TrackFormat = {
    container: 'wav',
    encoding: 'pcm',
    sampleRateHz: 48_000,
    bits: 24,
    containerBits: 24,
    channels: 1,
    frames: threeMinutes,
    timeReferenceFrames: null,
    ...file.format,
  };
  const channels = Array.from({ length: format.channels }, (_, index) =>
    channelMeasures({ realBits: format.bits, ...file.channel, ...file.channels?.[index] }),
  );
  const hash = (number: number): string => number.toString(16).padStart(32, '0');
  const measures: Measures = {
    frames: format.frames,
    channels,
    pairs: Array.from({ length: Math.floor(format.channels / 2) }, (_, index) => ({
      channels: [index * 2, index * 2 + 1],
      identical: false,
      sideUnderMidDb: 4,
      midUnderSideDb: -4,
      gainDb: 0.2,
      correlation: 0.5,
      ...file.pair,
    })),
    truePeakDbtp: channels[0]?.peakDbfs ?? null,
    channelHashes: channels.map((_, index) => hash(built * 1000 + index + 1)),
    audioHash: hash(built * 1000),
    crc32: built.toString(16).padStart(8, '0'),
    fileBytes: 44 + format.frames * format.channels * 3,
    changedWhileRead: false,
    ...file.measures,
  };
  return {
    path: file.path ?? `Track ${built}.wav`,
    bytes: measures.fileBytes,
    reading: file.reading ?? { kind: 'track', promisedFrames: format.frames },
    format,
    measures,
  };
}

/** A file that could not be measured. */
export function unmeasuredFile(path: string, reading: JudgedReading): JudgedFile {
  return { path, bytes: 1000, reading, format: null, measures: null };
}

export function session(files: JudgedFile[], comparison: Partial<Comparison> = {}): JudgedSession {
  return { files, comparison: { ...emptyComparison(), ...comparison } };
}
