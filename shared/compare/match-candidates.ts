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
  const prints = tracks.flatMap((track, order) => {
    const print = fingerprint(track);
    return print === null ? [] : [{ track, order, ...print }];
  });
  prints.sort((a, b) => a.kind.localeCompare(b.kind) || a.crestDb - b.crestDb || a.order - b.order);
  const outlines = new Map<string, Outline>();
  const candidates: (MatchCandidate & { orders: [number, number] })[] = [];
  prints.forEach((print, index) => {
    for (let next = index + 1; next < prints.length; next += 1) {
      const other = prints[next];
      if (!other || other.kind !== print.kind) break;
      if (other.crestDb - print.crestDb > crestToleranceDb) break;
      if (sameHash(print.track, other.track)) continue;
      const [a, b] = print.order < other.order ? [print, other] : [other, print];
      const shifts = likelyShifts(a.track, b.track, outlines);
      if (shifts)
        candidates.push({ first: a.track, second: b.track, shifts, orders: [a.order, b.order] });
    }
  });
  return candidates
    .sort((a, b) => a.orders[0] - b.orders[0] || a.orders[1] - b.orders[1])
    .map(({ first, second, shifts }) => ({ first, second, shifts }));
}

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

/**
 * Where the second may have the sound of the first: at the same place, where its first or last
 * sound is, or where the outlines agree best. null: the outlines show different sounds.
 */
function likelyShifts(
  first: ComparedTrack,
  second: ComparedTrack,
  outlines: Map<string, Outline>,
): number[] | null {
  const shifts = [0];
  if (first.overview && second.overview) {
    const width = Math.max(first.overview.framesPerColumn, second.overview.framesPerColumn);
    const outlineOf = (track: ComparedTrack, overview: Overview): Outline => {
      const key = `${width} ${track.path}`;
      const known = outlines.get(key);
      if (known) return known;
      const peaks = coarserOutline(outline(overview), overview.framesPerColumn, width);
      const made = { peaks, sorted: peaks.slice().sort().reverse() };
      outlines.set(key, made);
      return made;
    };
    const a = outlineOf(first, first.overview);
    const b = outlineOf(second, second.overview);
    if (Math.min(highest(a.peaks), highest(b.peaks)) >= outlinePeakNeeded) {
      if (likeness(a.sorted, b.sorted) < sortedCorrelation) return null;
      const { columns, correlation } = bestShift(a.peaks, b.peaks);
      if (correlation < outlineCorrelation) return null;
      shifts.push(columns * width);
    }
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

function highest(values: Float64Array): number {
  return values.reduce((most, value) => Math.max(most, value), 0);
}
