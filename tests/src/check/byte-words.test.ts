import { expect, it } from 'vitest';
import { byteWords } from '../../../src/check/byte-words.ts';

it.each([
  [0, '0 bytes'],
  [999, '999 bytes'],
  [1_000, '1.0 kB'],
  [1_450_000, '1.4 MB'],
  [612_300_000, '612 MB'],
  [3_849_000_000, '3.8 GB'],
  [20_000_000_000, '20 GB'],
  [5_000_000_000_000_000, '5000 TB'],
])('%d is %s', (bytes, words) => {
  // 1.45 in binary lies a little below, so it is rounded down.
  expect(byteWords(bytes)).toBe(words);
});
