import { allocate } from './arena';

/** Frames between two looks at what the samples did: the smallest unit of the quick pass. */
export const granuleFrames: i32 = 64;
export const granulesPerBlock: i32 = 16;
/** Meters see the file in blocks of this many frames, counted from its first frame. */
export const blockFrames: i32 = granuleFrames * granulesPerBlock;
/** Frames of the block before that stay readable in front of the present one. */
export const historyFrames: i32 = 256;
/** Places kept of anything: `maxPlaces` in measures.ts. */
export const maxPlaces: i32 = 200;
/** Columns of the overview: `overviewColumns` in overview.ts. */
export const maxColumns: i32 = 2048;

/** Ranges of frames: the true count, and the first 200 places as pairs of f64. */
@unmanaged
export class Places {
  count: f64;
  kept: i32;
  ranges: usize;
}

export function addPlace(places: Places, startFrame: f64, endFrame: f64): void {
  places.count += 1;
  if (places.kept == maxPlaces) return;
  const at = places.ranges + ((<usize>places.kept) << 4);
  store<f64>(at, startFrame);
  store<f64>(at, endFrame, 8);
  places.kept++;
}

export function newPlaces(): Places {
  const places = changetype<Places>(allocate(offsetof<Places>()));
  places.ranges = allocate((<usize>maxPlaces) << 4);
  return places;
}

/** What is remembered of one channel between two blocks. */
@unmanaged
export class Channel {
  /** The block's first sample; the history lies in front of it. f32 or f64. */
  samples: usize;
  /** The block's samples as little-endian bytes of the file's own depth. */
  bytes: usize;

  lowest: f64;
  highest: f64;
  sum: f64;
  sumOfSquares: f64;

  /** Per column lowest and highest sample as pairs of f32. */
  overview: usize;
  column: i32;
  columnFrames: i32;

  firstSound: f64;
  lastSound: f64;

  overFullScale: Places;
  notANumber: Places;
}

export function newChannel(sampleSize: usize, sampleBytes: usize): Channel {
  const channel = changetype<Channel>(allocate(offsetof<Channel>()));
  const buffer = allocate(<usize>(historyFrames + blockFrames) * sampleSize);
  channel.samples = buffer + <usize>historyFrames * sampleSize;
  channel.bytes = allocate(<usize>blockFrames * sampleBytes + 16);
  channel.overview = allocate((<usize>maxColumns) << 3);
  channel.firstSound = -1;
  channel.lastSound = -1;
  channel.overFullScale = newPlaces();
  channel.notANumber = newPlaces();
  return channel;
}
