import { chooseFramesPerColumn } from '../overview.ts';

/** Lowest and highest sample of each column, interleaved. */
export function drawOverview(samples: Float64Array): Float32Array {
  const step = chooseFramesPerColumn(samples.length);
  const columns = Math.ceil(samples.length / step);
  const overview = new Float32Array(2 * columns);
  for (let column = 0; column < columns; column++) {
    const part = samples.subarray(column * step, (column + 1) * step);
    overview[2 * column] = part.reduce((low, sample) => Math.min(low, sample), Infinity);
    overview[2 * column + 1] = part.reduce((high, sample) => Math.max(high, sample), -Infinity);
  }
  return overview;
}
