/**
 * Canonical bytes to samples with full scale = 1. PCM up to 24 bits and 32-bit float become f32,
 * 32-bit PCM and 64-bit float become f64: no sample is rounded.
 */

export const enum Kind {
  pcm8 = 0,
  pcm16 = 1,
  pcm24 = 2,
  pcm32 = 3,
  float32 = 4,
  float64 = 5,
}

const widen24 = i8x16(-1, 0, 1, 2, -1, 3, 4, 5, -1, 6, 7, 8, -1, 9, 10, 11);

/** Returns whether all samples were numbers; NaN and infinity become 0. */
export function decode(kind: Kind, from: usize, to: usize, frames: usize): bool {
  switch (kind) {
    case Kind.pcm8: {
      decode8(from, to, frames);
      return true;
    }
    case Kind.pcm16: {
      decode16(from, to, frames);
      return true;
    }
    case Kind.pcm24: {
      decode24(from, to, frames);
      return true;
    }
    case Kind.pcm32: {
      decode32(from, to, frames);
      return true;
    }
    case Kind.float32:
      return decodeFloat<f32>(from, to, frames);
    default:
      return decodeFloat<f64>(from, to, frames);
  }
}

function decode8(from: usize, to: usize, frames: usize): void {
  for (const end = from + frames; from < end; from++, to += 4) {
    store<f32>(to, <f32>(<i32>load<u8>(from) - 128) * <f32>(1.0 / 128));
  }
}

function decode16(from: usize, to: usize, frames: usize): void {
  const scale = f32x4.splat(<f32>(1.0 / 32768));
  for (const end = from + (frames << 1); from < end; from += 8, to += 16) {
    const integers = v128.load_ext<i16>(from);
    v128.store(to, f32x4.mul(f32x4.convert_i32x4_s(integers), scale));
  }
}

/** Three bytes become the upper three of an i32: its sign is right without a shift. */
function decode24(from: usize, to: usize, frames: usize): void {
  const scale = f32x4.splat(<f32>(1.0 / 2147483648));
  for (const end = from + frames * 3; from < end; from += 12, to += 16) {
    const integers = i8x16.swizzle(v128.load(from), widen24);
    v128.store(to, f32x4.mul(f32x4.convert_i32x4_s(integers), scale));
  }
}

function decode32(from: usize, to: usize, frames: usize): void {
  const scale = f64x2.splat(1.0 / 2147483648);
  for (const end = from + (frames << 2); from < end; from += 8, to += 16) {
    const integers = v128.load64_zero(from);
    v128.store(to, f64x2.mul(f64x2.convert_low_i32x4_s(integers), scale));
  }
}

function decodeFloat<T extends number>(from: usize, to: usize, frames: usize): bool {
  const zero = v128.splat<T>(<T>0);
  let allFinite = v128.splat<i8>(-1);
  for (const end = to + frames * sizeof<T>(); to < end; from += 16, to += 16) {
    const samples = v128.load(from);
    const finite = v128.eq<T>(v128.sub<T>(samples, samples), zero);
    allFinite = v128.and(allFinite, finite);
    v128.store(to, v128.and(samples, finite));
  }
  return v128.all_true<i32>(allFinite);
}
