import { found, type SessionCheck } from '../check.ts';

/** One file is another upside down: together they cancel. */
export const polarityTwin: SessionCheck = ({ tracks, rules, comparison }) => {
  const paths = new Set(tracks.map((track) => track.path));
  return comparison.matches
    .filter(
      (match) =>
        match.inverted &&
        match.differenceUnderDb >= rules.signal.polarityTwinDb &&
        paths.has(match.first) &&
        paths.has(match.second),
    )
    .map(({ first, second, gainDb, shiftFrames }) =>
      found('polarity-twin', { gainDb, shiftFrames }, { files: [first, second] }),
    );
};
