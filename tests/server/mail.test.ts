import { eq } from 'drizzle-orm';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { mailOutbox } from '../../server/db/work-tables.ts';
import { jobQueue } from '../../server/jobs/queue.ts';
import { layOutHtml, layOutText } from '../../server/mail/layout.ts';
import type { MailMessage } from '../../server/mail/messages.ts';
import { createMailQueue } from '../../server/mail/outbox.ts';
import { sendMail, type MailSender } from '../../server/mail/send-mail.ts';
import { createMailTransport } from '../../server/mail/transport.ts';
import { wordMail } from '../../server/mail/wording.ts';
import { createLog } from '../../server/log.ts';
import { startTestServer, testOrigin, type TestServer } from '../support/server-app.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());
afterEach(() => server.catcher.refuseWith(null));

const secret = 's'.repeat(43);
let count = 0;

/** Queues a mail of its own and says how to look at it. */
async function queueMail(cause?: string) {
  count += 1;
  const recipient = `reader-${count}@people.example`;
  const mail = createMailQueue(jobQueue, server.clock);
  await server.db.transaction((transaction) =>
    mail.queue(transaction, {
      cause: cause ?? `test:${count}`,
      recipient,
      message: { kind: 'reset-password', secret },
      goodForMs: 3_600_000,
    }),
  );
  return {
    recipient,
    caught: () => server.catcher.mails().filter(({ to }) => to.includes(recipient)),
    async row() {
      const [row] = await server.db
        .select()
        .from(mailOutbox)
        .where(eq(mailOutbox.recipient, recipient));
      if (!row) throw new Error('the mail is not in the outbox');
      return row;
    },
  };
}

/** Makes every waiting job due now instead of after its pause. */
async function skipPauses(): Promise<void> {
  await server.db.execute(`update graphile_worker._private_jobs set run_at = now()`);
}

function senderOver(port: number): MailSender & { close(): void } {
  const transport = createMailTransport(`smtp://127.0.0.1:${port}`, 'a@flightcase.example');
  const { db, clock } = server;
  const log = createLog('silent');
  return { db, clock, transport, log, origin: testOrigin, close: () => transport.close() };
}

