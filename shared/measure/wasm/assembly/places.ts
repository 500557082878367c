import { allocate } from './arena';
import { maxPlaces } from './parameters';

/** Ranges of frames: the true count, and the first of them as pairs of f64. */
@unmanaged
export class Places {
  count: f64;
  kept: i32;
  ranges: usize;
}

export function newPlaces(): Places {
  const places = changetype<Places>(allocate(offsetof<Places>()));
  places.ranges = allocate((<usize>maxPlaces) << 4);
  return places;
}

export function addPlace(places: Places, startFrame: f64, endFrame: f64): void {
  places.count += 1;
  if (places.kept == maxPlaces) return;
  const at = places.ranges + ((<usize>places.kept) << 4);
  store<f64>(at, startFrame);
  store<f64>(at, endFrame, 8);
  places.kept++;
}
