/** Columns kept for drawing, whatever the file's length: memory stays flat. */
export const overviewColumns = 2048;

/**
 * The picture of one channel: for each of up to 2,048 equal stretches of the file the lowest and
 * highest sample, as int8 (127 = full scale), interleaved min, max, min, max ...
 */
export type ChannelOverview = Int8Array;

export type Overview = {
  /** Frames a column stands for (the last may be shorter); at least 1. */
  framesPerColumn: number;
  channels: ChannelOverview[];
};
