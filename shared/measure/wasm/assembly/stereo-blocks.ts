/**
 * Stereo of 16 and 24 bits, the bulk of all sessions: samples and canonical bytes of both sides
 * from one look at the frames. Like all loops here these may read and write up to 64 bytes
 * behind the end.
 */

/** Two frames of 24 bits: left, left, right, right as the upper three bytes of an i32. */
const widenFrames24 = i8x16(-1, 0, 1, 2, -1, 6, 7, 8, -1, 3, 4, 5, -1, 9, 10, 11);
/** And four such i32 of one side packed again. */
const pack24 = i8x16(1, 2, 3, 5, 6, 7, 9, 10, 11, 13, 14, 15, -1, -1, -1, -1);

export function decodeStereo24(
  from: usize,
  frames: usize,
  left: usize,
  right: usize,
  leftBytes: usize,
  rightBytes: usize,
): void {
  const scale = f32x4.splat(<f32>(1.0 / 2147483648));
  for (const end = from + frames * 6; from < end; from += 24) {
    const first = i8x16.swizzle(v128.load(from), widenFrames24);
    const second = i8x16.swizzle(v128.load(from, 12), widenFrames24);
    const leftIntegers = i64x2.shuffle(first, second, 0, 2);
    const rightIntegers = i64x2.shuffle(first, second, 1, 3);
    v128.store(left, f32x4.mul(f32x4.convert_i32x4_s(leftIntegers), scale));
    v128.store(right, f32x4.mul(f32x4.convert_i32x4_s(rightIntegers), scale));
    v128.store(leftBytes, i8x16.swizzle(leftIntegers, pack24));
    v128.store(rightBytes, i8x16.swizzle(rightIntegers, pack24));
    left += 16;
    right += 16;
    leftBytes += 12;
    rightBytes += 12;
  }
}

export function decodeStereo16(
  from: usize,
  frames: usize,
  left: usize,
  right: usize,
  leftBytes: usize,
  rightBytes: usize,
): void {
  const scale = f32x4.splat(<f32>(1.0 / 32768));
  for (const end = from + frames * 4; from < end; from += 32) {
    const first = v128.load(from);
    const second = v128.load(from, 16);
    const left1 = i32x4.shr_s(i32x4.shl(first, 16), 16);
    const left2 = i32x4.shr_s(i32x4.shl(second, 16), 16);
    const right1 = i32x4.shr_s(first, 16);
    const right2 = i32x4.shr_s(second, 16);
    v128.store(left, f32x4.mul(f32x4.convert_i32x4_s(left1), scale));
    v128.store(left, f32x4.mul(f32x4.convert_i32x4_s(left2), scale), 16);
    v128.store(right, f32x4.mul(f32x4.convert_i32x4_s(right1), scale));
    v128.store(right, f32x4.mul(f32x4.convert_i32x4_s(right2), scale), 16);
    v128.store(leftBytes, i16x8.narrow_i32x4_s(left1, left2));
    v128.store(rightBytes, i16x8.narrow_i32x4_s(right1, right2));
    left += 32;
    right += 32;
    leftBytes += 16;
    rightBytes += 16;
  }
}
