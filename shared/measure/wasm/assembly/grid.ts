import { Channel } from './channel';
import { deepestGrid, settledGrid } from './parameters';

/**
 * The coarsest grid of whole numbers all samples lie on: the bits that are really used. While
 * all samples lie on the grid so far, a multiplication and a comparison of four of them say so.
 * PCM cannot leave its deepest grid; float that left it is on none (`gridBits` above it).
 */
export function followGrid<T extends number>(channel: Channel, frames: i32): void {
  const samples = channel.samples;
  const end = samples + <usize>frames * sizeof<T>();
  let at = samples;
  while (channel.gridBits < settledGrid) {
    at = firstOffGrid<T>(at, end, gridScale(channel.gridBits));
    if (at >= end) return;
    refineGrid(channel, <f64>load<T>(at));
  }
}

/** 0 bits: only 0 lies on that grid. */
function gridScale(bits: i32): f64 {
  return bits == 0 ? 0 : <f64>((<u64>1) << (bits - 1));
}

function firstOffGrid<T extends number>(at: usize, end: usize, scale: f64): usize {
  const scales = v128.splat<T>(<T>scale);
  const zero = v128.splat<T>(<T>0);
  for (; at + 16 <= end; at += 16) {
    const samples = v128.load(at);
    const scaled = v128.mul<T>(samples, scales);
    const off = scale == 0 ? v128.ne<T>(samples, zero) : v128.ne<T>(scaled, v128.trunc<T>(scaled));
    if (v128.any_true(off)) break;
  }
  for (; at < end; at += sizeof<T>()) {
    if (isOff(<f64>load<T>(at), scale)) return at;
  }
  return end;
}

function isOff(sample: f64, scale: f64): bool {
  const scaled = sample * scale;
  return scale == 0 ? sample != 0 : scaled != Math.trunc(scaled);
}

function refineGrid(channel: Channel, sample: f64): void {
  let bits = max(channel.gridBits, 1);
  while (bits <= deepestGrid && isOff(sample, gridScale(bits))) bits++;
  channel.gridBits = bits;
}
