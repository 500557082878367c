import { AppError } from '../errors.ts';
import { compareAlignment, doubtfulStarts } from './compare-alignment.ts';
import { compareSides } from './compare-sides.ts';
import type { Alignment, Comparison, Match, Sides } from './comparison.ts';
import { matchCandidates, type ComparedTrack } from './match-candidates.ts';
import { pairSides } from './pair-sides.ts';
import { verifyMatch, type ReadFrames } from './verify-match.ts';

/** More pairs than this are not read again: a set with more of them is broken in another way. */
const mostPairs = 200;

/**
 * Compares measured files with each other by reading a little of a few of them again: the same
 * sound after gain, shift or turned upside down, left and right as two files, and whether a shorter
 * file keeps time with the others at their start or at their end. Pairs are
 * chosen by their measures, so the cost grows with what is found and not with the square of the
 * number of files. A file that cannot be read again is left out of the comparison.
 */
export async function compareTracks(
  tracks: readonly ComparedTrack[],
  read: ReadFrames,
  signal?: AbortSignal,
): Promise<Comparison> {
  const matches: Match[] = [];
  for (const candidate of matchCandidates(tracks).slice(0, mostPairs)) {
    signal?.throwIfAborted();
    const match = await unlessUnreadable(verifyMatch(candidate, read), signal);
    if (match) matches.push(match);
  }
  const sides: Sides[] = [];
  for (const [left, right] of pairSides(tracks).slice(0, mostPairs)) {
    signal?.throwIfAborted();
    const compared = await unlessUnreadable(compareSides(left, right, read), signal);
    if (compared) sides.push(compared);
  }
  const alignments: Alignment[] = [];
  const { doubtful, references, sessionFrames } = doubtfulStarts(tracks);
  for (const track of doubtful) {
    signal?.throwIfAborted();
    const comparing = compareAlignment(track, references, sessionFrames, read);
    const alignment = await unlessUnreadable(comparing, signal);
    if (alignment) alignments.push(alignment);
  }
  return { matches, sides, ...(alignments.length > 0 && { alignments }) };
}

/** Something gone from the disk since it was measured says nothing about two files. */
async function unlessUnreadable<Result>(
  reading: Promise<Result>,
  signal: AbortSignal | undefined,
): Promise<Result | null> {
  try {
    return await reading;
  } catch (error) {
    signal?.throwIfAborted();
    if (error instanceof AppError && error.code === 'no-access') return null;
    throw error;
  }
}
