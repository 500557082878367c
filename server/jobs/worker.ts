import { Logger as WorkerLogger, run, type TaskList } from 'graphile-worker';
import type { Logger } from 'pino';
import { z } from 'zod';
import { sendMail, type MailSender } from '../mail/send-mail.ts';
import { sweepExpired } from './sweep.ts';

export type JobWorker = {
  /** Takes no more jobs and waits for those at work. */
  stop(): Promise<void>;
};

/** Every night, in UTC. */
const crontab = '17 4 * * * sweep-expired';

/** What to do for each kind of job. */
export function createTasks(sender: MailSender): TaskList {
  return {
    'send-mail': async (payload) => {
      const { mailId } = z.object({ mailId: z.uuid() }).parse(payload);
      await sendMail(sender, mailId);
    },
    'sweep-expired': () => sweepExpired(sender.db, sender.clock),
  };
}

/** The queue's own words go to our log; jobs carry keys only, so nothing personal is in them. */
export function workerLogger(log: Logger): WorkerLogger {
  return new WorkerLogger(() => (level, message) => {
    const name: string = level;
    if (name === 'error') log.error(message);
    else if (name === 'warning') log.warn(message);
    else log.debug(message);
  });
}

/** Starts working on queued jobs. A database that goes away is waited for. */
export async function startJobWorker(
  databaseUrl: string,
  tasks: TaskList,
  log: Logger,
): Promise<JobWorker> {
  const runner = await run({
    connectionString: databaseUrl,
    taskList: tasks,
    crontab,
    concurrency: 2,
    maxPoolSize: 4,
    noHandleSignals: true,
    logger: workerLogger(log),
  });
  // A job that fails is the queue's business; the promise only rejects when the runner dies.
  runner.promise.catch((error: unknown) => log.error({ err: error }, 'job worker ended'));
  return { stop: () => runner.stop() };
}
