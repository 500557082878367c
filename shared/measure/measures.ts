import { z } from 'zod';

/**
 * What one pass over a file found. Levels are dBFS re 1.0 = full scale (a full-scale sine has an
 * RMS of -3.01 dBFS); digital silence is null, never -Infinity. Frames count from the start of
 * the file, ranges are half open: [startFrame, endFrame).
 * The measures know no rules: thresholds here are those the measure is defined by.
 */

const level = z.number().nullable();
const frame = z.number().int().nonnegative();

/** At most this many places are kept of anything; `count` keeps the true total. */
export const maxPlaces = 200;

/** Channels that are measured; a file with more is measured in its first 64. */
export const maxMeasuredChannels = 64;

export const frameRangeSchema = z.strictObject({ startFrame: frame, endFrame: frame });
export type FrameRange = z.infer<typeof frameRangeSchema>;

const placesSchema = z.strictObject({
  count: z.number().int().nonnegative(),
  ranges: z.array(frameRangeSchema).max(maxPlaces),
});
export type Places = z.infer<typeof placesSchema>;

/**
 * Runs of at least 3 samples at their side's own maximum, above -34 dBFS, which the sound leaves
 * more steeply than a smooth peak could: what clipping leaves, at whatever level it was turned
 * down to afterwards, dithered or not. oracle/measure-clipping.ts says it exactly.
 */
const clippingSchema = z.strictObject({
  /** Samples in those runs. */
  samples: z.number().int().nonnegative(),
  longestRunFrames: frame,
  /** Level of the ceiling that was hit (the higher of both sides); null without runs. */
  ceilingDbfs: level,
  /** Runs that sit at full scale itself (>= 32767/32768 or the equivalent at the file's depth). */
  fullScaleRuns: z.number().int().nonnegative(),
  /**
   * Share (0 to 1) of the waveform's cycles whose top is flat at whatever level, among the first
   * 2,000 above -34 dBFS from the first run on: near 1 is flat by design. 0 without runs.
   */
  flatCycleShare: z.number().min(0).max(1),
  ranges: z.array(frameRangeSchema).max(maxPlaces),
});

export const channelMeasuresSchema = z.strictObject({
  peakDbfs: level,
  rmsDbfs: level,
  /** Mean of all samples, full scale = 1. */
  dcOffset: z.number(),
  /** Mean over the windows of about 10 ms that sound (peak above -60 dBFS); 0 if none does. */
  soundingDcOffset: z.number(),
  /** Clipped runs of both sides of the waveform together; `clipping` says more about them. */
  clippedRuns: z.number().int().nonnegative(),
  clipping: clippingSchema,
  /** Runs of float samples above 1.0 in magnitude. */
  overFullScale: placesSchema,
  /** Runs of samples that are NaN or infinite; they count as 0 everywhere else. */
  notANumber: placesSchema,
  /** First and last frame with a sample above -60 dBFS; null if there is none. */
  firstSoundFrame: frame.nullable(),
  lastSoundFrame: frame.nullable(),
  /** Longest run of exact zeros of at least 1 ms, the first of several; null if there is none. */
  longestDigitalSilence: frameRangeSchema.nullable(),
  /** Runs of exact zeros of 1-100 ms with a sample above -45 dBFS and no ramp on both sides. */
  dropouts: placesSchema,
  /** Bits in use, counted from the most significant (16-bit audio in a 24-bit file: 16). For
   *  float, the depth of the integer grid all samples lie on, at most 24 (64-bit float: 32);
   *  null if none, or silent. */
  realBits: z.number().int().min(1).max(64).nullable(),
  /** Peak of the first and last millisecond, and whether the sound ramps from or to zero there:
   *  a fade of 2 ms or more does, a cut does not. */
  startEdge: z.strictObject({ peakDbfs: level, ramps: z.boolean() }),
  endEdge: z.strictObject({ peakDbfs: level, ramps: z.boolean() }),
  /** Peak of the last 50 ms, and the file's own floor (10th percentile of the peaks of windows of
   *  about 50 ms, up to 0.27 dB too low); null for digital silence. */
  tailPeakDbfs: level,
  floorDbfs: level,
});
export type ChannelMeasures = z.infer<typeof channelMeasuresSchema>;

/**
 * Two channels of one file against each other, from sums of squares and products; differences of
 * more than 140 dB cannot be told from that and are given as 140.
 */
export const pairMeasuresSchema = z.strictObject({
  channels: z.tuple([z.number().int(), z.number().int()]),
  /** Every sample of both is bit-identical. */
  identical: z.boolean(),
  /** Level of the side under the mid once both channels are equally loud; null if one is silent. */
  sideUnderMidDb: z.number().nullable(),
  /** The other way round: how far mid lies under side. */
  midUnderSideDb: z.number().nullable(),
  /** Level of the second over the first, in dB; null if either is silent. */
  gainDb: z.number().nullable(),
  /** -1 to 1; null if either is silent. */
  correlation: z.number().min(-1).max(1).nullable(),
});
export type PairMeasures = z.infer<typeof pairMeasuresSchema>;

export const measuresSchema = z.strictObject({
  frames: frame,
  channels: z.array(channelMeasuresSchema).max(maxMeasuredChannels),
  /** Neighbouring pairs (0,1), (2,3) ... */
  pairs: z.array(pairMeasuresSchema).max(32),
  /** Highest true peak of all channels, dBTP (ITU-R BS.1770-5 Annex 2); null if silent. */
  truePeakDbtp: level,
  /** XXH3-128 per channel over the bytes a WAVE file of that channel alone would hold as data
   *  (little-endian, at their own depth, 8-bit unsigned): the identity of the audio whatever its
   *  container. Of all channels together: of one its own hash, of several the XXH3-128 over
   *  their 16-byte hashes in order. 32 hex digits. */
  channelHashes: z.array(z.string().regex(/^[0-9a-f]{32}$/)).max(64),
  audioHash: z.string().regex(/^[0-9a-f]{32}$/),
  /** CRC-32 (as in zip) of the whole file, 8 hex digits. */
  crc32: z.string().regex(/^[0-9a-f]{8}$/),
  fileBytes: z.number().int().nonnegative(),
  /** The file had fewer or other bytes at the end of the read than when it was opened. */
  changedWhileRead: z.boolean(),
});
export type Measures = z.infer<typeof measuresSchema>;

/** Raised whenever a measure's definition or rounding changes. */
export const measureVersion = 1;
