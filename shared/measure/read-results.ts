import type { RawChannel, RawMeasures, RawPlaces } from './raw-measures.ts';

/**
 * Reads the list of numbers that the WebAssembly module leaves in its memory (results.ts there),
 * in the order in which it was written.
 */
export function readResults(memory: ArrayBuffer, address: number, channels: number): RawMeasures {
  const view = new DataView(memory);
  let at = address;
  const next = () => {
    const value = view.getFloat64(at, true);
    at += 8;
    return value;
  };
  const orNull = (value: number) => (value < 0 ? null : value);
  const places = (): RawPlaces => {
    const count = next();
    const kept = next();
    const ranges = Array.from({ length: kept }, () => ({ startFrame: next(), endFrame: next() }));
    return { count, ranges };
  };

  const floats = (from: number, length: number) =>
    new Float32Array(memory.slice(from, from + length * Float32Array.BYTES_PER_ELEMENT));

  const frames = next();
  const crc32 = next();
  const framesPerColumn = next();
  const columns = next();
  const channel = (): RawChannel => ({
    lowest: next(),
    highest: next(),
    sum: next(),
    sumOfSquares: next(),
    firstSoundFrame: orNull(next()),
    lastSoundFrame: orNull(next()),
    notANumber: places(),
    overFullScale: places(),
    overview: floats(next(), 2 * columns),
  });
  return {
    frames,
    crc32,
    framesPerColumn,
    channels: Array.from({ length: channels }, channel),
  };
}
