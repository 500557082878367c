import type { CheckedTrack } from './check.ts';

/**
 * Two files of one instrument: sides of a pair, microphones, clean beside amp, a parallel copy.
 * What happens in both of them at the same time is one event, not two.
 */
export function samePart(a: CheckedTrack, b: CheckedTrack): boolean {
  return a.name.instrument !== null && a.name.instrument === b.name.instrument;
}
