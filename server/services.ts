import type { Sessions } from './accounts/sessions.ts';
import type { Clock } from './clock.ts';
import type { Database } from './db/client.ts';
import type { Limits } from './http/limits.ts';
import type { MailQueue } from './mail/outbox.ts';
import type { rejudge } from './reports/rejudge.ts';

/** What the parts of the server work with; each takes what it needs. */
export type Services = {
  db: Database;
  clock: Clock;
  mail: MailQueue;
  limits: Limits;
  sessions: Sessions;
  rejudge: typeof rejudge;
};
