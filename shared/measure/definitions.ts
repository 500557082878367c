import type { TrackFormat } from '../wave/track-format.ts';

/**
 * The numbers by which measures are defined, for both engines. Levels are fractions of full
 * scale. Thresholds of findings are elsewhere: these say what is counted, not what is wrong.
 */

/** Frames of the quick pass's smallest unit; windows are whole numbers of it. */
export const granuleFrames = 64;

/** -60 dBFS: a sample above it is sound. */
export const soundLevel = 0.001;

/** -34 dBFS: below it nothing clips that anybody could hear. */
export const clippingFloor = 10 ** (-34 / 20);

/** -45 dBFS: the least jump that makes a hole in the sound abrupt. */
export const abruptLevel = 10 ** (-45 / 20);

/** A shorter stretch of zeros is no digital silence. */
export const shortestSilenceMs = 1;
/** A longer stretch is a rest, not a dropout. */
export const longestDropoutMs = 100;

/** A fade has its outermost sample and its outermost quarter this far below its peak. */
export const rampOutermost = 0.2;
export const rampQuarter = 0.6;

/** The floor's levels are sorted into bins: 32 an octave from 2^-40 on, at most 0.27 dB wide. */
export const floorBinsPerOctave = 32;
export const floorLowestExponent = -40;
export const floorBins = 2048;
/** The share of windows that lie below the file's own floor. */
export const floorShare = 0.1;

/** A clipped run has at least this many samples. */
export const shortestRun = 3;

/** Cycles that are looked at to tell clipping from a sound that is flat by design. */
export const mostCycles = 2000;

/** How far samples at one ceiling may lie apart: two steps of 16 bits, as dither leaves them. */
export function clippingTolerance(format: TrackFormat): number {
  return 2 * Math.max(quantisationStep(format), 2 ** -15);
}

/** One step of the format, full scale = 1; of float, of the 24 bits of its mantissa. */
export function quantisationStep({ encoding, bits }: TrackFormat): number {
  return 2 ** (1 - (encoding === 'float' ? 24 : Math.min(bits, 24)));
}

/** The largest value of 16 bits, or of the file's own depth where that is lower. */
export function fullScaleLevel({ encoding, bits }: TrackFormat): number {
  return 1 - 2 ** (1 - (encoding === 'float' ? 16 : Math.min(bits, 16)));
}

/** Deepest grid of whole numbers that is looked for: the format's own bits, or a mantissa's. */
export function deepestGrid({ encoding, containerBits }: TrackFormat): number {
  if (encoding === 'pcm') return containerBits;
  return containerBits === 64 ? 32 : 24;
}

/** Frames of windows of about 10 ms (sounding mean) and 50 ms (floor). */
export function windowFrames(milliseconds: number, { sampleRateHz }: TrackFormat): number {
  const granules = Math.round((sampleRateHz * milliseconds) / 1000 / granuleFrames);
  return granuleFrames * Math.max(1, granules);
}

/** A millisecond at either end of the file or of a dropout; 256 frames are the most. */
export function edgeFrames({ sampleRateHz }: TrackFormat): number {
  return Math.min(256, Math.max(1, Math.round(sampleRateHz / 1000)));
}

/** The last 50 ms. */
export function tailFrames({ sampleRateHz }: TrackFormat): number {
  return Math.round(sampleRateHz / 20);
}

export function shortestSilenceFrames({ sampleRateHz }: TrackFormat): number {
  return Math.max(1, Math.ceil((sampleRateHz * shortestSilenceMs) / 1000));
}

export function longestDropoutFrames({ sampleRateHz }: TrackFormat): number {
  return Math.floor((sampleRateHz * longestDropoutMs) / 1000);
}
