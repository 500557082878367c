import type { Match } from './comparison.ts';
import { slidingProducts } from './fft.ts';
import { loudestColumns, outline } from './loudness-outline.ts';
import { differentChannels, type ComparedTrack, type MatchCandidate } from './match-candidates.ts';

/**
 * Reads frames [startFrame, startFrame + frames) of a file as float samples (full scale 1), one
 * array a channel; shorter where the file ends earlier.
 */
export type ReadFrames = (
  path: string,
  startFrame: number,
  frames: number,
) => Promise<Float32Array[]>;

/** Frames compared closely at each place, and how many places. */
const windowFrames = 16_384;
const windows = 5;
/** How far around a likely shift the exact one is searched, frames. */
const leastSearchFrames = 4_096;
const mostSearchFrames = 65_536;

/** A difference less than this far down is no match of any kind. */
const leastDifferenceUnderDb = 20;
/** A difference of nothing at all, in dB: further down than any format reaches. */
const nothingLeftDb = 200;

/**
 * Verifies that the second file is the first but for gain, shift and polarity, on a few windows
 * of both: a few hundred thousand frames at most. null where it is not.
 */
export async function verifyMatch(
  { first, second, shifts }: MatchCandidate,
  read: ReadFrames,
): Promise<Match | null> {
  const [place, ...morePlaces] = placesToCompare(first);
  if (place === undefined) return null;
  const pattern = await read(first.path, place, windowFrames);
  const shift = await exactShift(pattern[0], place, second, shifts, read);
  if (shift === null) return null;

  const channels = differentChannels(first.measures);
  const sums = { own: 0, other: 0, product: 0 };
  for (const start of [place, ...morePlaces]) {
    // Where the second file does not reach, it has nothing to compare: the first has to be silent.
    const own = start === place ? pattern : await read(first.path, start, windowFrames);
    const other = await readAt(second, start + shift, own[0]?.length ?? 0, read);
    for (let channel = 0; channel < channels; channel += 1) {
      addProducts(sums, own[channel] ?? [], other[channel] ?? []);
    }
  }
  const { own, other, product } = sums;
  if (own === 0 || other === 0 || product === 0) return null;
  const gain = product / own;
  // What is left of the second once the first is taken out of it, over the second.
  const left = Math.max(0, 1 - (product * product) / (own * other));
  const under = Math.min(downBy(left), downBy(unseenDifference(first, second, gain)));
  if (under < leastDifferenceUnderDb) return null;
  return {
    first: first.path,
    second: second.path,
    gainDb: round(20 * Math.log10(Math.abs(gain)), 2),
    shiftFrames: shift,
    inverted: gain < 0,
    differenceUnderDb: round(under, 1),
  };
}

function downBy(share: number): number {
  return share > 0 ? Math.min(nothingLeftDb, -10 * Math.log10(share)) : nothingLeftDb;
}

/**
 * The windows show only a part. If the files also differ elsewhere, one of them cut or gated
 * there, their whole energies do not differ by just the gain. The share of energy that is amiss.
 */
function unseenDifference(first: ComparedTrack, second: ComparedTrack, gain: number): number {
  const expected = energyOf(first) * gain * gain;
  return Math.abs(energyOf(second) / expected - 1);
}

function energyOf({ measures }: ComparedTrack): number {
  const squares = measures.channels
    .slice(0, differentChannels(measures))
    .reduce((sum, { rmsDbfs }) => sum + (rmsDbfs === null ? 0 : 10 ** (rmsDbfs / 10)), 0);
  return squares * measures.frames;
}

/** The loudest places of the file, spread over its length, the loudest first. */
function placesToCompare({ overview, measures }: ComparedTrack): number[] {
  const lastStart = Math.max(0, measures.frames - windowFrames);
  if (overview) {
    const places = loudestColumns(outline(overview), windows).map((column) => {
      const middle = (column + 0.5) * overview.framesPerColumn;
      return Math.round(Math.min(lastStart, Math.max(0, middle - windowFrames / 2)));
    });
    if (places.length > 0) return [...new Set(places)];
  }
  const from = measures.channels[0]?.firstSoundFrame ?? 0;
  const to = measures.channels[0]?.lastSoundFrame ?? measures.frames;
  return [
    ...new Set(
      Array.from({ length: windows }, (_, index) =>
        Math.round(Math.min(lastStart, from + ((to - from) * index) / windows)),
      ),
    ),
  ];
}

