import { larger, smaller } from './extremes';
import { granuleFrames, granulesPerBlock } from './block';

/**
 * The quick pass: per granule of 64 frames lowest and highest sample, sum and number of exact
 * zeros, and the same of the whole block. Every other meter looks at these first and at samples
 * only where it must.
 */

export const lowest: usize = memory.data(8 * granulesPerBlock, 16);
export const highest: usize = memory.data(8 * granulesPerBlock, 16);
export const sums: usize = memory.data(8 * granulesPerBlock, 16);
export const zeros: usize = memory.data(4 * granulesPerBlock, 16);

export let blockLowest: f64 = 0;
export let blockHighest: f64 = 0;
export let blockPeak: f64 = 0;
export let blockSum: f64 = 0;
export let blockSquares: f64 = 0;
export let blockZeros: i32 = 0;

/** Fills the tables for `frames` samples; the last granule may be shorter. */
export function measureGranules<T extends number>(samples: usize, frames: i32): void {
  const whole = frames / granuleFrames;
  blockSquares = sizeof<T>() == 4 ? measure32(samples, whole) : measure64(samples, whole);
  const rest = frames - whole * granuleFrames;
  const restStart = samples + <usize>(whole * granuleFrames) * sizeof<T>();
  if (rest > 0) measureRest<T>(restStart, whole, rest);
  sumUp(rest > 0 ? whole + 1 : whole);
}

function sumUp(granules: i32): void {
  let low = Infinity;
  let high = -Infinity;
  let sum: f64 = 0;
  let zeroCount = 0;
  for (let granule = 0; granule < granules; granule++) {
    const at = (<usize>granule) << 3;
    low = smaller(low, load<f64>(lowest + at));
    high = larger(high, load<f64>(highest + at));
    sum += load<f64>(sums + at);
    zeroCount += load<i32>(zeros + (at >> 1));
  }
  blockLowest = low;
  blockHighest = high;
  blockPeak = larger(high, -low);
  blockSum = sum;
  blockZeros = zeroCount;
}

/** Returns the sum of squares. */
function measure32(samples: usize, granules: i32): f64 {
  const zero = f32x4.splat(0);
  let square = f64x2.splat(0);
  let at = samples;
  for (let granule = 0; granule < granules; granule++) {
    let low = v128.load(at);
    let high = low;
    let sum = f64x2.splat(0);
    let zeroCount = i32x4.splat(0);
    for (const end = at + <usize>granuleFrames * 4; at < end; at += 32) {
      const x = v128.load(at);
      const y = v128.load(at, 16);
      low = f32x4.pmin(low, f32x4.pmin(x, y));
      high = f32x4.pmax(high, f32x4.pmax(x, y));
      const zeroLanes = i32x4.add(f32x4.eq(x, zero), f32x4.eq(y, zero));
      zeroCount = i32x4.sub(zeroCount, zeroLanes);
      const x1 = f64x2.promote_low_f32x4(x);
      const x2 = f64x2.promote_low_f32x4(i32x4.shuffle(x, x, 2, 3, 2, 3));
      const y1 = f64x2.promote_low_f32x4(y);
      const y2 = f64x2.promote_low_f32x4(i32x4.shuffle(y, y, 2, 3, 2, 3));
      sum = f64x2.add(sum, f64x2.add(f64x2.add(x1, x2), f64x2.add(y1, y2)));
      const squareX = f64x2.add(f64x2.mul(x1, x1), f64x2.mul(x2, x2));
      const squareY = f64x2.add(f64x2.mul(y1, y1), f64x2.mul(y2, y2));
      square = f64x2.add(square, f64x2.add(squareX, squareY));
    }
    low = f32x4.pmin(low, i32x4.shuffle(low, low, 2, 3, 2, 3));
    low = f32x4.pmin(low, i32x4.shuffle(low, low, 1, 1, 1, 1));
    high = f32x4.pmax(high, i32x4.shuffle(high, high, 2, 3, 2, 3));
    high = f32x4.pmax(high, i32x4.shuffle(high, high, 1, 1, 1, 1));
    zeroCount = i32x4.add(zeroCount, i32x4.shuffle(zeroCount, zeroCount, 2, 3, 2, 3));
    putGranule(
      granule,
      f32x4.extract_lane(low, 0),
      f32x4.extract_lane(high, 0),
      f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1),
      i32x4.extract_lane(zeroCount, 0) + i32x4.extract_lane(zeroCount, 1),
    );
  }
  return f64x2.extract_lane(square, 0) + f64x2.extract_lane(square, 1);
}

function measure64(samples: usize, granules: i32): f64 {
  const zero = f64x2.splat(0);
  let square = f64x2.splat(0);
  let at = samples;
  for (let granule = 0; granule < granules; granule++) {
    let low = v128.load(at);
    let high = low;
    let sum = f64x2.splat(0);
    let zeroCount = i64x2.splat(0);
    for (const end = at + <usize>granuleFrames * 8; at < end; at += 16) {
      const x = v128.load(at);
      low = f64x2.pmin(low, x);
      high = f64x2.pmax(high, x);
      zeroCount = i64x2.sub(zeroCount, f64x2.eq(x, zero));
      sum = f64x2.add(sum, x);
      square = f64x2.add(square, f64x2.mul(x, x));
    }
    putGranule(
      granule,
      smaller(f64x2.extract_lane(low, 0), f64x2.extract_lane(low, 1)),
      larger(f64x2.extract_lane(high, 0), f64x2.extract_lane(high, 1)),
      f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1),
      <i32>(i64x2.extract_lane(zeroCount, 0) + i64x2.extract_lane(zeroCount, 1)),
    );
  }
  return f64x2.extract_lane(square, 0) + f64x2.extract_lane(square, 1);
}

function measureRest<T extends number>(samples: usize, granule: i32, frames: i32): void {
  let low = <f64>load<T>(samples);
  let high = low;
  let sum: f64 = 0;
  let count = 0;
  for (let i = 0; i < frames; i++) {
    const x = <f64>load<T>(samples + <usize>i * sizeof<T>());
    low = smaller(low, x);
    high = larger(high, x);
    sum += x;
    blockSquares += x * x;
    if (x == 0) count++;
  }
  putGranule(granule, low, high, sum, count);
}

function putGranule(granule: i32, low: f64, high: f64, sum: f64, zeroCount: i32): void {
  const at = (<usize>granule) << 3;
  store<f64>(lowest + at, low);
  store<f64>(highest + at, high);
  store<f64>(sums + at, sum);
  store<i32>(zeros + ((<usize>granule) << 2), zeroCount);
}
