import { AppError } from '../errors.ts';
import type { TrackFormat, WaveLayout } from '../wave/track-format.ts';
import { describeMeasures } from './describe-measures.ts';
import { maxMeasuredChannels } from './measures.ts';
import type { MeterEngine, TrackMeter } from './meter.ts';
import { readResults } from './read-results.ts';

/** What meters.ts in wasm/assembly exports. */
type MeterModule = {
  memory: WebAssembly.Memory;
  open(
    sampleKind: number,
    sampleBytes: number,
    isBigEndian: boolean,
    isSigned8: boolean,
    channels: number,
    measuredChannels: number,
    sampleRateHz: number,
    bits: number,
    frames: number,
    dataOffset: number,
    dataBytes: number,
  ): void;
  inputAddress(): number;
  inputSpace(): number;
  accept(bytes: number): void;
  finish(): number;
};

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
 * The meters in WebAssembly, from the compiled module. One engine has one memory and measures
 * one file at a time: workers have one each.
 * Throws AppError `engine-failed` when the module is not the one this code knows.
 */
export function createMeters(module: WebAssembly.Module): MeterEngine {
  const meters = instantiate(module);
  let current: object | null = null;
  return {
    name: 'wasm',
    open(format, layout) {
      const measuredChannels = Math.min(format.channels, maxMeasuredChannels);
      openModule(meters, format, layout, measuredChannels);
      const meter: TrackMeter = {
        write(bytes) {
          if (current !== meter) throw new Error('Another file was opened on this engine.');
          for (let at = 0; at < bytes.length;) {
            const length = Math.min(bytes.length - at, meters.inputSpace());
            const input = new Uint8Array(meters.memory.buffer, meters.inputAddress(), length);
            input.set(bytes.subarray(at, at + length));
            meters.accept(length);
            at += length;
          }
        },
        finish() {
          if (current !== meter) throw new Error('Another file was opened on this engine.');
          current = null;
          const address = meters.finish();
          const raw = readResults(meters.memory.buffer, address, measuredChannels);
          return describeMeasures(raw, format);
        },
      };
      current = meter;
      return meter;
    },
  };
}

function openModule(
  meters: MeterModule,
  format: TrackFormat,
  layout: WaveLayout,
  measuredChannels: number,
): void {
  const kind = sampleKinds[format.encoding + String(format.containerBits)];
  if (kind === undefined) {
    throw new Error(`No meters for ${format.encoding} of ${format.containerBits} bits.`);
  }
  meters.open(
    kind,
    format.containerBits / 8,
    layout.bigEndian,
    format.containerBits === 8 && !layout.unsigned,
    format.channels,
    measuredChannels,
    format.sampleRateHz,
    format.bits,
    format.frames,
    layout.dataOffset,
    layout.dataBytes,
  );
}

function instantiate(module: WebAssembly.Module): MeterModule {
  let exports: Record<string, unknown>;
  try {
    exports = new WebAssembly.Instance(module, {}).exports;
  } catch (error) {
    throw new AppError('engine-failed', { reason: String(error) });
  }
  for (const name of ['open', 'inputAddress', 'inputSpace', 'accept', 'finish']) {
    if (typeof exports[name] !== 'function') {
      throw new AppError('engine-failed', { reason: `The module has no ${name}.` });
    }
  }
  return exports as MeterModule;
}
