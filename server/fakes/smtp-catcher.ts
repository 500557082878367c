import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export type CaughtMail = {
  /** 1, 2, 3 … in the order of arrival. */
  id: number;
  receivedAt: string;
  messageId: string;
  from: string;
  /** Addresses of the envelope: who would really have got it. */
  to: string[];
  subject: string;
  text: string;
  html: string;
};

export type SmtpCatcher = {
  port: number;
  /** Newest first. */
  mails(): CaughtMail[];
  /** From now on every mail is answered with this reply instead of taken; null takes them again. */
  refuseWith(reply: { code: number; message: string } | null): void;
  close(): Promise<void>;
};

/** Older mails are forgotten. */
const keptMails = 500;
const maxMailBytes = 5 * 1024 * 1024;

/**
 * A mail server on loopback that speaks SMTP, takes whatever it is given and delivers nothing:
 * what was "sent" in development and in tests. `port` 0 takes a free one.
 */
export async function startSmtpCatcher(port: number): Promise<SmtpCatcher> {
  const caught: CaughtMail[] = [];
  let count = 0;
  let refusal: { code: number; message: string } | null = null;
  const refuse = () =>
    refusal && Object.assign(new Error(refusal.message), { responseCode: refusal.code });

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    size: maxMailBytes,
    onRcptTo: (_address, _session, done) => done(refuse()),
    onData(stream, session, done) {
      simpleParser(stream)
        .then((mail) => {
          count += 1;
          caught.unshift({
            id: count,
            receivedAt: new Date().toISOString(),
            messageId: mail.messageId ?? '',
            from: mail.from?.text ?? '',
            to: session.envelope.rcptTo.map(({ address }) => address),
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            html: mail.html || '',
          });
          caught.length = Math.min(caught.length, keptMails);
          done();
        })
        .catch((error: unknown) => done(error instanceof Error ? error : new Error('unreadable')));
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  // A client that hangs up in the middle is its own affair.
  server.on('error', () => undefined);
  const address = server.server.address();
  return {
    port: typeof address === 'object' && address ? address.port : port,
    mails: () => [...caught],
    refuseWith(reply) {
      refusal = reply;
    },
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
