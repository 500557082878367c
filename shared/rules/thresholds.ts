import { z } from 'zod';

/**
 * Where a measure becomes a finding. Defaults are the trade judgement of a mixing engineer unless
 * a source is named. Levels in dBFS, times in milliseconds.
 */
export const thresholdsSchema = z.strictObject({
  /** No sample above one 16-bit step, 2^-15 = -90.3 dBFS. */
  silentDbfs: z.number().min(-200).max(0).default(-90.3),
  nearlySilentDbfs: z.number().min(-200).max(0).default(-60),
  /** Peaks above this leave no room before distortion. */
  ceilingDbfs: z.number().min(-60).max(0).default(-1),
  /** First or last millisecond above this, with no ramp: starts or ends on sound. */
  edgeDbfs: z.number().min(-120).max(0).default(-50),
  /** Last 50 ms above this, and `tailAboveFloorDb` above the file's own floor. */
  tailDbfs: z.number().min(-120).max(0).default(-60),
  tailAboveFloorDb: z.number().min(0).max(60).default(12),
  /** More dropouts than this in one file are a style, not a fault. */
  dropoutMostPlaces: z.number().int().min(1).max(200).default(5),
  dropoutSimultaneousMs: z.number().min(0).max(100).default(5),
  /** Side this far under mid: the same sound on both sides. Between the two: a note. */
  dualMonoDb: z.number().min(20).max(140).default(70),
  nearlyDualMonoDb: z.number().min(20).max(140).default(50),
  sidesCancelDb: z.number().min(20).max(140).default(50),
  oneSideSilentDbfs: z.number().min(-200).max(0).default(-80),
  otherSideSoundsDbfs: z.number().min(-120).max(0).default(-50),
  /** What is left after the best gain and shift: this far down is the same audio. */
  sameAudioDb: z.number().min(20).max(140).default(60),
  polarityTwinDb: z.number().min(20).max(140).default(40),
  /** Share of full scale. */
  dcOffset: z.number().min(0.0001).max(1).default(0.01),
  /** Clipped: this many runs, or this many samples in runs, or one at full scale. */
  clippedRuns: z.number().int().min(1).default(3),
  clippedSamples: z.number().int().min(1).default(8),
  /** Above this many runs, or a run of this length, clipping is serious on any instrument. */
  clippedSeriousRuns: z.number().int().min(1).default(10),
  clippedSeriousMs: z.number().min(0.01).default(1),
  /** Share of cycles that are flat: above it flat by design. */
  flatTopsShare: z.number().min(0).max(1).default(0.8),
});
export type Thresholds = z.infer<typeof thresholdsSchema>;

export const defaultThresholds: Thresholds = thresholdsSchema.parse({});
