import metersUrl from '#shared/measure/wasm/build/meters.wasm?url';
import { AppError } from '#shared/errors.ts';

/** Fetches and compiles the meters; workers get the compiled module. Throws `engine-failed`. */
export async function loadMeters(): Promise<WebAssembly.Module> {
  try {
    return await WebAssembly.compileStreaming(fetch(metersUrl));
  } catch (cause) {
    throw new AppError('engine-failed', { reason: String(cause) });
  }
}
