/**
 * Complex fast Fourier transform in place, radix 2 (Cooley and Tukey 1965). `real` and
 * `imaginary` have the same length, a power of two. The inverse is scaled by 1 / length.
 */
export function fft(real: Float64Array, imaginary: Float64Array, inverse = false): void {
  const size = real.length;
  if (size !== imaginary.length || (size & (size - 1)) !== 0)
    throw new RangeError('An FFT needs two arrays of one length that is a power of two');
  reorderByReversedBits(real, imaginary);
  const { cosines, sines } = rotations(size);
  const direction = inverse ? 1 : -1;
  for (let half = 1; half < size; half *= 2) {
    const step = size / (2 * half);
    for (let position = 0; position < half; position += 1) {
      const cos = cosines[position * step]!;
      const sin = direction * sines[position * step]!;
      for (let low = position; low < size; low += 2 * half) {
        const high = low + half;
        const re = real[high]! * cos - imaginary[high]! * sin;
        const im = real[high]! * sin + imaginary[high]! * cos;
        real[high] = real[low]! - re;
        imaginary[high] = imaginary[low]! - im;
        real[low] = real[low]! + re;
        imaginary[low] = imaginary[low]! + im;
      }
    }
  }
  if (!inverse) return;
  for (let index = 0; index < size; index += 1) {
    real[index] = real[index]! / size;
    imaginary[index] = imaginary[index]! / size;
  }
}

type Rotations = { cosines: Float64Array; sines: Float64Array };
const known = new Map<number, Rotations>();

/** Cosines and sines of half a turn in size / 2 steps; the same few sizes come again and again. */
function rotations(size: number): Rotations {
  const before = known.get(size);
  if (before) return before;
  const cosines = Float64Array.from({ length: size / 2 }, (_, step) =>
    Math.cos((2 * Math.PI * step) / size),
  );
  const sines = Float64Array.from({ length: size / 2 }, (_, step) =>
    Math.sin((2 * Math.PI * step) / size),
  );
  const made = { cosines, sines };
  known.set(size, made);
  return made;
}

function reorderByReversedBits(real: Float64Array, imaginary: Float64Array): void {
  const size = real.length;
  let reversed = 0;
  for (let index = 1; index < size; index += 1) {
    let bit = size >> 1;
    while (reversed & bit) {
      reversed ^= bit;
      bit >>= 1;
    }
    reversed |= bit;
    if (index >= reversed) continue;
    [real[index], real[reversed]] = [real[reversed]!, real[index]!];
    [imaginary[index], imaginary[reversed]] = [imaginary[reversed]!, imaginary[index]!];
  }
}

/**
 * Slides `pattern` along `signal` and returns, for each of the `signal.length - pattern.length + 1`
 * places, the sum of their products there. The signal must not be shorter than the pattern.
 */
export function slidingProducts(
  signal: ArrayLike<number>,
  pattern: ArrayLike<number>,
): Float64Array {
  let size = 1;
  while (size < signal.length) size *= 2;
  // Both are real, so one transform takes the signal as real and the pattern as imaginary part.
  const real = new Float64Array(size);
  const imaginary = new Float64Array(size);
  for (let index = 0; index < signal.length; index += 1) real[index] = signal[index]!;
  for (let index = 0; index < pattern.length; index += 1) imaginary[index] = pattern[index]!;
  fft(real, imaginary);
  const productReal = new Float64Array(size);
  const productImaginary = new Float64Array(size);
  for (let index = 0; index < size; index += 1) {
    const mirror = (size - index) % size;
    const signalRe = (real[index]! + real[mirror]!) / 2;
    const signalIm = (imaginary[index]! - imaginary[mirror]!) / 2;
    const patternRe = (imaginary[index]! + imaginary[mirror]!) / 2;
    const patternIm = (real[mirror]! - real[index]!) / 2;
    productReal[index] = signalRe * patternRe + signalIm * patternIm;
    productImaginary[index] = signalIm * patternRe - signalRe * patternIm;
  }
  fft(productReal, productImaginary, true);
  return productReal.subarray(0, signal.length - pattern.length + 1);
}
