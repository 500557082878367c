import { createMeters } from '#shared/measure/create-meters.ts';
import type { MeterEngine } from '#shared/measure/meter.ts';
import { measureHere, type MeasureFile } from '#shared/session/measure-file.ts';
import { serveWorker } from './bridge.ts';
import { droppedFile } from './file-to-read.ts';
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
    measure(file, { signal, report }) {
      const current = previous.then(() => {
        if (!measureFile) throw new Error('load comes before measure');
        let bytes = 0;
        let toldAt = 0;
        return measureFile(droppedFile(file), {
          signal,
          onBytes: (more) => {
            bytes += more;
            // Often enough for a bar to move; a message a block would keep the page busy.
            const now = performance.now();
            if (now - toldAt < 100) return;
            toldAt = now;
            report(bytes);
          },
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
