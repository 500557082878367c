import { allocate } from './arena';
import { granuleFrames } from './block';
import { Channel } from './channel';
import { countCycles, isCounting, resetCycles } from './cycles';
import { blockHighest, blockLowest, highest, lowest } from './levels';
import { clippingFloor, clippingTolerance, fullScaleLevel, shortestRun } from './parameters';
import { addPlace, newPlaces, Places } from './places';
import { extendRun, leavesSteeply, Run, startRun } from './run';

/**
 * Runs at a side's own ceiling; oracle/measure-clipping.ts says what they are. A granule that
 * stays below both ceilings ends open runs and is otherwise left alone, unless cycles are being
 * counted because a run was found.
 */

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
  for (let first = 0; first < frames; first += granuleFrames) {
    const at = (<usize>(first / granuleFrames)) << 3;
    const touches =
      reaches(channel.upper, load<f64>(highest + at)) ||
      reaches(channel.lower, -load<f64>(lowest + at)) ||
      channel.upper.run.length > 0 ||
      channel.lower.run.length > 0;
    if (!touches && !isCounting(channel.cycles)) continue;
    const last = min(first + granuleFrames, frames);
    for (let i = first; i < last; i++) {
      const sample = sampleAt<T>(channel, i);
      const before = start + <f64>i > 0 ? sampleAt<T>(channel, i - 1) : 0;
      followSample(channel, start + <f64>i, sample, before, touches);
    }
  }
}

/** Behind the file there is silence. */
export function endClipping<T extends number>(channel: Channel, end: f64): void {
  followSample(channel, end, 0, end > 0 ? sampleAt<T>(channel, -1) : 0, true);
}

function touchesCeiling(channel: Channel, low: f64, high: f64): bool {
  return (
    reaches(channel.upper, high) ||
    reaches(channel.lower, -low) ||
    channel.upper.run.length > 0 ||
    channel.lower.run.length > 0
  );
}

function reaches(side: Side, level: f64): bool {
  return level > clippingFloor && level >= side.ceiling - clippingTolerance;
}

function sampleAt<T extends number>(channel: Channel, index: i32): f64 {
  return <f64>load<T>(channel.samples + <usize>(<isize>index * <isize>sizeof<T>()));
}

function followSample(channel: Channel, frame: f64, sample: f64, before: f64, touches: bool): void {
  if (touches) {
    followSide(channel, channel.upper, frame, sample, before);
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
  side.longest = max(side.longest, length);
  if (run.high >= fullScaleLevel) side.fullScaleRuns += 1;
  addPlace(side.places, run.start, run.start + length);
}