describe('a queued mail', () => {
  it('is sent once, noted, and its link is erased from the database', async () => {
    const mail = await queueMail();
    expect((await mail.row()).message).toMatchObject({ secret });
    await server.runJobs();
    await server.runJobs();
    expect(mail.caught()).toHaveLength(1);
    const row = await mail.row();
    expect([row.message, row.sentAt?.getTime()]).toEqual([null, server.clock.now().getTime()]);
    expect(mail.caught()[0]?.messageId).toBe(`<${row.id}@flightcase.example>`);
  });

  it('is not sent again when its job runs again', async () => {
    const mail = await queueMail();
    const { id } = await mail.row();
    const sender = senderOver(server.catcher.port);
    await Promise.all([sendMail(sender, id), sendMail(sender, id), sendMail(sender, id)]);
    await sendMail(sender, id);
    sender.close();
    expect(mail.caught()).toHaveLength(1);
  });

  it('exists only if the change that causes it does', async () => {
    const before = server.catcher.mails().length;
    const mail = createMailQueue(jobQueue, server.clock);
    const change = server.db.transaction(async (transaction) => {
      await mail.queue(transaction, {
        cause: 'rolled-back',
        recipient: 'nobody@people.example',
        message: { kind: 'password-changed' },
      });
      throw new Error('the change fails');
    });
    await expect(change).rejects.toThrow('the change fails');
    await server.runJobs();
    expect(server.catcher.mails()).toHaveLength(before);
  });

  it('is queued once for one cause', async () => {
    const first = await queueMail('the-same-cause');
    const second = await queueMail('the-same-cause');
    await server.runJobs();
    expect([first.caught().length, second.caught().length]).toEqual([1, 0]);
  });

  it('is tried again when the mail server asks for it or is away', async () => {
    const mail = await queueMail();
    server.catcher.refuseWith({ code: 451, message: 'try again later' });
    await server.runJobs();
    expect([mail.caught().length, (await mail.row()).sentAt]).toEqual([0, null]);
    server.catcher.refuseWith(null);
    await skipPauses();
    await server.runJobs();
    expect(mail.caught()).toHaveLength(1);

    const { id } = await (await queueMail()).row();
    const nowhere = senderOver(1);
    await expect(sendMail(nowhere, id)).rejects.toThrow(/^mail not taken \(E/);
    nowhere.close();
  });

  it('is given up when the recipient is refused for good, and nothing keeps the link', async () => {
    const mail = await queueMail();
    server.catcher.refuseWith({ code: 550, message: `no such user ${mail.recipient}` });
    await server.runJobs();
    server.catcher.refuseWith(null);
    await skipPauses();
    await server.runJobs();
    const row = await mail.row();
    expect([mail.caught().length, row.message, row.sentAt]).toEqual([0, null, null]);
    expect(row.givenUpAt).not.toBeNull();
    expect(server.logLines.join('')).not.toContain(mail.recipient);
  });

  it('is given up when its link no longer works', async () => {
    const mail = await queueMail();
    server.clock.move(3_600_001);
    await server.runJobs();
    const row = await mail.row();
    expect([mail.caught().length, row.message]).toEqual([0, null]);
    expect(row.givenUpAt).not.toBeNull();
  });

  it('that was taken but not noted (the one window left) comes again under the same id', async () => {
    const mail = await queueMail();
    const { id } = await mail.row();
    const sender = senderOver(server.catcher.port);
    const dying: MailSender = {
      ...sender,
      transport: {
        close: () => undefined,
        async send(outgoing) {
          await sender.transport.send(outgoing);
          throw new Error('the process dies here');
        },
      },
    };
    await expect(sendMail(dying, id)).rejects.toThrow('mail not taken');
    await sendMail(sender, id);
    sender.close();
    expect(new Set(mail.caught().map(({ messageId }) => messageId)).size).toBe(1);
  });
});

const messages: MailMessage[] = [
  { kind: 'confirm-account', secret },
  { kind: 'account-exists' },
  { kind: 'reset-password', secret },
  { kind: 'no-account' },
  { kind: 'password-changed' },
  { kind: 'change-address', secret },
  { kind: 'address-in-use' },
  { kind: 'address-changed' },
  {
    kind: 'invitation-to-studio',
    secret,
    invitedBy: 'Maren <b>Holt</b>',
    studioName: 'Harbour Lane & "Sons"',
  },
  {
    kind: 'invitation-to-project',
    secret,
    invitedBy: 'Maren Holt',
    role: 'artist',
    projectTitle: 'Weather for Two',
    artistName: 'Velvet Tramline',
    studioName: 'Harbour Lane Mixing',
  },
];

describe('the words of every mail', () => {
  it.each(messages.map((message) => [message.kind, message] as const))(
    '%s: text and HTML say the same and load nothing',
    (_kind, message) => {
      const words = wordMail(message, testOrigin);
      const text = layOutText(words);
      const html = layOutHtml(words);
      const hasLink = 'secret' in message;
      expect(text.includes(`#token=${secret}`)).toBe(hasLink);
      expect(html.includes(`#token=${secret}`)).toBe(hasLink);
      // A secret never stands where a server would see it.
      expect(text).not.toMatch(/[?/]s{43}/);
      expect(html).not.toMatch(/<(img|script|link|style|iframe)\b|url\(|src=/i);
      for (const paragraph of words.paragraphs) expect(text).toContain(paragraph);
      expect(words.subject).toMatch(/^[^\n]{10,90}$/);
      expect(words.subject).not.toContain('Weather for Two');
    },
  );

  it('cannot be changed by what somebody calls themselves', () => {
    const html = layOutHtml(wordMail(messages[8]!, testOrigin));
    expect(html).not.toContain('<b>Holt');
    expect(html).toContain('Maren &lt;b&gt;Holt&lt;/b&gt;');
    expect(html).toContain('Harbour Lane &amp; &quot;Sons&quot;');
  });
});
