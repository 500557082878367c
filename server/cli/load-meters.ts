import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { createMeters } from '#shared/measure/create-meters.ts';
import type { MeterEngine } from '#shared/measure/meter.ts';
import { AppError } from '#shared/errors.ts';

/** Seen from the sources and, two folders below the checkout as well, from the built program. */
const places = ['../../shared/measure/wasm/build/meters.wasm', './meters.wasm'];

/**
 * The compiled meters, for as many engines as there are threads.
 * Throws AppError `engine-failed` when they are missing or cannot be compiled.
 */
export async function loadMeterModule(): Promise<WebAssembly.Module> {
  const urls = places.map((place) => new URL(place, import.meta.url));
  const url = urls.find((candidate) => existsSync(candidate));
  if (!url) throw new AppError('engine-failed', { reason: 'meters.wasm has not been built.' });
  try {
    return new WebAssembly.Module(await readFile(url));
  } catch (error) {
    throw new AppError('engine-failed', { reason: String(error) });
  }
}

/** The meters of one thread. Throws AppError `engine-failed`. */
export async function loadMeters(): Promise<MeterEngine> {
  return createMeters(await loadMeterModule());
}
