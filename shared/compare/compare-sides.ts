import type { Sides } from './comparison.ts';
import { slidingProducts } from './fft.ts';
import { loudestColumns, outline } from './loudness-outline.ts';
import type { ComparedTrack } from './match-candidates.ts';
import type { ReadFrames } from './verify-match.ts';

/** The sides of one stereo recording reach the microphones within this time. */
const mostDelaySeconds = 0.01;
/** Loudness is followed in steps of this length: far shorter than two players can agree. */
const loudnessStepSeconds = 0.005;

const windowSeconds = 2;
const windows = 3;

/**
 * How alike two mono files are that are called left and right: read in their three loudest
 * stretches of two seconds. null where nothing sounds there.
 */
export async function compareSides(
  left: ComparedTrack,
  right: ComparedTrack,
  read: ReadFrames,
): Promise<Sides | null> {
  const rateHz = left.format.sampleRateHz;
  const frames = Math.round(windowSeconds * rateHz);
  const step = Math.max(1, Math.round(loudnessStepSeconds * rateHz));
  const mostDelay = Math.round(mostDelaySeconds * rateHz);
  const loudnessLeft: number[] = [];
  const loudnessRight: number[] = [];
  let weighted = 0;
  let weight = 0;
  for (const start of placesToCompare(left, frames)) {
    const [a] = await read(left.path, start, frames);
    const [b] = await read(right.path, start, frames);
    if (!a || !b || a.length !== b.length || a.length <= 2 * mostDelay) continue;
    const energy = energyOf(a) + energyOf(b);
    weighted += energy * largestCorrelation(a, b, mostDelay);
    weight += energy;
    loudnessLeft.push(...loudness(a, step));
    loudnessRight.push(...loudness(b, step));
  }
  if (weight === 0) return null;
  return {
    left: left.path,
    right: right.path,
    correlation: Number((weighted / weight).toFixed(3)),
    loudnessCorrelation: Number(correlationOf(loudnessLeft, loudnessRight).toFixed(3)),
  };
}

function placesToCompare({ overview, measures }: ComparedTrack, frames: number): number[] {
  const lastStart = Math.max(0, measures.frames - frames);
  if (!overview) return [Math.round(lastStart / 3), Math.round((lastStart * 2) / 3)];
  return loudestColumns(outline(overview), windows).map((column) =>
    Math.round(
      Math.min(lastStart, Math.max(0, (column + 0.5) * overview.framesPerColumn - frames / 2)),
    ),
  );
}

/** Largest correlation, 0 to 1 whatever its sign, within some frames of delay either way. */
function largestCorrelation(a: Float32Array, b: Float32Array, mostDelay: number): number {
  const pattern = a.subarray(mostDelay, a.length - mostDelay);
  const products = slidingProducts(b, pattern);
  const energy = Math.sqrt(energyOf(pattern) * energyOf(b));
  if (energy === 0) return 0;
  let largest = 0;
  for (const product of products) largest = Math.max(largest, Math.abs(product));
  return Math.min(1, largest / energy);
}

/** Root mean square of each step. */
function loudness(samples: Float32Array, step: number): number[] {
  const steps: number[] = [];
  for (let start = 0; start + step <= samples.length; start += step)
    steps.push(Math.sqrt(energyOf(samples.subarray(start, start + step)) / step));
  return steps;
}

function correlationOf(a: readonly number[], b: readonly number[]): number {
  const meanA = a.reduce((sum, value) => sum + value, 0) / a.length;
  const meanB = b.reduce((sum, value) => sum + value, 0) / b.length;
  let product = 0;
  let squareA = 0;
  let squareB = 0;
  for (let index = 0; index < a.length; index += 1) {
    const deviationA = a[index]! - meanA;
    const deviationB = b[index]! - meanB;
    product += deviationA * deviationB;
    squareA += deviationA * deviationA;
    squareB += deviationB * deviationB;
  }
  return squareA > 0 && squareB > 0 ? product / Math.sqrt(squareA * squareB) : 0;
}

function energyOf(samples: Float32Array): number {
  let sum = 0;
  for (const sample of samples) sum += sample * sample;
  return sum;
}
