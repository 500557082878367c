import type { FrameRange } from './measures.ts';

/**
 * What the meters count and add up, before it is put into decibels and ratios: samples are
 * fractions of full scale, frames count from the start of the file. Both engines deliver this.
 */
export type RawMeasures = {
  frames: number;
  crc32: number;
  framesPerColumn: number;
  channels: RawChannel[];
  /** Of neighbouring channels (0, 1), (2, 3) ...: the sum of the products of their samples. */
  pairProducts: number[];
  /** See joinedHash in create-oracle.ts. 32 hex digits. */
  audioHash: string;
};

/** A count of everything, and the first 200 places. */
export type RawPlaces = { count: number; ranges: FrameRange[] };

export type RawClipping = {
  runs: number;
  samples: number;
  longestRunFrames: number;
  /** 0 without runs. */
  ceiling: number;
  fullScaleRuns: number;
  cycles: number;
  flatCycles: number;
  ranges: FrameRange[];
};

export type RawEdge = { peak: number; ramps: boolean };

export type RawChannel = {
  lowest: number;
  highest: number;
  sum: number;
  sumOfSquares: number;
  /** Of the windows that sound. */
  soundingSum: number;
  soundingFrames: number;
  /** Null if no sample is above -60 dBFS. */
  firstSoundFrame: number | null;
  lastSoundFrame: number | null;
  truePeak: number;
  /** 0 if no sample differs from 0; null if the samples lie on no grid. */
  gridBits: number | null;
  clipping: RawClipping;
  overFullScale: RawPlaces;
  notANumber: RawPlaces;
  longestDigitalSilence: FrameRange | null;
  dropouts: RawPlaces;
  startEdge: RawEdge;
  endEdge: RawEdge;
  tailPeak: number;
  floor: number;
  /** 32 hex digits. */
  hash: string;
  /** Lowest and highest sample of each column, interleaved. */
  overview: Float32Array;
};
