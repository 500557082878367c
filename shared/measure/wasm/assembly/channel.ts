import { allocate } from './arena';
import { blockFrames, historyFrames } from './block';
import { newSide, Side } from './clipping';
import { Cycles, newCycles } from './cycles';
import { newOutliers, Outliers } from './outliers';
import { columns, sampleBytes } from './parameters';
import { newPlaces, Places } from './places';
import { floorBins } from './windows';
import { Hash, newHash } from './xxh3';

/** What is remembered of one channel between two blocks. */
@unmanaged
export class Channel {
  /** The block's first sample; the history lies in front of it. f32 or f64. */
  samples: usize;
  /** The block's samples as canonical bytes, where the file has several channels. */
  bytes: usize;
  hash: Hash;

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

  windowPeak: f64;
  windowSum: f64;
  windowFrames: i32;
  soundingSum: f64;
  soundingFrames: f64;

  floorPeak: f64;
  floorFrames: i32;
  floorWindows: f64;
  floorHistogram: usize;

  startEdgePeak: f64;
  startEdgeRamps: bool;
  tailPeak: f64;

  truePeak: f64;
  /** Peak of the granule before. */
  previousPeak: f64;

  /** Deeper than the deepest grid: on none. */
  gridBits: i32;

  upper: Side;
  lower: Side;
  cycles: Cycles;

  /** The run of zeros that is going on, and whether the sound broke off in front of it. */
  inZeros: bool;
  zeroStart: f64;
  abruptStart: bool;
  /** The longest so far. */
  silenceStart: f64;
  silenceEnd: f64;
  /** A run whose end still has to be looked at; none if the end is negative. */
  pendingStart: f64;
  pendingEnd: f64;
  dropouts: Places;

  overFullScale: Outliers;
  notANumber: Outliers;
}

export function newChannel(sampleSize: usize): Channel {
  const channel = changetype<Channel>(allocate(offsetof<Channel>()));
  const buffer = allocate(<usize>(historyFrames + blockFrames) * sampleSize + 64);
  channel.samples = buffer + <usize>historyFrames * sampleSize;
  channel.bytes = allocate(<usize>blockFrames * sampleBytes + 64);
  channel.hash = newHash();
  channel.overview = allocate((<usize>columns) << 3);
  channel.firstSound = -1;
  channel.lastSound = -1;
  channel.floorHistogram = allocate((<usize>floorBins) << 2);
  channel.startEdgeRamps = true;
  channel.upper = newSide(1);
  channel.lower = newSide(-1);
  channel.cycles = newCycles();
  channel.pendingEnd = -1;
  channel.dropouts = newPlaces();
  channel.overFullScale = newOutliers();
  channel.notANumber = newOutliers();
  return channel;
}
