import { lt } from 'drizzle-orm';
import { fromNow, msPerDay, type Clock } from '../clock.ts';
import type { Database } from '../db/client.ts';
import { accountTokens, invitations, reportShares, sessions } from '../db/schema.ts';
import { mailOutbox, rateLimits } from '../db/work-tables.ts';

/** Notes about sent mails (recipient and time) are kept this long, to answer "did it go out?". */
const mailKeptMs = 30 * msPerDay;

/** Removes what has expired: nothing here could be used any more. */
export async function sweepExpired(db: Database, clock: Clock): Promise<void> {
  const now = clock.now();
  await db.delete(sessions).where(lt(sessions.expiresAt, now));
  await db.delete(accountTokens).where(lt(accountTokens.expiresAt, now));
  await db.delete(invitations).where(lt(invitations.expiresAt, now));
  await db.delete(reportShares).where(lt(reportShares.expiresAt, now));
  await db.delete(rateLimits).where(lt(rateLimits.expire, now));
  await db.delete(mailOutbox).where(lt(mailOutbox.createdAt, fromNow(clock, -mailKeptMs)));
}
