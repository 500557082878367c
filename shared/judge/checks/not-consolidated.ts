import { soundsAtOnce } from '../../compare/starts.ts';
import { found, type SessionCheck } from '../check.ts';

/** The set looks like clips that each begin where they begin in the song. */
export const notConsolidated: SessionCheck = ({ tracks, looseClips }) => {
  if (!looseClips) return [];
  const seconds = tracks.map((track) => track.format.frames / track.format.sampleRateHz);
  return [
    found(
      'not-consolidated',
      {
        tracks: tracks.length,
        soundingAtOnce: tracks.filter(soundsAtOnce).length,
        shortestSeconds: Math.min(...seconds),
        longestSeconds: Math.max(...seconds),
      },
      { files: tracks.map((track) => track.path) },
    ),
  ];
};
