import type { SessionFormat } from './session-format.ts';

/**
 * Length of a file over the session's when audio of one rate is labelled with another:
 * 44.1 kHz audio labelled 48 kHz is 0.91875 as long, the other way round 1.088435; and half and
 * double rates.
 */
export const speedRatios: readonly number[] = [44_100 / 48_000, 48_000 / 44_100, 1 / 2, 2];

/** A length within this share of the ratio counts. */
const tolerance = 0.0005;

/**
 * The ratio of wrong speed a length shows, or null. Only where at least half of the tracks have
 * the session's length: among lengths that all differ, one will always come close by chance.
 */
export function speedRatio(
  framesAtSessionRate: number,
  session: SessionFormat,
  tracks: number,
): number | null {
  if (session.frames === null || session.frames === 0) return null;
  if (session.tracksWithThatLength < 2 || session.tracksWithThatLength * 2 < tracks) return null;
  const ratio = framesAtSessionRate / session.frames;
  return speedRatios.find((known) => Math.abs(ratio / known - 1) <= tolerance) ?? null;
}
