import { larger } from './extremes';
import { allocate } from './arena';
import { granuleFrames } from './block';
import { Channel } from './channel';
import { countCycles, isCounting, isInCycle, passCycles, resetCycles } from './cycles';
import { blockHighest, blockLowest, highest, lowest } from './levels';
import { clippingFloor, clippingTolerance, fullScaleLevel, shortestRun } from './parameters';
import { addPlace, newPlaces, Places } from './places';
import { extendRun, leavesSteeply, Run, startRun } from './run';

/**
 * Runs at a side's own ceiling; oracle/measure-clipping.ts says what they are. A granule that
 * stays below both ceilings ends open runs and is otherwise left alone, unless cycles are being
 * counted because a run was found.
 */

/** Samples on their way out of a vector. */
const lanes = memory.data(16, 16);

/** The upper or the lower side of the waveform; levels are positive on both. */
@unmanaged
export class Side {
  sign: f64;
  ceiling: f64;
  samples: f64;
  longest: f64;
  fullScaleRuns: f64;
  /** The runs; the count is kept there. */
  places: Places;
  run: Run;
}

export function newSide(sign: f64): Side {
  const side = changetype<Side>(allocate(offsetof<Side>()));
  side.sign = sign;
  side.ceiling = clippingFloor;
  side.places = newPlaces();
  side.run = changetype<Run>(allocate(offsetof<Run>()));
  return side;
}

export function findClipping<T extends number>(channel: Channel, start: f64, frames: i32): void {
  if (!asksForSamples(channel, blockLowest, blockHighest)) return;
  for (let first = 0; first < frames; first += granuleFrames) {
    const at = (<usize>(first / granuleFrames)) << 3;
    if (!asksForSamples(channel, load<f64>(lowest + at), load<f64>(highest + at))) continue;
    searchGranule<T>(channel, start, first, min(first + granuleFrames, frames));
  }
}

/** Whether something is going on that these samples would end, or they reach high enough. */
function asksForSamples(channel: Channel, low: f64, high: f64): bool {
  if (channel.upper.run.length > 0 || channel.lower.run.length > 0) return true;
  if (reaches(channel.upper, high) || reaches(channel.lower, -low)) return true;
  if (!isCounting(channel.cycles)) return false;
  return isInCycle(channel.cycles) || high > clippingFloor || low < -clippingFloor;
}

/** Goes several samples at a time as long as they stay below both ceilings, or all at one. */
function searchGranule<T extends number>(channel: Channel, start: f64, from: i32, to: i32): void {
  const width = 16 / <i32>sizeof<T>();
  let i = from;
  while (i < to) {
    const at = channel.samples + <usize>i * sizeof<T>();
    if (i + width <= to && canPass<T>(channel, at)) {
      i += width;
      continue;
    }
    const end = min(i + width, to);
    for (; i < end; i++) followSample<T>(channel, start, i);
  }
}

/** Takes in all samples of the vector at `at`, or leaves them to be looked at one by one. */
function canPass<T extends number>(channel: Channel, at: usize): bool {
  const samples = v128.load(at);
  if (isCounting(channel.cycles)) {
    return staysBelow<T>(channel, samples) && passCycles<T>(channel.cycles, at);
  }
  return staysBelow<T>(channel, samples) || goesOn<T>(channel, samples);
}

function staysBelow<T extends number>(channel: Channel, samples: v128): bool {
  if (channel.upper.run.length > 0 || channel.lower.run.length > 0) return false;
  const high = v128.gt<T>(samples, v128.splat<T>(<T>justBelow(channel.upper)));
  const low = v128.lt<T>(samples, v128.splat<T>(<T>-justBelow(channel.lower)));
  return !v128.any_true(v128.or(high, low));
}

/** Lengthens the run that is going on by all these samples if all are well within it. */
function goesOn<T extends number>(channel: Channel, samples: v128): bool {
  const isUpper = channel.upper.run.length > 0;
  if (isUpper == channel.lower.run.length > 0) return false;
  const side = isUpper ? channel.upper : channel.lower;
  const levels = isUpper ? samples : v128.neg<T>(samples);
  const least = (side.ceiling - clippingTolerance) * 1.000001;
  const most = (side.ceiling + clippingTolerance) * 0.999999;
  const within = v128.and(
    v128.ge<T>(levels, v128.splat<T>(<T>larger(least, clippingFloor * 1.000001))),
    v128.le<T>(levels, v128.splat<T>(<T>most)),
  );
  if (!v128.all_true<i32>(within)) return false;
  store<v128>(lanes, levels);
  for (let lane = 0; lane < 16 / <i32>sizeof<T>(); lane++) {
    extendRun(side.run, <f64>load<T>(lanes + <usize>lane * sizeof<T>()));
  }
  return true;
}

/** Rounding to single precision must not lift it above a sample at the ceiling. */
function justBelow(side: Side): f64 {
  return larger(clippingFloor, side.ceiling - clippingTolerance) * 0.999999;
}

/** Behind the file there is silence. */
export function endClipping<T extends number>(channel: Channel, end: f64): void {
  follow(channel, end, 0, end > 0 ? sampleAt<T>(channel, -1) : 0);
}

function reaches(side: Side, level: f64): bool {
  return level > clippingFloor && level >= side.ceiling - clippingTolerance;
}

function sampleAt<T extends number>(channel: Channel, index: i32): f64 {
  return <f64>load<T>(channel.samples + <usize>(<isize>index * <isize>sizeof<T>()));
}

function followSample<T extends number>(channel: Channel, start: f64, index: i32): void {
  const frame = start + <f64>index;
  const before = frame > 0 ? sampleAt<T>(channel, index - 1) : 0;
  follow(channel, frame, sampleAt<T>(channel, index), before);
}

function follow(channel: Channel, frame: f64, sample: f64, before: f64): void {
  if (sample > 0 || channel.upper.run.length > 0) {
    followSide(channel, channel.upper, frame, sample, before);
  }
  if (sample < 0 || channel.lower.run.length > 0) {
    followSide(channel, channel.lower, frame, -sample, -before);
  }
  if (isCounting(channel.cycles)) countCycles(channel.cycles, sample, before);
}

function followSide(channel: Channel, side: Side, frame: f64, level: f64, before: f64): void {
  const run = side.run;
  if (level > side.ceiling + clippingTolerance) {
    forgetRuns(side, level);
    startRun(run, frame, before, level);
    if (channel.upper.places.count == 0 && channel.lower.places.count == 0) {
      resetCycles(channel.cycles, false);
    }
  } else if (level >= side.ceiling - clippingTolerance && level > clippingFloor) {
    if (run.length == 0) startRun(run, frame, before, level);
    else extendRun(run, level);
  } else if (run.length > 0) {
    if (run.length >= shortestRun && leavesSteeply(run, level)) {
      keepRun(side);
      if (!channel.cycles.started) resetCycles(channel.cycles, true);
    }
    run.length = 0;
  }
}

function forgetRuns(side: Side, ceiling: f64): void {
  side.ceiling = ceiling;
  side.samples = 0;
  side.longest = 0;
  side.fullScaleRuns = 0;
  side.places.count = 0;
  side.places.kept = 0;
}

function keepRun(side: Side): void {
  const run = side.run;
  const length = <f64>run.length;
  side.samples += length;
  side.longest = larger(side.longest, length);
  if (run.high >= fullScaleLevel) side.fullScaleRuns += 1;
  addPlace(side.places, run.start, run.start + length);
}
