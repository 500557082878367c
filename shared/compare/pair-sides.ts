import type { ComparedTrack } from './match-candidates.ts';

/** A word for a side, standing apart or at the very end behind a separator. */
const sideWord = /(^|[\s._\-(])(left|right|lft|rgt|l|r)(?=$|[\s._\-)])/gi;

/**
 * Mono files of one length and rate whose names differ in nothing but the word for left and
 * right, and stand in the same folder. Whether they really are two sides, their sound has to say.
 */
export function pairSides(
  tracks: readonly ComparedTrack[],
): [left: ComparedTrack, right: ComparedTrack][] {
  const sides = new Map<string, { left?: ComparedTrack; right?: ComparedTrack }>();
  for (const track of tracks) {
    if (track.format.channels !== 1) continue;
    const side = sideOf(track.path);
    if (!side) continue;
    const key = `${side.rest} ${track.format.sampleRateHz} ${track.format.frames}`;
    const pair = sides.get(key) ?? {};
    pair[side.isLeft ? 'left' : 'right'] ??= track;
    sides.set(key, pair);
  }
  return [...sides.values()].flatMap(({ left, right }) => (left && right ? [[left, right]] : []));
}

function sideOf(path: string): { isLeft: boolean; rest: string } | null {
  const dot = path.lastIndexOf('.');
  const stem = dot > path.lastIndexOf('/') ? path.slice(0, dot) : path;
  const name = stem.slice(stem.lastIndexOf('/') + 1);
  const last = [...name.matchAll(sideWord)].at(-1);
  if (!last) return null;
  const at = stem.length - name.length + last.index + (last[1]?.length ?? 0);
  const word = last[2] ?? '';
  // A running number in front is different on the two sides of a pair.
  const rest = stem.slice(0, at) + stem.slice(at + word.length);
  return {
    isLeft: word.toLowerCase().startsWith('l'),
    rest: rest.toLowerCase().replace(/(^|\/)\d+[\s._-]+/g, '$1'),
  };
}
