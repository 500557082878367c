import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, text } from 'drizzle-orm/pg-core';
import { key, moment } from './columns.ts';

/* What the server keeps for its own work: nothing here belongs to anybody. */

/** Mails to be sent, written in the transaction of the change that causes them. */
export const mailOutbox = pgTable(
  'mail_outbox',
  {
    id: key(),
    /** Names the cause; a second mail for the same cause is refused. */
    cause: text('cause').notNull().unique('mail_outbox_cause_key'),
    recipient: text('recipient').notNull(),
    /** Template and its arguments, a secret link among them: erased once sent or given up. */
    message: jsonb('message').$type<unknown>(),
    createdAt: moment('created_at').notNull(),
    /** After this the mail would say something that is no longer true. */
    giveUpAt: moment('give_up_at').notNull(),
    sentAt: moment('sent_at'),
    givenUpAt: moment('given_up_at'),
  },
  (table) => [
    index('mail_outbox_created_at_idx').on(table.createdAt),
    check(
      'mail_outbox_state_check',
      sql`(${table.message} is not null)
        = (${table.sentAt} is null and ${table.givenUpAt} is null)
        and not (${table.sentAt} is not null and ${table.givenUpAt} is not null)`,
    ),
  ],
);

/** Counts of tries, shared by all servers; the columns are rate-limiter-flexible's. */
export const rateLimits = pgTable(
  'rate_limits',
  {
    key: text('key').primaryKey(),
    points: integer('points').notNull(),
    expire: moment('expire'),
  },
  (table) => [index('rate_limits_expire_idx').on(table.expire)],
);
