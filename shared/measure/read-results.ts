import type { TrackFormat } from '../wave/track-format.ts';
import { deepestGrid } from './definitions.ts';
import { maxPlaces, type FrameRange } from './measures.ts';
import { chooseFramesPerColumn } from './overview.ts';
import type { RawChannel, RawClipping, RawEdge, RawMeasures, RawPlaces } from './raw-measures.ts';

/**
 * Reads the list of numbers that the WebAssembly module leaves in its memory (results.ts there),
 * in the order in which it was written.
 */
export function readResults(
  memory: ArrayBuffer,
  address: number,
  format: TrackFormat,
  measuredChannels: number,
): RawMeasures {
  const next = numbersFrom(memory, address);
  const framesPerColumn = chooseFramesPerColumn(format.frames);
  const columns = Math.ceil(format.frames / framesPerColumn);
  const frames = next();
  const crc32 = next();
  const channels = Array.from({ length: measuredChannels }, () =>
    readChannel(next, memory, columns, deepestGrid(format)),
  );
  const pairs = Math.floor(measuredChannels / 2);
  return {
    frames,
    crc32,
    framesPerColumn,
    channels,
    pairProducts: Array.from({ length: pairs }, next),
    audioHash: readDigest(memory, next()),
  };
}

type Next = () => number;

function numbersFrom(memory: ArrayBuffer, address: number): Next {
  const view = new DataView(memory);
  let at = address;
  return () => {
    const value = view.getFloat64(at, true);
    at += Float64Array.BYTES_PER_ELEMENT;
    return value;
  };
}

/** Properties are read in the order in which they stand here. */
function readChannel(
  next: Next,
  memory: ArrayBuffer,
  columns: number,
  deepest: number,
): RawChannel {
  const frameOrNull = () => {
    const frame = next();
    return frame < 0 ? null : frame;
  };
  const gridOrNull = () => {
    const bits = next();
    return bits > deepest ? null : bits;
  };
  return {
    lowest: next(),
    highest: next(),
    sum: next(),
    sumOfSquares: next(),
    soundingSum: next(),
    soundingFrames: next(),
    firstSoundFrame: frameOrNull(),
    lastSoundFrame: frameOrNull(),
    truePeak: next(),
    gridBits: gridOrNull(),
    clipping: readClipping(next),
    overFullScale: readPlaces(next),
    notANumber: readPlaces(next),
    longestDigitalSilence: readSilence(next),
    dropouts: readPlaces(next),
    startEdge: readEdge(next),
    endEdge: readEdge(next),
    tailPeak: next(),
    floor: next(),
    hash: readDigest(memory, next()),
    overview: readOverview(memory, next(), columns),
  };
}

function readPlaces(next: Next): RawPlaces {
  const count = next();
  const kept = next();
  return { count, ranges: Array.from({ length: kept }, () => readRange(next)) };
}

function readRange(next: Next): FrameRange {
  return { startFrame: next(), endFrame: next() };
}

function readSilence(next: Next): FrameRange | null {
  const range = readRange(next);
  return range.endFrame > range.startFrame ? range : null;
}

function readEdge(next: Next): RawEdge {
  return { peak: next(), ramps: next() === 1 };
}

/** The runs come in two lists, of the upper and of the lower side. */
function readClipping(next: Next): RawClipping {
  const counts = {
    samples: next(),
    longestRunFrames: next(),
    ceiling: next(),
    fullScaleRuns: next(),
    cycles: next(),
    flatCycles: next(),
  };
  const upper = readPlaces(next);
  const lower = readPlaces(next);
  return {
    ...counts,
    runs: upper.count + lower.count,
    ranges: [...upper.ranges, ...lower.ranges]
      .sort((a, b) => a.startFrame - b.startFrame)
      .slice(0, maxPlaces),
  };
}

function readDigest(memory: ArrayBuffer, address: number): string {
  const bytes = new Uint8Array(memory, address, 16);
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

function readOverview(memory: ArrayBuffer, address: number, columns: number): Float32Array {
  return new Float32Array(memory.slice(address, address + 8 * columns));
}
