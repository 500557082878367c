import { performance } from 'node:perf_hooks';
import { clearInterval, setInterval } from 'node:timers';

/** Seconds between two signs of life of a long step. */
const heartbeatSeconds = 10;

/**
 * Prints what is being done, one aligned line a step, so that a person can follow a first start
 * of a few minutes as well as a second one of a few seconds.
 *
 * @param {{ write(text: string): unknown }} out
 */
export function createProgress(out) {
  const line = (/** @type {string} */ title, /** @type {string} */ text) =>
    void out.write(`  ${title.padEnd(14)} ${text}\n`);

  return {
    /** One line outside any step. @param {string} text */
    say(text) {
      out.write(`${text}\n`);
    },

    /**
     * Runs one step. `work` gets a function that prints what is being done right now and may
     * return the closing words (else "ready"); the time is added when it is worth knowing.
     *
     * @template T
     * @param {string} title
     * @param {(note: (text: string) => void, close: (text: string) => void) => Promise<T>} work
     * @returns {Promise<T>}
     */
    async step(title, work) {
      const start = performance.now();
      const seconds = () => (performance.now() - start) / 1000;
      let closing = 'ready';
      const heartbeat = setInterval(() => {
        line(title, `still working after ${Math.round(seconds())} s`);
      }, heartbeatSeconds * 1000);
      try {
        const result = await work(
          (text) => line(title, text),
          (text) => void (closing = text),
        );
        line(title, seconds() < 0.5 ? closing : `${closing} (${seconds().toFixed(1)} s)`);
        return result;
      } finally {
        clearInterval(heartbeat);
      }
    },
  };
}

/** @typedef {ReturnType<typeof createProgress>} Progress */
