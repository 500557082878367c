import { and, asc, eq, gt, sql } from 'drizzle-orm';
import { v7 as uuidV7 } from 'uuid';
import type { Queryable, Transaction } from '../db/client.ts';
import { accountTokens, projects, studioMembers, studios, users } from '../db/schema.ts';
import { newSecret, sha256Hex } from '../secret.ts';

type TokenKind = (typeof accountTokens.$inferSelect)['kind'];

export async function findUserByEmail(db: Queryable, email: string) {
  const [user] = await db.select().from(users).where(eq(users.email, email));
  return user ?? null;
}

export async function findUserById(db: Queryable, userId: string) {
  const [user] = await db.select().from(users).where(eq(users.id, userId));
  return user ?? null;
}

/*
 * Order of locks, the same in every transaction, so that no two wait for each other: links that
 * wait for an address (by key), then the account, then its own links.
 */

/** Holds back everybody else who would make an account for the address. */
export async function lockConfirmations(transaction: Transaction, email: string): Promise<void> {
  await transaction
    .select({ id: accountTokens.id })
    .from(accountTokens)
    .where(and(eq(accountTokens.email, email), eq(accountTokens.kind, 'confirm-account')))
    .orderBy(asc(accountTokens.id))
    .for('update');
}

/** Holds back every other change of the account. */
export async function lockUser(transaction: Transaction, userId: string) {
  const [user] = await transaction.select().from(users).where(eq(users.id, userId)).for('update');
  return user ?? null;
}

/** Makes an account with its private project; the address must have been confirmed. */
export async function insertUser(
  transaction: Transaction,
  user: { name: string; email: string; passwordHash: string; createdAt: Date },
): Promise<string> {
  // Links that are on their way to make the same account lead nowhere from now on.
  await lockConfirmations(transaction, user.email);
  await transaction
    .delete(accountTokens)
    .where(and(eq(accountTokens.email, user.email), eq(accountTokens.kind, 'confirm-account')));
  const [row] = await transaction.insert(users).values(user).returning({ id: users.id });
  if (!row) throw new Error('no key of the new user');
  await transaction
    .insert(projects)
    .values({ kind: 'private', ownerId: row.id, title: 'My checks', createdAt: user.createdAt });
  return row.id;
}

/** A link that somebody asks for who is not signed in. */
export type TokenByEmail =
  | { kind: 'confirm-account'; email: string; name: string }
  | { kind: 'reset-password'; email: string };

/**
 * Makes a link for a new account if the address has none, or for an existing one if it has; the
 * same one statement either way, so that its duration tells nothing. Null when none was made.
 */
export async function insertTokenByEmail(
  transaction: Transaction,
  token: TokenByEmail,
  createdAt: Date,
  expiresAt: Date,
): Promise<{ id: string; secret: string } | null> {
  const { secret, secretHash } = newSecret();
  const id = uuidV7();
  const name = token.kind === 'confirm-account' ? token.name : null;
  const known = sql`select id from ${users} where ${users.email} = ${token.email}`;
  const owner =
    token.kind === 'confirm-account'
      ? sql`select null::uuid as id where not exists (${known})`
      : known;
  const made = await transaction.execute(sql`
    insert into ${accountTokens}
      (id, kind, token_hash, user_id, email, name, created_at, expires_at)
    select ${id}::uuid, ${token.kind}, ${secretHash}, owner.id, ${token.email}, ${name}::text,
      ${createdAt.toISOString()}::timestamptz, ${expiresAt.toISOString()}::timestamptz
    from (${owner}) as owner
    returning id`);
  return made.length > 0 ? { id, secret } : null;
}

/** Makes the link that confirms another address of an account; an older one stops working. */
export async function insertAddressToken(
  transaction: Transaction,
  token: { userId: string; email: string; createdAt: Date; expiresAt: Date },
): Promise<{ id: string; secret: string }> {
  const kind = 'change-address' as const;
  await deleteTokensOf(transaction, token.userId, kind);
  const { secret, secretHash } = newSecret();
  const id = uuidV7();
  await transaction.insert(accountTokens).values({ id, kind, tokenHash: secretHash, ...token });
  return { id, secret };
}

function usable(kind: TokenKind, secret: string, now: Date) {
  return and(
    eq(accountTokens.tokenHash, sha256Hex(secret)),
    eq(accountTokens.kind, kind),
    gt(accountTokens.expiresAt, now),
  );
}

/** What a link stands for, as long as it works. */
export async function findToken(db: Queryable, kind: TokenKind, secret: string, now: Date) {
  const [token] = await db
    .select()
    .from(accountTokens)
    .where(usable(kind, secret, now));
  return token ?? null;
}

/** Uses a link up: of several who use it at once, one gets it. Null when it does not work. */
export async function takeToken(
  transaction: Transaction,
  kind: TokenKind,
  secret: string,
  now: Date,
) {
  const [token] = await transaction
    .delete(accountTokens)
    .where(usable(kind, secret, now))
    .returning();
  return token ?? null;
}

export async function deleteTokensOf(
  transaction: Transaction,
  userId: string,
  kind: TokenKind,
): Promise<void> {
  await transaction
    .delete(accountTokens)
    .where(and(eq(accountTokens.userId, userId), eq(accountTokens.kind, kind)));
}

export async function updatePassword(
  transaction: Transaction,
  userId: string,
  passwordHash: string,
): Promise<{ email: string }> {
  const [user] = await transaction
    .update(users)
    .set({ passwordHash })
    .where(eq(users.id, userId))
    .returning({ email: users.email });
  if (!user) throw new Error('the account is gone');
  return user;
}

export async function updateEmail(
  transaction: Transaction,
  userId: string,
  email: string,
): Promise<void> {
  await transaction.update(users).set({ email }).where(eq(users.id, userId));
}

export async function findPrivateProjectId(db: Queryable, userId: string): Promise<string> {
  const [project] = await db
    .select({ id: projects.id })
    .from(projects)
    .where(eq(projects.ownerId, userId));
  if (!project) throw new Error('an account without its private project');
  return project.id;
}

/** The studios a person owns or works for, the first joined first. */
export async function listStudiosOf(db: Queryable, userId: string) {
  return db
    .select({ id: studios.id, slug: studios.slug, name: studios.name, role: studioMembers.role })
    .from(studioMembers)
    .innerJoin(studios, eq(studios.id, studioMembers.studioId))
    .where(eq(studioMembers.userId, userId))
    .orderBy(asc(studioMembers.id))
    .limit(100);
}
