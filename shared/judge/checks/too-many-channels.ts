import { found, type TrackCheck } from '../check.ts';

/** More than two channels in one file. */
export const tooManyChannels: TrackCheck = ({ format }) =>
  format.channels > 2 ? found('too-many-channels', { channels: format.channels }) : null;
