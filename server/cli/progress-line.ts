import type { WriteStream } from 'node:tty';
import { printable } from './say-error.ts';

/** One line that is written over and over; nothing at all where nobody watches. */
export type ProgressLine = {
  show(what: string, done: number, total: number, detail: string): void;
  clear(): void;
};

const fastestMs = 80;

/** Where a terminal does not say how wide it is. */
const usualColumns = 80;

export function progressLine(stream: WriteStream): ProgressLine {
  if (!stream.isTTY) return { show: () => undefined, clear: () => undefined };
  let last = 0;
  let isShown = false;
  return {
    show(what, done, total, detail) {
      const now = performance.now();
      if (now - last < fastestMs) return;
      last = now;
      isShown = true;
      const percent = total > 0 ? Math.min(100, Math.floor((100 * done) / total)) : 100;
      const line = `${what} ${String(percent).padStart(3)} %  ${printable(detail)}`;
      stream.write(
        `\r\u001b[K${[...line].slice(0, (stream.columns || usualColumns) - 1).join('')}`,
      );
    },
    clear() {
      if (isShown) stream.write('\r\u001b[K');
      isShown = false;
    },
  };
}
