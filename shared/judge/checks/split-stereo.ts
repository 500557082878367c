import { found, type SessionCheck } from '../check.ts';

/**
 * Tried on stereo recordings and sampled instruments taken apart, against one part played twice
 * by a machine (0.46 and 0.82 at most; people agree far less).
 */
const sameWaves = 0.6;
const sameLoudness = 0.85;

/**
 * Left and right of one stereo recording as two mono files. Two performances panned apart are
 * called left and right as well, so the sound has to agree: the same waves, or at least the same
 * loudness in steps of 5 ms.
 */
export const splitStereo: SessionCheck = ({ tracks, comparison }) => {
  const monos = new Set(
    tracks.filter((track) => track.format.channels === 1).map((track) => track.path),
  );
  return comparison.sides
    .filter(
      ({ left, right, correlation, loudnessCorrelation }) =>
        monos.has(left) &&
        monos.has(right) &&
        (correlation >= sameWaves || loudnessCorrelation >= sameLoudness),
    )
    .map(({ left, right }) => found('split-stereo', { left, right }, { files: [left, right] }));
};
