import { Channel } from './channel';

/** Sum of the products of two channels' samples over one block. */
export function sumProducts<T extends number>(one: Channel, other: Channel, frames: i32): f64 {
  const whole = frames & ~3;
  const end = <usize>whole * sizeof<T>();
  let sum = f64x2.splat(0);
  for (let at: usize = 0; at < end; at += 16) {
    const a = v128.load(one.samples + at);
    const b = v128.load(other.samples + at);
    if (sizeof<T>() == 8) {
      sum = f64x2.add(sum, f64x2.mul(a, b));
    } else {
      const upperA = i32x4.shuffle(a, a, 2, 3, 2, 3);
      const upperB = i32x4.shuffle(b, b, 2, 3, 2, 3);
      const low = f64x2.mul(f64x2.promote_low_f32x4(a), f64x2.promote_low_f32x4(b));
      const high = f64x2.mul(f64x2.promote_low_f32x4(upperA), f64x2.promote_low_f32x4(upperB));
      sum = f64x2.add(sum, f64x2.add(low, high));
    }
  }
  let total = f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
  for (let i = whole; i < frames; i++) {
    const at = <usize>i * sizeof<T>();
    total += <f64>load<T>(one.samples + at) * <f64>load<T>(other.samples + at);
  }
  return total;
}
