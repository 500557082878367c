import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';
import {
  abruptLevel,
  clippingFloor,
  clippingTolerance,
  deepestGrid,
  edgeFrames,
  floorShare,
  fullScaleLevel,
  longestDropoutFrames,
  mostCycles,
  quantisationStep,
  rampOutermost,
  rampQuarter,
  shortestRun,
  shortestSilenceFrames,
  soundLevel,
  tailFrames,
  windowFrames,
} from './definitions.ts';
import { maxPlaces } from './measures.ts';
import { chooseFramesPerColumn } from './overview.ts';

/** The numbers of `Kind` in wasm/assembly/decode.ts. */
const sampleKinds: Record<string, number> = {
  pcm8: 0,
  pcm16: 1,
  pcm24: 2,
  pcm32: 3,
  float32: 4,
  float64: 5,
};

/**
 * Writes what a file is and how it is measured into the memory of the WebAssembly module, as the
 * list of numbers that parameters.ts there reads in this order.
 */
export function writeParameters(
  memory: ArrayBuffer,
  address: number,
  format: TrackFormat,
  layout: WaveLayout,
  measuredChannels: number,
): void {
  const kind = sampleKinds[format.encoding + String(format.containerBits)];
  if (kind === undefined) {
    throw new Error(`No meters for ${format.encoding} of ${format.containerBits} bits.`);
  }
  const framesPerColumn = chooseFramesPerColumn(format.frames);
  const parameters = [
    kind,
    format.containerBits / 8,
    Number(layout.bigEndian),
    Number(format.containerBits === 8 && !layout.unsigned),
    format.channels,
    measuredChannels,
    layout.dataOffset,
    layout.dataBytes,
    format.frames,
    framesPerColumn,
    Math.ceil(format.frames / framesPerColumn),
    maxPlaces,
    soundLevel,
    windowFrames(10, format),
    windowFrames(50, format),
    floorShare,
    edgeFrames(format),
    tailFrames(format),
    shortestSilenceFrames(format),
    longestDropoutFrames(format),
    abruptLevel,
    rampOutermost,
    rampQuarter,
    clippingFloor,
    clippingTolerance(format),
    shortestRun,
    mostCycles,
    quantisationStep(format),
    fullScaleLevel(format),
    deepestGrid(format),
    format.encoding === 'pcm' ? deepestGrid(format) : deepestGrid(format) + 1,
  ];
  new Float64Array(memory, address, parameters.length).set(parameters);
}
