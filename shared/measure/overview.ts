import { granuleFrames } from './definitions.ts';

/** Columns kept for drawing, whatever the file's length: memory stays flat. */
export const overviewColumns = 2048;

/**
 * The picture of one channel: for each of up to 2,048 equal stretches of the file the lowest and
 * highest sample, as int8 (127 = full scale), interleaved min, max, min, max ... Rounded away
 * from zero: only silence is drawn as nothing.
 */
export type ChannelOverview = Int8Array;

export type Overview = {
  /** Frames a column stands for (the last may be shorter); at least 1. */
  framesPerColumn: number;
  channels: ChannelOverview[];
};

/** As few as 2,048 columns allow; above the meters' granule a whole number of granules. */
export function chooseFramesPerColumn(frames: number): number {
  const shortest = Math.max(1, Math.ceil(frames / overviewColumns));
  if (shortest <= granuleFrames) return shortest;
  return Math.ceil(shortest / granuleFrames) * granuleFrames;
}
