import { createMeters } from '#shared/measure/create-meters.ts';
import type { MeterEngine } from '#shared/measure/meter.ts';
import { measureHere, type MeasureFile } from '#shared/session/measure-file.ts';
import { fileOnDisk } from '../browser/file-source.ts';
import { serveWorker } from './bridge.ts';
import type { MeasureApi, MeasureOutput } from './measure-api.ts';

let measureFile: MeasureFile | null = null;

/** The engine has one memory: a file that was cancelled must be gone before the next one opens. */
let previous: Promise<unknown> = Promise.resolve();

serveWorker<MeasureApi>(
  {
    load(module) {
      const engine: MeterEngine = createMeters(module);
      measureFile = measureHere(engine);
      return Promise.resolve(null);
    },
    measure({ path, file }, { signal, report }) {
      const current = previous.then(() => {
        if (!measureFile) throw new Error('load comes before measure');
        let bytes = 0;
        return measureFile(fileOnDisk(path, file), {
          signal,
          onBytes: (more) => report((bytes += more)),
        });
      });
      previous = current.catch(() => undefined);
      return current;
    },
  },
  (output) => overviewBuffers(output as MeasureOutput | null),
);

function overviewBuffers(measured: MeasureOutput | null): Transferable[] {
  const buffers = measured?.overview?.channels.map((channel) => channel.buffer) ?? [];
  return [...new Set(buffers)].filter((buffer) => buffer instanceof ArrayBuffer);
}
