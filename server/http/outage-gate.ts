import { AppError } from '#shared/errors.ts';
import { isConnectionLost } from '../db/failures.ts';

/** How long nobody is let through after the database was found away. */
const closedMs = 500;

/**
 * Keeps requests from queueing for a database that is away: once one has found it so, others
 * are told at once for half a second, then the next ones look again. Without this, each would
 * wait for a connection attempt of its own behind all the others.
 */
export function createOutageGate() {
  let closedUntilMs = 0;
  return {
    /** Runs the work, or throws AppError `unavailable` without trying. */
    async pass<Result>(work: () => Promise<Result>): Promise<Result> {
      if (performance.now() < closedUntilMs) throw new AppError('unavailable');
      try {
        const result = await work();
        closedUntilMs = 0;
        return result;
      } catch (error) {
        const tookTooLong = error instanceof AppError && error.code === 'unavailable';
        if (tookTooLong || isConnectionLost(error)) closedUntilMs = performance.now() + closedMs;
        throw error;
      }
    },
  };
}
