import type { Overview } from '../measure/overview.ts';
import { slidingProducts } from './fft.ts';

/** Loudest sample of each column of an overview over all channels, 0 to 127. */
export function outline({ channels }: Overview): Float64Array {
  const columns = Math.max(0, ...channels.map((channel) => channel.length / 2));
  const peaks = new Float64Array(columns);
  for (const channel of channels) {
    for (let column = 0; column < channel.length / 2; column += 1) {
      const peak = Math.max(Math.abs(channel[2 * column]!), Math.abs(channel[2 * column + 1]!));
      if (peak > peaks[column]!) peaks[column] = peak;
    }
  }
  return peaks;
}

/** An outline at another column width, at least as wide as its own: the loudest of what falls in. */
export function coarserOutline(
  peaks: Float64Array,
  framesPerColumn: number,
  newFramesPerColumn: number,
): Float64Array {
  if (framesPerColumn === newFramesPerColumn) return peaks;
  const coarser = new Float64Array(
    Math.ceil((peaks.length * framesPerColumn) / newFramesPerColumn),
  );
  for (let column = 0; column < peaks.length; column += 1) {
    const into = Math.floor((column * framesPerColumn) / newFramesPerColumn);
    if (peaks[column]! > coarser[into]!) coarser[into] = peaks[column]!;
  }
  return coarser;
}

/**
 * The shift, in columns, at which two outlines agree best, and how well (-1 to 1). A positive
 * shift: the second has it later.
 */
export function bestShift(
  first: Float64Array,
  second: Float64Array,
): { columns: number; correlation: number } {
  const padded = new Float64Array(first.length * 2 + second.length);
  padded.set(second, first.length);
  const products = slidingProducts(padded, first);
  let best = 0;
  for (let place = 1; place < products.length; place += 1) {
    if (products[place]! > products[best]!) best = place;
  }
  const energy = Math.sqrt(sumOfSquares(first) * sumOfSquares(second));
  return {
    columns: best - first.length,
    correlation: energy > 0 ? products[best]! / energy : 0,
  };
}

/**
 * Where to look closely: the loudest column of each of `parts` equal parts of an outline, the
 * loudest first. Columns in which nothing can be seen are left out.
 */
export function loudestColumns(peaks: Float64Array, parts: number): number[] {
  const places: number[] = [];
  for (let part = 0; part < parts; part += 1) {
    const from = Math.floor((part * peaks.length) / parts);
    const to = Math.floor(((part + 1) * peaks.length) / parts);
    let loudest = from;
    for (let column = from; column < to; column += 1) {
      if (peaks[column]! > peaks[loudest]!) loudest = column;
    }
    if ((peaks[loudest] ?? 0) > 0) places.push(loudest);
  }
  return places.sort((a, b) => peaks[b]! - peaks[a]!);
}

function sumOfSquares(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value * value;
  return sum;
}
