import type { TrackCheck } from '../check.ts';
import { companionMissing } from '../companions.ts';

/** No version without tuning, where the rules ask for it. */
export const untunedMissing: TrackCheck = (track, { tracks, rules }) =>
  companionMissing(track, tracks, {
    code: 'untuned-missing',
    word: 'Untuned',
    groups: rules.bring.untunedFor,
    needsNone: () => false,
  });
