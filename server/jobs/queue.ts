import { sql } from 'drizzle-orm';
import type { Queryable } from '../db/client.ts';

/** What each kind of job needs to know. */
export type JobPayloads = {
  'send-mail': { mailId: string };
};
export type JobName = keyof JobPayloads;

export type JobQueue = {
  /**
   * Adds a job within the caller's transaction: it exists if and only if the change that
   * causes it does. A failing job is tried again with growing pauses, `maxAttempts` times.
   */
  add<Name extends JobName>(
    transaction: Queryable,
    name: Name,
    payload: JobPayloads[Name],
    maxAttempts: number,
  ): Promise<void>;
};

export const jobQueue: JobQueue = {
  async add(transaction, name, payload, maxAttempts) {
    await transaction.execute(
      sql`select graphile_worker.add_job(${name}::text, payload := ${JSON.stringify(payload)}::json,
        max_attempts := ${maxAttempts}::int)`,
    );
  },
};
