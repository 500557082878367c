import { AppError } from '../errors.ts';
import { compareSides } from './compare-sides.ts';
import type { Comparison, Match, Sides } from './comparison.ts';
import { matchCandidates, type ComparedTrack } from './match-candidates.ts';
import { pairSides } from './pair-sides.ts';
import { verifyMatch, type ReadFrames } from './verify-match.ts';

/** More pairs than this are not read again: a set with more of them is broken in another way. */
const mostPairs = 200;

/**
 * Compares measured files with each other by reading a little of a few of them again: the same
 * sound after gain, shift or turned upside down, and left and right as two files. Pairs are
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
  return { matches, sides };
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
