import { AppError } from '../errors.ts';
import { describeMeasures } from './describe-measures.ts';
import { maxMeasuredChannels } from './measures.ts';
import type { MeterEngine, TrackMeter } from './meter.ts';
import { readResults } from './read-results.ts';
import { writeParameters } from './write-parameters.ts';

/** What meters.ts in wasm/assembly exports; addresses and lengths in bytes. */
type MeterExports = {
  memory: WebAssembly.Memory;
  start(): number;
  open(): void;
  inputAddress(): number;
  inputSpace(): number;
  accept(bytes: number): void;
  finish(): number;
};

/**
 * The meters in WebAssembly, from the compiled module. One engine has one memory and measures
 * one file at a time: workers have one each.
 * Throws AppError `engine-failed` when the module cannot run here or is not the one this code
 * was written for; nothing else steps in for it.
 */
export function createMeters(module: WebAssembly.Module): MeterEngine {
  const meters = instantiate(module);
  let current: TrackMeter | null = null;
  return {
    name: 'wasm',
    open(format, layout) {
      const measuredChannels = Math.min(format.channels, maxMeasuredChannels);
      const address = meters.start();
      writeParameters(meters.memory.buffer, address, format, layout, measuredChannels);
      meters.open();
      const mustBeCurrent = () => {
        if (current !== meter) throw new Error('This engine is measuring another file.');
      };
      const meter: TrackMeter = {
        write(bytes) {
          mustBeCurrent();
          for (let at = 0; at < bytes.length;) {
            const length = Math.min(bytes.length - at, meters.inputSpace());
            const input = new Uint8Array(meters.memory.buffer, meters.inputAddress(), length);
            input.set(bytes.subarray(at, at + length));
            meters.accept(length);
            at += length;
          }
        },
        finish() {
          mustBeCurrent();
          current = null;
          const results = meters.finish();
          return describeMeasures(
            readResults(meters.memory.buffer, results, format, measuredChannels),
          );
        },
      };
      current = meter;
      return meter;
    },
  };
}

function instantiate(module: WebAssembly.Module): MeterExports {
  let exports: Record<string, unknown>;
  try {
    exports = new WebAssembly.Instance(module, {}).exports;
  } catch (error) {
    throw new AppError('engine-failed', { reason: String(error) });
  }
  for (const name of ['start', 'open', 'inputAddress', 'inputSpace', 'accept', 'finish']) {
    if (typeof exports[name] !== 'function') {
      throw new AppError('engine-failed', { reason: `The module has no ${name}.` });
    }
  }
  return exports as MeterExports;
}
