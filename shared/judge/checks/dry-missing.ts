import type { TrackCheck } from '../check.ts';
import { companionMissing } from '../companions.ts';

/** No version without effects, where the rules ask for it. */
export const dryMissing: TrackCheck = (track, { tracks, rules }) =>
  companionMissing(track, tracks, {
    code: 'dry-missing',
    word: 'Dry',
    groups: rules.bring.dryFor,
    needsNone: () => false,
  });
