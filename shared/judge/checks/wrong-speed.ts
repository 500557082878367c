import { found, type TrackCheck } from '../check.ts';
import { speedRatio } from '../../compare/speed.ts';

/** As long as the session would be at another rate: recorded at one rate, labelled with another. */
export const wrongSpeed: TrackCheck = (track, session) => {
  const ratio = speedRatio(track.framesAtSessionRate, session.format, session.tracks.length);
  const { sampleRateHz, frames } = session.format;
  if (ratio === null || sampleRateHz === null || frames === null) return null;
  return found('wrong-speed', {
    lengthRatio: track.framesAtSessionRate / frames,
    labelledHz: track.format.sampleRateHz,
    likelyHz: Math.round(track.format.sampleRateHz * ratio),
    lengthSeconds: track.format.frames / track.format.sampleRateHz,
    sessionLengthSeconds: frames / sampleRateHz,
  });
};
