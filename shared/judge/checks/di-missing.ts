import type { TrackCheck } from '../check.ts';
import { isAcoustic } from '../clipping-class.ts';
import { companionMissing } from '../companions.ts';

/** No clean signal beside an amp, where the rules ask for it. */
export const diMissing: TrackCheck = (track, { tracks, rules }) =>
  companionMissing(track, tracks, {
    code: 'di-missing',
    word: 'DI',
    groups: rules.bring.diFor,
    needsNone: ({ name }) =>
      isAcoustic(name) || name.instrument === 'Synth Bass' || name.instrument === 'Sub Bass',
  });
