import { mailOutbox } from '../db/work-tables.ts';
import type { Transaction } from '../db/client.ts';
import { fromNow, msPerDay, type Clock } from '../clock.ts';
import type { JobQueue } from '../jobs/queue.ts';
import type { MailMessage } from './messages.ts';

/** About two days with the queue's growing pauses (at most six hours each). */
const maxAttempts = 25;

export type QueuedMail = {
  /**
   * Names what the mail is about, once and for all (`reset-password:<token id>`): a second mail
   * for the same cause is not queued.
   */
  cause: string;
  recipient: string;
  message: MailMessage;
  /** How long sending it still makes sense. */
  goodForMs?: number;
};

export type MailQueue = {
  /** Queues a mail in the transaction of the change that causes it. */
  queue(transaction: Transaction, mail: QueuedMail): Promise<void>;
};

export function createMailQueue(jobs: JobQueue, clock: Clock): MailQueue {
  return {
    async queue(transaction, { cause, recipient, message, goodForMs = 3 * msPerDay }) {
      const [row] = await transaction
        .insert(mailOutbox)
        .values({
          cause,
          recipient,
          message,
          createdAt: clock.now(),
          giveUpAt: fromNow(clock, goodForMs),
        })
        .onConflictDoNothing({ target: mailOutbox.cause })
        .returning({ id: mailOutbox.id });
      if (row) await jobs.add(transaction, 'send-mail', { mailId: row.id }, maxAttempts);
    },
  };
}
