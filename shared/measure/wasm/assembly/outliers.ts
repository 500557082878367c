import { allocate } from './arena';
import { Channel } from './channel';
import { addPlace, newPlaces, Places } from './places';

/** Runs of samples that cannot be or go too far, also across blocks. */

@unmanaged
export class Outliers {
  places: Places;
  /** First frame of a run that is going on, or negative. */
  openSince: f64;
}

export function newOutliers(): Outliers {
  const outliers = changetype<Outliers>(allocate(offsetof<Outliers>()));
  outliers.places = newPlaces();
  outliers.openSince = -1;
  return outliers;
}

/** NaN and infinity, looked for in the bytes because the samples have 0 there already. */
export function findNonNumbers<T extends number>(
  channel: Channel,
  bytes: usize,
  start: f64,
  frames: i32,
): void {
  const outliers = channel.notANumber;
  for (let i = 0; i < frames; i++) {
    const sample = <f64>load<T>(bytes + <usize>i * sizeof<T>());
    follow(outliers, !isFinite(sample), start + <f64>i);
  }
}

/** Float samples above full scale. */
export function findOvers<T extends number>(channel: Channel, start: f64, frames: i32): void {
  const outliers = channel.overFullScale;
  for (let i = 0; i < frames; i++) {
    const sample = <f64>load<T>(channel.samples + <usize>i * sizeof<T>());
    follow(outliers, Math.abs(sample) > 1, start + <f64>i);
  }
}

/** A run ends at the latest where `frame` is not one of them any more. */
export function endOutliers(outliers: Outliers, frame: f64): void {
  if (outliers.openSince < 0) return;
  addPlace(outliers.places, outliers.openSince, frame);
  outliers.openSince = -1;
}

function follow(outliers: Outliers, isOutlier: bool, frame: f64): void {
  if (!isOutlier) endOutliers(outliers, frame);
  else if (outliers.openSince < 0) outliers.openSince = frame;
}
