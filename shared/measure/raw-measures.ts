import type { FrameRange } from './measures.ts';

/**
 * What the meters count and add up, before it is put into words and decibels: samples are
 * fractions of full scale, frames count from the start of the file. Both engines deliver this.
 */
export type RawMeasures = {
  frames: number;
  crc32: number;
  framesPerColumn: number;
  channels: RawChannel[];
};

export type RawPlaces = { count: number; ranges: FrameRange[] };

export type RawChannel = {
  lowest: number;
  highest: number;
  sum: number;
  sumOfSquares: number;
  /** Null if no sample is above -60 dBFS. */
  firstSoundFrame: number | null;
  lastSoundFrame: number | null;
  notANumber: RawPlaces;
  overFullScale: RawPlaces;
  /** Lowest and highest sample of each column, interleaved. */
  overview: Float32Array;
};
