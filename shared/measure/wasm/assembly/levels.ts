import { granuleFrames, granulesPerBlock } from './block';

/**
 * The quick pass: per granule of 64 frames lowest and highest sample, sum, sum of squares and
 * number of exact zeros. Every other meter looks at these first and at samples only where it
 * must.
 */

export const lowest: usize = memory.data(8 * granulesPerBlock, 16);
export const highest: usize = memory.data(8 * granulesPerBlock, 16);
export const sums: usize = memory.data(8 * granulesPerBlock, 16);
export const squares: usize = memory.data(8 * granulesPerBlock, 16);
export const zeros: usize = memory.data(4 * granulesPerBlock, 16);

/** Fills the tables for `frames` samples; the last granule may be shorter. */
export function measureGranules<T extends number>(samples: usize, frames: i32): void {
  const whole = frames / granuleFrames;
  for (let granule = 0; granule < whole; granule++) {
    if (sizeof<T>() == 4) measureGranule32(samples, granule);
    else measureGranule64(samples, granule);
    samples += <usize>granuleFrames * sizeof<T>();
  }
  const rest = frames - whole * granuleFrames;
  if (rest > 0) measureRest<T>(samples, whole, rest);
}

function measureGranule32(samples: usize, granule: i32): void {
  const zero = f32x4.splat(0);
  let low = v128.load(samples);
  let high = low;
  let sum = f64x2.splat(0);
  let square = f64x2.splat(0);
  let zeroCount = i32x4.splat(0);
  const end = samples + <usize>granuleFrames * 4;
  for (let at = samples; at < end; at += 16) {
    const x = v128.load(at);
    low = f32x4.pmin(low, x);
    high = f32x4.pmax(high, x);
    zeroCount = i32x4.sub(zeroCount, f32x4.eq(x, zero));
    const first = f64x2.promote_low_f32x4(x);
    const second = f64x2.promote_low_f32x4(i32x4.shuffle(x, x, 2, 3, 2, 3));
    sum = f64x2.add(sum, f64x2.add(first, second));
    square = f64x2.add(square, f64x2.add(f64x2.mul(first, first), f64x2.mul(second, second)));
  }
  low = f32x4.pmin(low, i32x4.shuffle(low, low, 2, 3, 2, 3));
  low = f32x4.pmin(low, i32x4.shuffle(low, low, 1, 1, 1, 1));
  high = f32x4.pmax(high, i32x4.shuffle(high, high, 2, 3, 2, 3));
  high = f32x4.pmax(high, i32x4.shuffle(high, high, 1, 1, 1, 1));
  zeroCount = i32x4.add(zeroCount, i32x4.shuffle(zeroCount, zeroCount, 2, 3, 2, 3));
  const count = i32x4.extract_lane(zeroCount, 0) + i32x4.extract_lane(zeroCount, 1);
  put(
    granule,
    f32x4.extract_lane(low, 0),
    f32x4.extract_lane(high, 0),
    f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1),
    f64x2.extract_lane(square, 0) + f64x2.extract_lane(square, 1),
    count,
  );
}

function measureGranule64(samples: usize, granule: i32): void {
  const zero = f64x2.splat(0);
  let low = v128.load(samples);
  let high = low;
  let sum = f64x2.splat(0);
  let square = f64x2.splat(0);
  let zeroCount = i64x2.splat(0);
  const end = samples + <usize>granuleFrames * 8;
  for (let at = samples; at < end; at += 16) {
    const x = v128.load(at);
    low = f64x2.pmin(low, x);
    high = f64x2.pmax(high, x);
    zeroCount = i64x2.sub(zeroCount, f64x2.eq(x, zero));
    sum = f64x2.add(sum, x);
    square = f64x2.add(square, f64x2.mul(x, x));
  }
  put(
    granule,
    min(f64x2.extract_lane(low, 0), f64x2.extract_lane(low, 1)),
    max(f64x2.extract_lane(high, 0), f64x2.extract_lane(high, 1)),
    f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1),
    f64x2.extract_lane(square, 0) + f64x2.extract_lane(square, 1),
    <i32>(i64x2.extract_lane(zeroCount, 0) + i64x2.extract_lane(zeroCount, 1)),
  );
}

function measureRest<T extends number>(samples: usize, granule: i32, frames: i32): void {
  let low = <f64>load<T>(samples);
  let high = low;
  let sum: f64 = 0;
  let square: f64 = 0;
  let count = 0;
  for (let i = 0; i < frames; i++) {
    const x = <f64>load<T>(samples + <usize>i * sizeof<T>());
    low = min(low, x);
    high = max(high, x);
    sum += x;
    square += x * x;
    if (x == 0) count++;
  }
  put(granule, low, high, sum, square, count);
}

function put(granule: i32, low: f64, high: f64, sum: f64, square: f64, zeroCount: i32): void {
  const at = (<usize>granule) << 3;
  store<f64>(lowest + at, low);
  store<f64>(highest + at, high);
  store<f64>(sums + at, sum);
  store<f64>(squares + at, square);
  store<i32>(zeros + ((<usize>granule) << 2), zeroCount);
}
