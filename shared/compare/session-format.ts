import type { TrackFormat } from '../wave/track-format.ts';

/** What most tracks of a session have in common. null where there are no tracks. */
export type SessionFormat = {
  sampleRateHz: number | null;
  /** No rate is held by more than half of the tracks and another one by as many. */
  sampleRateEvenlySplit: boolean;
  bits: number | null;
  encoding: 'pcm' | 'float' | null;
  /** The session's length in frames at its own rate. */
  frames: number | null;
  /** How many tracks have that length, within the tolerance. */
  tracksWithThatLength: number;
};

/** A length fewer tracks share than this is a coincidence, not the session's length. */
const leastShareOfCommonLength = 0.25;

/**
 * The values most tracks agree on. On a tie the rate the rules allow wins, then the higher one;
 * the greater bit depth; the greater length.
 */
export function sessionFormat(
  tracks: readonly TrackFormat[],
  allowedRatesHz: readonly number[],
  lengthToleranceFrames: number,
): SessionFormat {
  const rates = countBy(tracks, (format) => format.sampleRateHz);
  const mostTracks = Math.max(0, ...rates.values());
  const candidates = [...rates.keys()].filter((rate) => rates.get(rate) === mostTracks);
  const sampleRateHz =
    candidates.sort(
      (a, b) => Number(allowedRatesHz.includes(b)) - Number(allowedRatesHz.includes(a)) || b - a,
    )[0] ?? null;

  const depths = countBy(
    tracks,
    (format) => `${String(format.bits).padStart(2, '0')} ${format.encoding}`,
  );
  const depth = mostCommon(depths, (a, b) => (a < b ? 1 : -1))?.split(' ');

  const lengths = tracks.map((format) => framesAtRate(format, sampleRateHz ?? format.sampleRateHz));
  const common = commonLength(lengths, lengthToleranceFrames);
  const length =
    common && common.tracks >= tracks.length * leastShareOfCommonLength
      ? common
      : longestLength(lengths, lengthToleranceFrames);
  return {
    sampleRateHz,
    sampleRateEvenlySplit: candidates.length > 1,
    bits: depth ? Number(depth[0]) : null,
    encoding: (depth?.[1] as 'pcm' | 'float' | undefined) ?? null,
    frames: length?.frames ?? null,
    tracksWithThatLength: length?.tracks ?? 0,
  };
}

/**
 * A file's length in frames at another rate. Where rates differ a frame is lost or gained in
 * rounding, so such a length is only good to about two frames.
 */
export function framesAtRate(format: TrackFormat, sampleRateHz: number): number {
  return format.sampleRateHz === sampleRateHz
    ? format.frames
    : Math.round((format.frames * sampleRateHz) / format.sampleRateHz);
}

/**
 * The length most tracks have. With a tolerance, lengths count together when they lie within it
 * of the one that is taken.
 */
function commonLength(
  lengths: readonly number[],
  toleranceFrames: number,
): { frames: number; tracks: number } | null {
  const exact = countBy(lengths, (frames) => frames);
  let best: { frames: number; tracks: number; exactly: number } | null = null;
  for (const [frames, exactly] of exact) {
    let tracks = 0;
    for (const [other, count] of exact) {
      if (Math.abs(other - frames) <= toleranceFrames) tracks += count;
    }
    const better =
      best === null ||
      tracks > best.tracks ||
      (tracks === best.tracks && exactly > best.exactly) ||
      (tracks === best.tracks && exactly === best.exactly && frames > best.frames);
    if (better) best = { frames, tracks, exactly };
  }
  return best;
}

/**
 * Where every track ends with its own last sound, hardly two have the same length. The session is
 * then as long as the longest of them.
 */
function longestLength(
  lengths: readonly number[],
  toleranceFrames: number,
): { frames: number; tracks: number } | null {
  if (lengths.length === 0) return null;
  const frames = Math.max(...lengths);
  return { frames, tracks: lengths.filter((other) => frames - other <= toleranceFrames).length };
}

function countBy<Item, Key>(items: readonly Item[], key: (item: Item) => Key): Map<Key, number> {
  const counts = new Map<Key, number>();
  for (const item of items) counts.set(key(item), (counts.get(key(item)) ?? 0) + 1);
  return counts;
}

function mostCommon<Key>(counts: Map<Key, number>, order: (a: Key, b: Key) => number): Key | null {
  const most = Math.max(0, ...counts.values());
  return [...counts.keys()].filter((key) => counts.get(key) === most).sort(order)[0] ?? null;
}
