import type { Measures } from '../measure/measures.ts';
import type { Overview } from '../measure/overview.ts';
import type { TrackFormat } from '../wave/track-format.ts';
import { bestShift, coarserOutline, outline } from './loudness-outline.ts';

/** A measured file as the comparison sees it. The overview lets a pair be refused without a read. */
export type ComparedTrack = {
  path: string;
  format: TrackFormat;
  measures: Measures;
  overview: Overview | null;
};

/** Two files that may carry the same sound, and where in the second to look for it. */
export type MatchCandidate = {
  first: ComparedTrack;
  second: ComparedTrack;
  /** How much later the second may have it, frames; the likeliest first. */
  shifts: number[];
};

/**
 * Peak over total energy does not change with gain, shift, polarity or silence around the sound.
 * The same sound agrees in it to a hundredth of a dB; the slack is for dither and rounding.
 */
const crestToleranceDb = 0.15;

/** Outlines in steps of 1/127 of full scale say nothing about anything quieter than this. */
const outlinePeakNeeded = 8;

/** The same sound agrees this well in outline, but for the steps of the overview. */
const outlineCorrelation = 0.9;

/**
 * Put in order of loudness, the columns of the same sound agree this well wherever it stands: so
 * most pairs are refused before anything is slid along anything.
 */
const sortedCorrelation = 0.99;

/**
 * Bounds for sets of hundreds of files that all look alike, such as noise: real sessions stay far
 * below. A file is held against its nearest neighbours by fingerprint, and of the pairs that
 * remain those nearest to each other are slid along each other. A copy is among the first of both.
 */
const mostNeighbours = 100;
const mostSlides = 1000;

/** The loudest sample of each column, in time and in order of loudness. */
type Outline = { peaks: Float64Array; sorted: Float64Array };

/** Below this a file counts as silent here: nothing could be verified in it. */
const quietestPeakDbfs = -80;

/**
 * Finds the few pairs worth reading again among all pairs, without reading: files are sorted by
 * their fingerprint, so that only neighbours are looked at. Pairs that are equal bit for bit are
 * left out, because their hashes already say so.
 */
export function matchCandidates(tracks: readonly ComparedTrack[]): MatchCandidate[] {
  const prints: Print[] = tracks.flatMap((track, order) => {
    const print = fingerprint(track);
    return print === null ? [] : [{ track, order, ...print }];
  });
  prints.sort((a, b) => a.kind.localeCompare(b.kind) || a.crestDb - b.crestDb || a.order - b.order);
  const outlines = createOutlines();
  const alike: { pair: [Print, Print]; apartDb: number }[] = [];
  prints.forEach((print, index) => {
    for (const other of prints.slice(index + 1, index + 1 + mostNeighbours)) {
      const apartDb = other.crestDb - print.crestDb;
      if (other.kind !== print.kind || apartDb > crestToleranceDb) break;
      if (sameHash(print.track, other.track)) continue;
      const pair: [Print, Print] = print.order < other.order ? [print, other] : [other, print];
      if (outlines.mayMatch(pair[0].track, pair[1].track)) alike.push({ pair, apartDb });
    }
  });
  return alike
    .sort((a, b) => a.apartDb - b.apartDb)
    .slice(0, mostSlides)
    .map(({ pair }) => pair)
    .sort(([a, b], [c, d]) => a.order - c.order || b.order - d.order)
    .flatMap(([{ track: first }, { track: second }]) => {
      const shifts = likelyShifts(first, second, outlines);
      return shifts ? [{ first, second, shifts }] : [];
    });
}

type Print = { track: ComparedTrack; order: number; kind: string; crestDb: number };

function fingerprint({
  format,
  measures,
}: ComparedTrack): { kind: string; crestDb: number } | null {
  const [channel] = measures.channels;
  if (!channel || channel.peakDbfs === null || channel.rmsDbfs === null) return null;
  if (channel.peakDbfs < quietestPeakDbfs || measures.frames === 0) return null;
  return {
    kind: `${format.sampleRateHz} ${differentChannels(measures)}`,
    crestDb: channel.peakDbfs - (channel.rmsDbfs + 10 * Math.log10(measures.frames)),
  };
}

