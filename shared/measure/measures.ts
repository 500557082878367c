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
 * Runs of at least 3 consecutive samples within one step at that side's own maximum: what
 * clipping leaves, at whatever level it was turned down to afterwards.
 */
const clippingSchema = z.strictObject({
  /** Samples in those runs. */
  samples: z.number().int().nonnegative(),
  longestRunFrames: frame,
  /** Level of the ceiling that was hit (the higher of both sides); null without runs. */
  ceilingDbfs: level,
  /** Runs that sit at full scale itself (>= 32767/32768 or the equivalent at the file's depth). */
  fullScaleRuns: z.number().int().nonnegative(),
  /** Share (0 to 1) of the waveform's cycles that end in such a run: near 1 is flat by design. */
  flatCycleShare: z.number().min(0).max(1),
  ranges: z.array(frameRangeSchema).max(maxPlaces),
});

export const channelMeasuresSchema = z.strictObject({
  peakDbfs: level,
  rmsDbfs: level,
  /** Mean of all samples, full scale = 1. */
  dcOffset: z.number(),
  /** Mean over the 10 ms windows that sound (peak above -60 dBFS); 0 if none does. */
  soundingDcOffset: z.number(),
  /** Clipped runs of both sides of the waveform together; `clipping` says more about them. */
  clippedRuns: z.number().int().nonnegative(),
  clipping: clippingSchema,
  /** Float samples above 1.0 in magnitude. */
  overFullScale: placesSchema,
  /** Samples that are NaN or infinite; they count as 0 everywhere else. */
  notANumber: placesSchema,
  /** First and last frame with a sample above -60 dBFS; null if there is none. */
  firstSoundFrame: frame.nullable(),
  lastSoundFrame: frame.nullable(),
  /** Longest run of exact zeros; null if there is no zero sample. */
  longestDigitalSilence: frameRangeSchema.nullable(),
  /** Runs of exact zeros of 1-100 ms whose both edges are abrupt and above -45 dBFS. */
  dropouts: placesSchema,
  /** Bits in use, counted from the most significant (16-bit audio in a 24-bit file: 16). For
   *  float, the depth of the integer grid all samples lie on; null if none, or silent. */
  realBits: z.number().int().min(1).max(64).nullable(),
  /** Peak of the first and last millisecond, and whether the sound ramps from or to zero there. */
  startEdge: z.strictObject({ peakDbfs: level, ramps: z.boolean() }),
  endEdge: z.strictObject({ peakDbfs: level, ramps: z.boolean() }),
  /** Peak of the last 50 ms, and the file's own floor (10th percentile of 50 ms peaks). */
  tailPeakDbfs: level,
  floorDbfs: level,
});
export type ChannelMeasures = z.infer<typeof channelMeasuresSchema>;

/** Two channels of one file against each other, from sums of squares and products. */
export const pairMeasuresSchema = z.strictObject({
  channels: z.tuple([z.number().int(), z.number().int()]),
  /** Every sample of both is bit-identical. */
  identical: z.boolean(),
  /** Level of (first - g*second) under (first + g*second) with the best gain g; null if silent. */
  sideUnderMidDb: z.number().nullable(),
  /** The other way round: how far mid lies under side. */
  midUnderSideDb: z.number().nullable(),
  /** Gain of the second over the first, in dB, that matches them best; null if silent. */
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
  /** xxh3-128 per channel over canonical little-endian samples at their own depth, 32 hex digits,
   *  and of all channels together: the identity of the audio whatever its container. */
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
