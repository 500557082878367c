import { eq, lt } from 'drizzle-orm';
import { Lucia, TimeSpan, type Adapter } from 'lucia';
import { msPerDay, type Clock } from '../clock.ts';
import type { Database, Queryable } from '../db/client.ts';
import { sessions as sessionTable, users } from '../db/schema.ts';
import { sha256Hex } from '../secret.ts';

/*
 * The only module that knows lucia: replacing it means rewriting this file and nothing else.
 * lucia would store the cookie's value as it is; the adapter below stores its hash instead, so
 * that somebody who reads the database cannot sign in as anybody.
 */

/** The signed-in person. */
export type Person = { readonly userId: string; readonly name: string; readonly email: string };

/** A session ends when it was not used for this long … */
export const idleLifetimeMs = 7 * msPerDay;
/** … and this long after signing in at the latest (OWASP ASVS 4.0, 3.3.2, level 1: 30 days). */
export const absoluteLifetimeMs = 30 * msPerDay;

/** `__Host-`: the browser takes it only with Secure, Path=/ and no Domain (RFC 6265bis). */
export const sessionCookieName = '__Host-flightcase';

export type Sessions = {
  /** Who the Cookie header belongs to; null for a visitor. */
  read(cookieHeader: string): Promise<{
    person: Person;
    sessionId: string;
    /** A Set-Cookie value when the idle lifetime was moved on. */
    renewedCookie: string | null;
  } | null>;
  /** Makes a session with a new id. */
  start(userId: string): Promise<{ sessionId: string; cookie: string }>;
  end(sessionId: string): Promise<void>;
  /** Ends every session of a person, together with the change that is the reason. */
  endAllOf(db: Queryable, userId: string): Promise<void>;
  /** A Set-Cookie value that removes the cookie. */
  blankCookie(): string;
};

type UserAttributes = Pick<Person, 'name' | 'email'>;

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<Record<never, never>, UserAttributes>;
    DatabaseUserAttributes: UserAttributes;
  }
}

export function createSessions(db: Database, clock: Clock): Sessions {
  const lucia = new Lucia(createAdapter(db, clock), {
    sessionExpiresIn: new TimeSpan(idleLifetimeMs, 'ms'),
    sessionCookie: {
      name: sessionCookieName,
      attributes: { secure: true, sameSite: 'lax', path: '/' },
    },
    getUserAttributes: ({ name, email }) => ({ name, email }),
  });
  return {
    async read(cookieHeader) {
      const sessionId = lucia.readSessionCookie(cookieHeader);
      if (!sessionId) return null;
      const { session, user } = await lucia.validateSession(sessionId);
      if (!session) return null;
      return {
        person: { userId: user.id, name: user.name, email: user.email },
        sessionId: session.id,
        renewedCookie: session.fresh ? lucia.createSessionCookie(session.id).serialize() : null,
      };
    },
    async start(userId) {
      const { id } = await lucia.createSession(userId, {});
      return { sessionId: id, cookie: lucia.createSessionCookie(id).serialize() };
    },
    end: (sessionId) => lucia.invalidateSession(sessionId),
    async endAllOf(queryable, userId) {
      await queryable.delete(sessionTable).where(eq(sessionTable.userId, userId));
    },
    blankCookie: () => lucia.createBlankSessionCookie().serialize(),
  };
}

/**
 * Stores the SHA-256 of each id and gives lucia the plain id back, which it puts into renewed
 * cookies. lucia reads the system's clock; the adapter moves its dates by the difference to
 * ours. The absolute lifetime is ours alone: lucia does not hear of a session beyond it.
 */
function createAdapter(db: Database, clock: Clock): Adapter {
  const offsetMs = () => clock.now().getTime() - Date.now();
  const toLucia = (moment: Date) => new Date(moment.getTime() - offsetMs());
  const fromLucia = (moment: Date) => new Date(moment.getTime() + offsetMs());

  return {
    async getSessionAndUser(sessionId) {
      const [row] = await db
        .select({
          userId: sessionTable.userId,
          createdAt: sessionTable.createdAt,
          expiresAt: sessionTable.expiresAt,
          name: users.name,
          email: users.email,
        })
        .from(sessionTable)
        .innerJoin(users, eq(users.id, sessionTable.userId))
        .where(eq(sessionTable.idHash, sha256Hex(sessionId)));
      if (!row) return [null, null];
      if (row.createdAt.getTime() + absoluteLifetimeMs <= clock.now().getTime()) {
        await this.deleteSession(sessionId);
        return [null, null];
      }
      const { userId, name, email } = row;
      return [
        { id: sessionId, userId, expiresAt: toLucia(row.expiresAt), attributes: {} },
        { id: userId, attributes: { name, email } },
      ];
    },
    getUserSessions() {
      // Its answer would have to hold plain ids, which are nowhere.
      throw new Error('sessions cannot be listed with their ids');
    },
    async setSession(session) {
      await db.insert(sessionTable).values({
        idHash: sha256Hex(session.id),
        userId: session.userId,
        createdAt: clock.now(),
        expiresAt: fromLucia(session.expiresAt),
      });
    },
    async updateSessionExpiration(sessionId, expiresAt) {
      await db
        .update(sessionTable)
        .set({ expiresAt: fromLucia(expiresAt) })
        .where(eq(sessionTable.idHash, sha256Hex(sessionId)));
    },
    async deleteSession(sessionId) {
      await db.delete(sessionTable).where(eq(sessionTable.idHash, sha256Hex(sessionId)));
    },
    async deleteUserSessions(userId) {
      await db.delete(sessionTable).where(eq(sessionTable.userId, userId));
    },
    async deleteExpiredSessions() {
      await db.delete(sessionTable).where(lt(sessionTable.expiresAt, clock.now()));
    },
  };
}