/** A stereo file with the same on both sides is a mono sound. */
export function differentChannels({ channels, channelHashes }: Measures): number {
  return channelHashes.length > 0 && channelHashes.every((hash) => hash === channelHashes[0])
    ? 1
    : channels.length;
}

function sameHash(a: ComparedTrack, b: ComparedTrack): boolean {
  const count = differentChannels(a.measures);
  return a.measures.channelHashes
    .slice(0, count)
    .every((hash, channel) => hash === b.measures.channelHashes[channel]);
}

/** Both outlines at the coarser resolution of the two, where they can tell anything. */
type OutlinePair = { a: Outline; b: Outline; width: number };

type Outlines = {
  /** null: too quiet, or no overview, to say anything. */
  pair(first: ComparedTrack, second: ComparedTrack): OutlinePair | null;
  /** Whether the outlines could be of the same sound, wherever it stands in the files. */
  mayMatch(first: ComparedTrack, second: ComparedTrack): boolean;
};

function createOutlines(): Outlines {
  const known = new Map<string, Outline>();
  const outlineOf = (path: string, overview: Overview, width: number): Outline => {
    const key = `${width} ${path}`;
    const made = known.get(key);
    if (made) return made;
    const peaks = coarserOutline(outline(overview), overview.framesPerColumn, width);
    const fresh = { peaks, sorted: peaks.slice().sort().reverse() };
    known.set(key, fresh);
    return fresh;
  };
  const pair = (first: ComparedTrack, second: ComparedTrack): OutlinePair | null => {
    if (!first.overview || !second.overview) return null;
    const width = Math.max(first.overview.framesPerColumn, second.overview.framesPerColumn);
    const a = outlineOf(first.path, first.overview, width);
    const b = outlineOf(second.path, second.overview, width);
    // Put in order of loudness, the first column is the highest.
    const quieter = Math.min(a.sorted[0] ?? 0, b.sorted[0] ?? 0);
    return quieter >= outlinePeakNeeded ? { a, b, width } : null;
  };
  return {
    pair,
    mayMatch(first, second) {
      const both = pair(first, second);
      return both === null || likeness(both.a.sorted, both.b.sorted) >= sortedCorrelation;
    },
  };
}

/**
 * Where the second may have the sound of the first: at the same place, where its first or last
 * sound is, or where the outlines agree best. null: the outlines show different sounds.
 */
function likelyShifts(
  first: ComparedTrack,
  second: ComparedTrack,
  outlines: Outlines,
): number[] | null {
  const shifts = [0];
  const both = outlines.pair(first, second);
  if (both) {
    const { columns, correlation } = bestShift(both.a.peaks, both.b.peaks);
    if (correlation < outlineCorrelation) return null;
    shifts.push(columns * both.width);
  }
  const [from, to] = [first.measures.channels[0], second.measures.channels[0]];
  if (from && to && from.firstSoundFrame !== null && to.firstSoundFrame !== null)
    shifts.push(to.firstSoundFrame - from.firstSoundFrame);
  if (from && to && from.lastSoundFrame !== null && to.lastSoundFrame !== null)
    shifts.push(to.lastSoundFrame - from.lastSoundFrame);
  return [...new Set(shifts)];
}

/** Correlation of two outlines column by column; the longer one may end in silence. */
function likeness(a: Float64Array, b: Float64Array): number {
  let product = 0;
  let squareA = 0;
  let squareB = 0;
  for (let column = 0; column < Math.max(a.length, b.length); column += 1) {
    const [own, other] = [a[column] ?? 0, b[column] ?? 0];
    product += own * other;
    squareA += own * own;
    squareB += other * other;
  }
  return product / Math.sqrt(squareA * squareB);
}
