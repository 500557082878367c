import { granuleFrames } from './block';
import { Channel } from './channel';
import { blockZeros, zeros } from './levels';
import { abruptLevel, edgeFrames, longestDropout, shortestSilence } from './parameters';
import { addPlace } from './places';
import { isRamp } from './ramp';

/**
 * Runs of exact zeros: the longest, and those that are dropouts. A run either covers a granule's
 * edge or has to show in the granule's count of zeros, so few granules are looked into.
 * Frames within a block may be negative: they lie in the history.
 */
export function findSilence<T extends number>(channel: Channel, start: f64, frames: i32): void {
  if (channel.pendingEnd >= 0) decidePending<T>(channel, start, <f64>frames);
  if (blockZeros == 0 && !channel.inZeros) return;
  for (let first = 0; first < frames; first += granuleFrames) {
    const length = min(granuleFrames, frames - first);
    const count = load<i32>(zeros + ((<usize>(first / granuleFrames)) << 2));
    if (count == length) {
      if (!channel.inZeros) openRun<T>(channel, start, first);
    } else if (count > 0) {
      if (<f64>count >= shortestSilence) scan<T>(channel, start, first, first + length, frames);
      else scanEnds<T>(channel, start, first, first + length, frames);
    } else if (channel.inZeros) {
      closeRun<T>(channel, start, first, frames);
    }
  }
}

/** At the end of the file: silence up to its end is no dropout. `start` is of the last block. */
export function endSilence<T extends number>(channel: Channel, start: f64, frames: i32): void {
  if (channel.pendingEnd >= 0) decidePending<T>(channel, start, <f64>frames);
  if (channel.inZeros) keepLongest(channel, start + <f64>frames);
}

function isZero<T extends number>(channel: Channel, index: i32): bool {
  return load<T>(channel.samples + <usize>index * sizeof<T>()) == <T>0;
}

function scan<T extends number>(
  channel: Channel,
  start: f64,
  from: i32,
  to: i32,
  frames: i32,
): void {
  for (let i = from; i < to; i++) {
    if (isZero<T>(channel, i)) {
      if (!channel.inZeros) openRun<T>(channel, start, i);
    } else if (channel.inZeros) {
      closeRun<T>(channel, start, i, frames);
    }
  }
}

/** Too few zeros for a run of its own: one may end at the granule's front or begin at its back. */
function scanEnds<T extends number>(
  channel: Channel,
  start: f64,
  from: i32,
  to: i32,
  frames: i32,
): void {
  let front = from;
  while (isZero<T>(channel, front)) front++;
  if (channel.inZeros) closeRun<T>(channel, start, front, frames);
  let back = to;
  while (isZero<T>(channel, back - 1)) back--;
  if (back < to) openRun<T>(channel, start, back);
}

/** The sound in front of a run may be gone when it ends, so it is looked at now. */
function openRun<T extends number>(channel: Channel, start: f64, index: i32): void {
  const frame = start + <f64>index;
  channel.inZeros = true;
  channel.zeroStart = frame;
  channel.abruptStart = frame > 0 && isAbrupt<T>(channel, index - 1, -1, frame);
}

function isAbrupt<T extends number>(
  channel: Channel,
  index: i32,
  direction: i32,
  available: f64,
): bool {
  const at = channel.samples + <usize>(<isize>index * <isize>sizeof<T>());
  return Math.abs(<f64>load<T>(at)) > abruptLevel && !isRamp<T>(at, direction, available);
}

function keepLongest(channel: Channel, end: f64): void {
  const length = end - channel.zeroStart;
  if (length < shortestSilence || length <= channel.silenceEnd - channel.silenceStart) return;
  channel.silenceStart = channel.zeroStart;
  channel.silenceEnd = end;
}

function closeRun<T extends number>(channel: Channel, start: f64, index: i32, frames: i32): void {
  const end = start + <f64>index;
  const length = end - channel.zeroStart;
  keepLongest(channel, end);
  channel.inZeros = false;
  if (!channel.abruptStart || length < shortestSilence || length > longestDropout) return;
  channel.pendingStart = channel.zeroStart;
  channel.pendingEnd = end;
  // The sound behind it is not all there yet: the next block decides.
  if (index + edgeFrames <= frames) decidePending<T>(channel, start, <f64>frames);
}

function decidePending<T extends number>(channel: Channel, start: f64, frames: f64): void {
  const index = channel.pendingEnd - start;
  if (isAbrupt<T>(channel, <i32>index, 1, frames - index)) {
    addPlace(channel.dropouts, channel.pendingStart, channel.pendingEnd);
  }
  channel.pendingEnd = -1;
}
