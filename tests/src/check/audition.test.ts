import { expect, it } from 'vitest';
import { auditionGain } from '../../../src/check/audition.ts';

/** -12 dBFS as a part of full scale: 10^(-12/20), by arithmetic. */
const limit = 0.251_188_643;

it('brings whatever is loud down to -12 dBFS', () => {
  for (const peak of [0.26, 1, 1.5, 40]) {
    const channels = [Float32Array.of(0, 0.01), Float32Array.of(-peak, 0.2)];
    expect(auditionGain(channels) * peak).toBeCloseTo(limit, 6);
  }
});

it('never turns anything up', () => {
  expect(auditionGain([Float32Array.of(0.001, -0.2)])).toBe(1);
  expect(auditionGain([new Float32Array(10)])).toBe(1);
  expect(auditionGain([])).toBe(1);
});

it('is not led astray by what is no number', () => {
  const broken = Float32Array.of(NaN, Infinity, -Infinity, 0.5);
  expect(auditionGain([broken]) * 0.5).toBeCloseTo(limit, 6);
});
