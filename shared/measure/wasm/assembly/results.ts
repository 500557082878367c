import { allocate } from './arena';
import { Places } from './places';

/**
 * Results leave the module as one list of f64, in the order in which they are put here and read
 * by read-results.ts.
 */

let list: usize = 0;
let count: i32 = 0;

export function openResults(mostValues: i32): void {
  list = allocate((<usize>mostValues) << 3);
  count = 0;
}

export function put(value: f64): void {
  store<f64>(list + ((<usize>count) << 3), value);
  count++;
}

export function putPlaces(places: Places): void {
  put(places.count);
  put(<f64>places.kept);
  for (let i = 0; i < places.kept * 2; i++) put(load<f64>(places.ranges + ((<usize>i) << 3)));
}

export function resultList(): usize {
  return list;
}