/** Slides the first file's window along the second around each likely shift. */
async function exactShift(
  pattern: Float32Array | undefined,
  place: number,
  second: ComparedTrack,
  shifts: readonly number[],
  read: ReadFrames,
): Promise<number | null> {
  if (!pattern || pattern.length === 0) return null;
  const search = Math.min(
    mostSearchFrames,
    Math.max(leastSearchFrames, (second.overview?.framesPerColumn ?? 0) * 2),
  );
  const energy = sumOfSquares(pattern, 0, pattern.length);
  if (energy === 0) return null;
  const searched: number[] = [];
  for (const shift of shifts) {
    if (searched.some((other) => Math.abs(other - shift) <= search / 2)) continue;
    searched.push(shift);
    const start = place + shift - search;
    const [signal] = await readAt(second, start, pattern.length + 2 * search, read);
    if (!signal) continue;
    const best = bestPlace(signal, pattern, energy);
    if (best.agreement >= 1 - 10 ** (-leastDifferenceUnderDb / 10)) return best.at + start - place;
  }
  return null;
}

/**
 * Where the pattern agrees best with the signal, and its squared correlation there (0 to 1). Of
 * places that agree equally well, as those of a loop do, the one nearest to the middle.
 */
function bestPlace(
  signal: Float32Array,
  pattern: Float32Array,
  patternEnergy: number,
): { at: number; agreement: number } {
  const products = slidingProducts(signal, pattern);
  const agreements = new Float64Array(products.length);
  let signalEnergy = sumOfSquares(signal, 0, pattern.length);
  const quietest = patternEnergy * 1e-9;
  let highest = 0;
  for (let at = 0; at < products.length; at += 1) {
    if (signalEnergy > quietest) {
      agreements[at] = Math.min(1, products[at]! ** 2 / (signalEnergy * patternEnergy));
      highest = Math.max(highest, agreements[at]!);
    }
    signalEnergy += (signal[at + pattern.length] ?? 0) ** 2 - signal[at]! ** 2;
  }
  const equallyGood = 1 - (1 - highest) * 2 - 1e-9;
  const middle = (products.length - 1) / 2;
  let best = 0;
  for (let at = 0; at < products.length; at += 1) {
    if (agreements[at]! < equallyGood) continue;
    if (agreements[best]! < equallyGood || Math.abs(at - middle) < Math.abs(best - middle))
      best = at;
  }
  return { at: best, agreement: highest };
}

/** Reads at any place, also before the start and beyond the end, where there is silence. */
async function readAt(
  { path, measures }: ComparedTrack,
  startFrame: number,
  frames: number,
  read: ReadFrames,
): Promise<Float32Array[]> {
  const from = Math.max(0, startFrame);
  const to = Math.min(measures.frames, startFrame + frames);
  const there = to > from ? await read(path, from, to - from) : [];
  return measures.channels.map((_, channel) => {
    const whole = new Float32Array(frames);
    const samples = there[channel];
    if (samples) whole.set(samples, from - startFrame);
    return whole;
  });
}

function addProducts(
  sums: { own: number; other: number; product: number },
  own: ArrayLike<number>,
  other: ArrayLike<number>,
): void {
  for (let index = 0; index < own.length; index += 1) {
    const a = own[index]!;
    const b = other[index] ?? 0;
    sums.own += a * a;
    sums.other += b * b;
    sums.product += a * b;
  }
}

function sumOfSquares(samples: Float32Array, from: number, to: number): number {
  let sum = 0;
  for (let index = from; index < Math.min(to, samples.length); index += 1)
    sum += samples[index]! ** 2;
  return sum;
}

function round(value: number, digits: number): number {
  return Number(value.toFixed(digits));
}
