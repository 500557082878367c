import { eq } from 'drizzle-orm';
import type { Logger } from 'pino';
import type { Clock } from '../clock.ts';
import type { Database, Transaction } from '../db/client.ts';
import { mailOutbox } from '../db/work-tables.ts';
import { layOutHtml, layOutText } from './layout.ts';
import { mailMessageSchema } from './messages.ts';
import type { MailTransport } from './transport.ts';
import { wordMail } from './wording.ts';

export type MailSender = {
  db: Database;
  clock: Clock;
  transport: MailTransport;
  /** Where links lead: `https://host`, no slash at the end. */
  origin: string;
  log: Logger;
};

/**
 * Sends one queued mail and notes that it was sent. The row stays locked meanwhile, so two
 * workers never send the same one, and a mail noted as sent is never sent again.
 *
 * One window remains that no mail server lets us close: if this process dies after the server
 * has taken the mail and before the note is committed (milliseconds), the next try sends it
 * again, under the same Message-ID, by which mail programs can tell that it is the same. The
 * other choice, noting first, would lose mails instead.
 *
 * Throws when the mail server could not be reached or asks to try later: the queue tries again.
 */
export async function sendMail(sender: MailSender, mailId: string): Promise<void> {
  const { db, clock, transport, origin, log } = sender;
  await db.transaction(async (transaction) => {
    const [mail] = await transaction
      .select()
      .from(mailOutbox)
      .where(eq(mailOutbox.id, mailId))
      .for('update');
    if (!mail || mail.message === null) return;
    if (mail.giveUpAt <= clock.now()) {
      log.warn({ mailId }, 'mail given up: too old');
      await closeMail(transaction, mailId, { givenUpAt: clock.now() });
      return;
    }
    const words = wordMail(mailMessageSchema.parse(mail.message), origin);
    try {
      await transport.send({
        id: mailId,
        to: mail.recipient,
        subject: words.subject,
        text: layOutText(words),
        html: layOutHtml(words),
      });
    } catch (error) {
      if (!isRefusedForGood(error)) throw new MailNotTaken(error);
      log.warn({ mailId, err: error }, 'mail given up: recipient refused');
      await closeMail(transaction, mailId, { givenUpAt: clock.now() });
      return;
    }
    await closeMail(transaction, mailId, { sentAt: clock.now() });
  });
}

/** Notes the outcome and erases the message, whose link is a secret. */
async function closeMail(
  transaction: Transaction,
  mailId: string,
  outcome: { sentAt: Date } | { givenUpAt: Date },
): Promise<void> {
  await transaction
    .update(mailOutbox)
    .set({ ...outcome, message: null })
    .where(eq(mailOutbox.id, mailId));
}

/** RFC 5321, section 4.2.1: a reply of 5yz is final; here only to the recipient's address. */
function isRefusedForGood(error: unknown): boolean {
  const { code, responseCode } = (error ?? {}) as Record<string, unknown>;
  return code === 'EENVELOPE' && typeof responseCode === 'number' && responseCode >= 500;
}

/** Says no more than the codes: the queue stores the message of an error, and replies quote addresses. */
class MailNotTaken extends Error {
  constructor(reason: unknown) {
    const { code, responseCode } = (reason ?? {}) as Record<string, unknown>;
    const codes = [code, responseCode].filter((part) => part !== undefined).map(String);
    super(`mail not taken (${codes.join(' ') || 'no code'})`);
    this.name = 'MailNotTaken';
  }
}
