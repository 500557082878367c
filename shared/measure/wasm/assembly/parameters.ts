import { allocate } from './arena';

/**
 * What a file is and by which numbers it is measured: one list of f64, written by
 * write-parameters.ts in this order.
 */

const mostParameters: usize = 64;

let list: usize = 0;
let position: usize = 0;

export let sampleKind: i32 = 0;
export let sampleBytes: usize = 0;
export let bigEndian: bool = false;
export let signedBytes: bool = false;
export let channels: usize = 0;
/** Channels that are measured: the first 64. */
export let measured: i32 = 0;
export let dataOffset: f64 = 0;
export let dataBytes: f64 = 0;
export let fileFrames: f64 = 0;
export let framesPerColumn: i32 = 0;
export let columns: i32 = 0;
/** Places kept of anything. */
export let maxPlaces: i32 = 0;
export let soundLevel: f64 = 0;
export let soundWindowFrames: i32 = 0;
export let floorWindowFrames: i32 = 0;
export let floorShare: f64 = 0;
export let edgeFrames: i32 = 0;
export let tailFrames: f64 = 0;
export let shortestSilence: f64 = 0;
export let longestDropout: f64 = 0;
export let abruptLevel: f64 = 0;
export let rampOutermost: f64 = 0;
export let rampQuarter: f64 = 0;
export let clippingFloor: f64 = 0;
export let clippingTolerance: f64 = 0;
export let shortestRun: i32 = 0;
export let mostCycles: f64 = 0;
export let quantisationStep: f64 = 0;
export let fullScaleLevel: f64 = 0;
export let deepestGrid: i32 = 0;
/** From here on nothing can change any more. */
export let settledGrid: i32 = 0;

/** Where the list goes. */
export function placeParameters(): usize {
  list = allocate(mostParameters << 3);
  return list;
}

function next(): f64 {
  const value = load<f64>(list + position);
  position += 8;
  return value;
}

export function readParameters(): void {
  position = 0;
  sampleKind = <i32>next();
  sampleBytes = <usize>next();
  bigEndian = next() != 0;
  signedBytes = next() != 0;
  channels = <usize>next();
  measured = <i32>next();
  dataOffset = next();
  dataBytes = next();
  fileFrames = next();
  framesPerColumn = <i32>next();
  columns = <i32>next();
  maxPlaces = <i32>next();
  soundLevel = next();
  soundWindowFrames = <i32>next();
  floorWindowFrames = <i32>next();
  floorShare = next();
  edgeFrames = <i32>next();
  tailFrames = next();
  shortestSilence = next();
  longestDropout = next();
  abruptLevel = next();
  rampOutermost = next();
  rampQuarter = next();
  clippingFloor = next();
  clippingTolerance = next();
  shortestRun = <i32>next();
  mostCycles = next();
  quantisationStep = next();
  fullScaleLevel = next();
  deepestGrid = <i32>next();
  settledGrid = <i32>next();
}
