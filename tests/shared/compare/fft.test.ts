import { describe, expect, it } from 'vitest';
import { fft, slidingProducts } from '#shared/compare/fft.ts';

describe('fft', () => {
  // Definition of the discrete Fourier transform, summed term by term.
  it('equals the sum that defines it, and its inverse undoes it', () => {
    const size = 16;
    const real = Float64Array.from({ length: size }, (_, n) => Math.sin(n * n) + (n % 3));
    const imaginary = Float64Array.from({ length: size }, (_, n) => Math.cos(3 * n));
    const expected = Array.from({ length: size }, (_, k) => {
      let re = 0;
      let im = 0;
      for (let n = 0; n < size; n += 1) {
        const angle = (-2 * Math.PI * k * n) / size;
        re += real[n]! * Math.cos(angle) - imaginary[n]! * Math.sin(angle);
        im += real[n]! * Math.sin(angle) + imaginary[n]! * Math.cos(angle);
      }
      return { re, im };
    });
    const [re, im] = [real.slice(), imaginary.slice()];
    fft(re, im);
    expected.forEach((value, k) => {
      expect(re[k]).toBeCloseTo(value.re, 10);
      expect(im[k]).toBeCloseTo(value.im, 10);
    });
    fft(re, im, true);
    re.forEach((value, n) => expect(value).toBeCloseTo(real[n]!, 12));
    im.forEach((value, n) => expect(value).toBeCloseTo(imaginary[n]!, 12));
  });

  it('refuses lengths it cannot transform', () => {
    expect(() => fft(new Float64Array(12), new Float64Array(12))).toThrow(RangeError);
    expect(() => fft(new Float64Array(8), new Float64Array(4))).toThrow(RangeError);
  });
});

describe('slidingProducts', () => {
  it('equals sums of products place by place', () => {
    const signal = Array.from({ length: 37 }, (_, n) => Math.sin(1.3 * n) * n);
    const pattern = Array.from({ length: 9 }, (_, n) => Math.cos(0.7 * n) - 0.2);
    const products = slidingProducts(signal, pattern);
    expect(products).toHaveLength(29);
    products.forEach((product, place) => {
      const sum = pattern.reduce((total, value, n) => total + value * signal[place + n]!, 0);
      expect(product).toBeCloseTo(sum, 9);
    });
  });
});
