import { AppError } from '#shared/errors.ts';

/**
 * Waits for `work` at most `ms` milliseconds, then throws AppError `unavailable`: a database
 * that accepts connections and says nothing must not keep a request for ever.
 */
export async function withDeadline<Result>(ms: number, work: PromiseLike<Result>): Promise<Result> {
  let timer: NodeJS.Timeout | undefined;
  const deadline = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new AppError('unavailable')), ms);
  });
  try {
    return await Promise.race([work, deadline]);
  } finally {
    clearTimeout(timer);
  }
}
