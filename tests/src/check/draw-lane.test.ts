import { expect, it } from 'vitest';
import { overviewPeaks, samplePeaks } from '../../../src/check/draw-lane.ts';

it('draws all channels of an overview over each other, full scale as 1', () => {
  const overview = {
    framesPerColumn: 480,
    channels: [Int8Array.of(-127, 10, -5, 0), Int8Array.of(-20, 127, -64, 0)],
  };
  const peaks = overviewPeaks(overview, 48_000);
  expect(peaks).toMatchObject({ startSeconds: 0, secondsPerColumn: 0.01 });
  expect([...peaks.low]).toEqual([-1, Math.fround(-64 / 127)]);
  expect([...peaks.high]).toEqual([1, 0]);
});

it('puts samples together to no more columns than asked for, and loses no peak', () => {
  const samples = new Float32Array(1000);
  samples[0] = 0.5;
  samples[499] = -0.75;
  samples[999] = 0.25;
  const peaks = samplePeaks([samples, new Float32Array(1000)], 48_000, 48_000, 300);
  // 1000 frames in columns of 4, since 3 would need 334 of them.
  expect(peaks.low).toHaveLength(250);
  expect(peaks).toMatchObject({ startSeconds: 1, secondsPerColumn: 4 / 48_000 });
  expect(peaks.high[0]).toBe(0.5);
  expect(peaks.low[124]).toBe(-0.75);
  expect(peaks.high[249]).toBe(0.25);
});

it('draws nothing of a file without channels', () => {
  expect(samplePeaks([], 0, 48_000, 300).low).toHaveLength(0);
  expect(overviewPeaks({ framesPerColumn: 1, channels: [] }, 48_000).low).toHaveLength(0);
});
