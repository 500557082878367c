/**
 * Bytes of a block in the order everything else expects: one channel behind the other, samples
 * little-endian, 8-bit samples unsigned, as a WAVE file of that channel alone would hold them.
 * All loops work on 16 bytes and may read and write up to 48 bytes behind the end.
 */

const swap2 = i8x16(1, 0, 3, 2, 5, 4, 7, 6, 9, 8, 11, 10, 13, 12, 15, 14);
const swap3 = i8x16(2, 1, 0, 5, 4, 3, 8, 7, 6, 11, 10, 9, 14, 13, 12, 15);
const swap4 = i8x16(3, 2, 1, 0, 7, 6, 5, 4, 11, 10, 9, 8, 15, 14, 13, 12);
const swap8 = i8x16(7, 6, 5, 4, 3, 2, 1, 0, 15, 14, 13, 12, 11, 10, 9, 8);

/** Bytes a loop may touch behind the end of what it was given. */
export const slackBytes: usize = 64;

/** Turns big-endian samples round. Five 24-bit samples fit into 16 bytes, the rest is repeated. */
export function swapBytes(from: usize, to: usize, bytes: usize, sampleBytes: usize): void {
  const end = from + bytes;
  if (sampleBytes == 3) {
    for (; from < end; from += 15, to += 15) v128.store(to, i8x16.swizzle(v128.load(from), swap3));
    return;
  }
  const order = sampleBytes == 2 ? swap2 : sampleBytes == 4 ? swap4 : swap8;
  for (; from < end; from += 16, to += 16) v128.store(to, i8x16.swizzle(v128.load(from), order));
}

/** Moves signed 8-bit samples (AIFF) to unsigned ones. */
export function offsetBytes(from: usize, to: usize, bytes: usize): void {
  const half = i8x16.splat(-128);
  for (const end = from + bytes; from < end; from += 16, to += 16) {
    v128.store(to, v128.xor(v128.load(from), half));
  }
}

/** Copies one channel of `frames` interleaved frames; `from` is that channel's first sample. */
export function takeChannel(
  from: usize,
  to: usize,
  frames: usize,
  sampleBytes: usize,
  channels: usize,
): void {
  const end = to + frames * sampleBytes;
  if (channels == 2 && sampleBytes == 4) takeSide32(from, to, end);
  else takeEveryNth(from, to, end, sampleBytes, channels);
}

function takeSide32(from: usize, to: usize, end: usize): void {
  for (; to < end; from += 32, to += 16) {
    const a = v128.load(from);
    const b = v128.load(from, 16);
    v128.store(to, v128.shuffle<i32>(a, b, 0, 2, 4, 6));
  }
}

/** One sample at a time. */
function takeEveryNth(
  from: usize,
  to: usize,
  end: usize,
  sampleBytes: usize,
  channels: usize,
): void {
  const step = sampleBytes * channels;
  if (sampleBytes == 3) {
    // A sample's fourth byte is overwritten by the next sample.
    for (; to < end; from += step, to += 3) store<u32>(to, load<u32>(from));
  } else if (sampleBytes == 2) {
    for (; to < end; from += step, to += 2) store<u16>(to, load<u16>(from));
  } else if (sampleBytes == 4) {
    for (; to < end; from += step, to += 4) store<u32>(to, load<u32>(from));
  } else if (sampleBytes == 8) {
    for (; to < end; from += step, to += 8) store<u64>(to, load<u64>(from));
  } else {
    for (; to < end; from += step, to += 1) store<u8>(to, load<u8>(from));
  }
}
