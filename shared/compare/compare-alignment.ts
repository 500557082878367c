import type { Alignment } from './comparison.ts';
import { loudestColumns, outline } from './loudness-outline.ts';
import { sessionFormat } from './session-format.ts';
import type { ComparedTrack } from './match-candidates.ts';
import type { ReadFrames } from './verify-match.ts';

/** Onsets are followed in steps of this length, and may lie this many steps apart. */
const stepSeconds = 0.01;
const mostApartSteps = 4;

const windowSeconds = 2.5;
const windows = 2;
/** Tracks of full length that a shorter or longer one is held against. */
const mostReferences = 6;

/**
 * Whether a file of another length keeps time with the others when both begin together, and when
 * both end together: where only one of the two is true, that is where the file belongs. A few
 * seconds of the file and of some tracks of full length are read again. null where nothing can be
 * told because nothing sounds.
 */
export async function compareAlignment(
  track: ComparedTrack,
  references: readonly ComparedTrack[],
  sessionFrames: number,
  read: ReadFrames,
): Promise<Alignment | null> {
  const rateHz = track.format.sampleRateHz;
  const step = Math.round(stepSeconds * rateHz);
  const frames = Math.round(windowSeconds / stepSeconds) * step;
  const lackingFrames = sessionFrames - track.measures.frames;
  let weight = 0;
  let together = 0;
  let atEnd = 0;
  for (const start of placesToCompare(track, frames)) {
    const [own] = await read(track.path, start, frames);
    const onsets = onsetsOf(own ?? new Float32Array(), step);
    const energy = onsets.reduce((sum, onset) => sum + onset, 0);
    if (energy === 0) continue;
    const others = await Promise.all([
      onsetsTogether(references, start, frames, step, read),
      onsetsTogether(references, start + lackingFrames, frames, step, read),
    ]);
    weight += energy;
    together += energy * agreement(onsets, others[0]);
    atEnd += energy * agreement(onsets, others[1]);
  }
  if (weight === 0) return null;
  return {
    path: track.path,
    lackingFrames,
    agreementFromStart: Number((together / weight).toFixed(3)),
    agreementFromEnd: Number((atEnd / weight).toFixed(3)),
  };
}

/** More files than this are not looked into: where so many are shorter, ends were trimmed. */
const mostDoubtful = 8;

/**
 * Which files are worth the question: those that are shorter than the length at least half of all
 * have; and which tracks of that length they are held against.
 */
export function doubtfulStarts(tracks: readonly ComparedTrack[]): {
  doubtful: ComparedTrack[];
  references: ComparedTrack[];
  sessionFrames: number;
} {
  const session = sessionFormat(
    tracks.map(({ format }) => format),
    [],
    0,
  );
  const sessionFrames = session.frames ?? 0;
  const atRate = tracks.filter(({ format }) => format.sampleRateHz === session.sampleRateHz);
  const full = atRate.filter(({ measures }) => measures.frames === sessionFrames);
  const least = stepSeconds * (session.sampleRateHz ?? 0);
  const shorter = atRate.filter(({ measures }) => sessionFrames - measures.frames > least);
  const asks = session.tracksWithThatLength * 2 >= tracks.length && full.length >= 2;
  return {
    doubtful: asks ? shorter.slice(0, mostDoubtful) : [],
    references: asks ? alignmentReferences(full) : [],
    sessionFrames,
  };
}

/**
 * The tracks with the most to hold onto, one of each sound: half of them the most percussive of
 * those that can be heard, half of them the loudest.
 */
function alignmentReferences(tracks: readonly ComparedTrack[]): ComparedTrack[] {
  const known = new Set<string>();
  const audible = tracks
    .filter(({ measures }) => (measures.channels[0]?.peakDbfs ?? -Infinity) > -30)
    .filter(({ measures }) => !known.has(measures.audioHash) && known.add(measures.audioHash));
  const percussive = audible
    .toSorted((a, b) => crestDb(b) - crestDb(a))
    .slice(0, mostReferences / 2);
  const loud = audible
    .filter((track) => !percussive.includes(track))
    .sort((a, b) => loudnessDb(b) - loudnessDb(a));
  return [...percussive, ...loud].slice(0, mostReferences);
}

function loudnessDb({ measures }: ComparedTrack): number {
  return measures.channels[0]?.rmsDbfs ?? -Infinity;
}

function crestDb(track: ComparedTrack): number {
  return (track.measures.channels[0]?.peakDbfs ?? -Infinity) - loudnessDb(track);
}

function placesToCompare({ overview, measures }: ComparedTrack, frames: number): number[] {
  const lastStart = Math.max(0, measures.frames - frames);
  if (!overview) return [];
  const places = loudestColumns(outline(overview), windows).map((column) =>
    Math.round(
      Math.min(lastStart, Math.max(0, (column + 0.5) * overview.framesPerColumn - frames / 2)),
    ),
  );
  return [...new Set(places)];
}

/** How much louder each step is than the one before, in proportion: peaks where notes begin. */
function onsetsOf(samples: Float32Array, step: number): number[] {
  const onsets: number[] = [];
  let before = 0;
  for (let start = 0; start + step <= samples.length; start += step) {
    let energy = 0;
    for (let index = start; index < start + step; index += 1) energy += samples[index]! ** 2;
    const level = Math.sqrt(Math.sqrt(energy / step));
    onsets.push(start === 0 ? 0 : Math.max(0, level - before));
    before = level;
  }
  return onsets;
}

async function onsetsTogether(
  references: readonly ComparedTrack[],
  start: number,
  frames: number,
  step: number,
  read: ReadFrames,
): Promise<number[]> {
  const sum = Array.from({ length: Math.floor(frames / step) }, () => 0);
  const from = Math.max(0, start);
  for (const reference of references) {
    const [samples] = await read(reference.path, from, frames - (from - start));
    const onsets = onsetsOf(samples ?? new Float32Array(), step);
    const highest = Math.max(0, ...onsets);
    if (highest === 0) continue;
    const offset = Math.round((from - start) / step);
    onsets.forEach((onset, index) => {
      if (index + offset < sum.length) sum[index + offset] = sum[index + offset]! + onset / highest;
    });
  }
  return sum;
}

/** The best correlation within the few steps two players may lie apart. */
function agreement(own: readonly number[], others: readonly number[]): number {
  let best = 0;
  for (let apart = -mostApartSteps; apart <= mostApartSteps; apart += 1) {
    best = Math.max(best, correlation(own, others, apart));
  }
  return best;
}

function correlation(own: readonly number[], others: readonly number[], apart: number): number {
  const pairs: [number, number][] = [];
  own.forEach((value, index) => {
    const other = others[index + apart];
    if (other !== undefined) pairs.push([value, other]);
  });
  if (pairs.length === 0) return 0;
  const meanA = pairs.reduce((sum, [a]) => sum + a, 0) / pairs.length;
  const meanB = pairs.reduce((sum, [, b]) => sum + b, 0) / pairs.length;
  let product = 0;
  let squareA = 0;
  let squareB = 0;
  for (const [a, b] of pairs) {
    product += (a - meanA) * (b - meanB);
    squareA += (a - meanA) ** 2;
    squareB += (b - meanB) ** 2;
  }
  return squareA > 0 && squareB > 0 ? product / Math.sqrt(squareA * squareB) : 0;
}
