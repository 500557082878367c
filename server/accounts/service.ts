import { v7 as uuidV7 } from 'uuid';
import type { Session } from '#shared/api/accounts.ts';
import { AppError } from '#shared/errors.ts';
import { fromNow, msPerDay, msPerHour } from '../clock.ts';
import { violatesUnique } from '../db/failures.ts';
import { networkOf } from '../http/limits.ts';
import type { Services } from '../services.ts';
import { hashPassword, verifyPassword } from './passwords.ts';
import * as queries from './queries.ts';
import type { Person } from './sessions.ts';

const confirmationGoodForMs = msPerDay;
const resetGoodForMs = msPerHour;

/** Queues the mail that leads to an account, or says that there is one already. */
export async function register(
  services: Services,
  { name, email }: { name: string; email: string },
  networkAddress: string,
): Promise<void> {
  await mailLink(services, { kind: 'confirm-account', email, name }, networkAddress);
}

/** Makes the account behind a confirmation link; returns its key. */
export async function confirmAccount(
  { db, clock }: Services,
  { token, password }: { token: string; password: string },
): Promise<string> {
  const { email } = await requireUsable(db, 'confirm-account', token, clock.now());
  const passwordHash = await hashPassword(password);
  try {
    return await db.transaction(async (transaction) => {
      await queries.lockConfirmations(transaction, email);
      const taken = await queries.takeToken(transaction, 'confirm-account', token, clock.now());
      if (!taken?.name) throw new AppError('link-expired');
      const { name } = taken;
      const createdAt = clock.now();
      return queries.insertUser(transaction, { name, email, passwordHash, createdAt });
    });
  } catch (error) {
    // Two links for the same address used at once: the second has nothing left to confirm.
    if (violatesUnique(error, 'users_email_key')) throw new AppError('link-expired');
    throw error;
  }
}

/** Checks address and password; returns the account's key or throws `sign-in-failed`. */
export async function signIn(
  services: Services,
  { email, password }: { email: string; password: string },
  networkAddress: string,
): Promise<string> {
  return checkPassword(services, email, password, networkAddress, () =>
    queries.findUserByEmail(services.db, email),
  );
}

export async function readSession({ db }: Services, person: Person | null): Promise<Session> {
  if (!person) return { user: null, studios: [] };
  const [privateProjectId, studios] = await Promise.all([
    queries.findPrivateProjectId(db, person.userId),
    queries.listStudiosOf(db, person.userId),
  ]);
  const { userId: id, name, email } = person;
  return { user: { id, name, email, privateProjectId }, studios };
}

/** The same for somebody whose session has only just begun. */
export async function readSessionOf(services: Services, userId: string): Promise<Session> {
  const user = await queries.findUserById(services.db, userId);
  if (!user) throw new Error('the account is gone');
  return readSession(services, { userId, name: user.name, email: user.email });
}

/** Queues the mail with the reset link, or says that no account has this address. */
export async function requestPasswordReset(
  services: Services,
  { email }: { email: string },
  networkAddress: string,
): Promise<void> {
  await mailLink(services, { kind: 'reset-password', email }, networkAddress);
}

/** Sets the password behind a reset link and ends all sessions; returns the account's key. */
export async function resetPassword(
  services: Services,
  { token, password }: { token: string; password: string },
): Promise<string> {
  const { db, clock } = services;
  const { userId } = await requireUsable(db, 'reset-password', token, clock.now());
  const passwordHash = await hashPassword(password);
  return db.transaction(async (transaction) => {
    if (userId) await queries.lockUser(transaction, userId);
    const taken = await queries.takeToken(transaction, 'reset-password', token, clock.now());
    if (!taken?.userId) throw new AppError('link-expired');
    await replacePassword(services, transaction, taken.userId, passwordHash);
    return taken.userId;
  });
}

export async function changePassword(
  services: Services,
  person: Person,
  { currentPassword, newPassword }: { currentPassword: string; newPassword: string },
  networkAddress: string,
): Promise<void> {
  await checkOwnPassword(services, person, currentPassword, networkAddress);
  const passwordHash = await hashPassword(newPassword);
  await services.db.transaction((transaction) =>
    replacePassword(services, transaction, person.userId, passwordHash),
  );
}

/** Queues the mail to the new address: a link, or that the address is in use. */
export async function requestAddressChange(
  services: Services,
  person: Person,
  { newEmail, password }: { newEmail: string; password: string },
  networkAddress: string,
): Promise<void> {
  const { db, mail, clock } = services;
  await checkOwnPassword(services, person, password, networkAddress);
  await countMailRequest(services, newEmail, networkAddress);
  await db.transaction(async (transaction) => {
    const inUse = await queries.findUserByEmail(transaction, newEmail);
    const token = await queries.insertAddressToken(transaction, {
      userId: person.userId,
      email: newEmail,
      createdAt: clock.now(),
      expiresAt: fromNow(clock, confirmationGoodForMs),
    });
    await mail.queue(transaction, {
      cause: `change-address:${token.id}`,
      recipient: newEmail,
      message: inUse
        ? { kind: 'address-in-use' }
        : { kind: 'change-address', secret: token.secret },
      goodForMs: confirmationGoodForMs,
    });
  });
}

/** Moves the account to the address behind a link, tells the old one, ends all sessions. */
export async function confirmAddressChange(
  { db, clock, mail, sessions }: Services,
  { token }: { token: string },
): Promise<{ userId: string; email: string }> {
  try {
    const { userId } = await requireUsable(db, 'change-address', token, clock.now());
    return await db.transaction(async (transaction) => {
      const before = userId && (await queries.lockUser(transaction, userId));
      const taken = await queries.takeToken(transaction, 'change-address', token, clock.now());
      if (!before || !taken) throw new AppError('link-expired');
      const { email } = taken;
      await queries.updateEmail(transaction, userId, email);
      // A reset link that waits in the old mailbox must not open the account any more.
      await queries.deleteTokensOf(transaction, userId, 'reset-password');
      await sessions.endAllOf(transaction, userId);
      await mail.queue(transaction, {
        cause: `address-changed:${taken.id}`,
        recipient: before.email,
        message: { kind: 'address-changed' },
      });
      return { userId, email };
    });
  } catch (error) {
    // The address got an account of its own while the link was on its way.
    if (violatesUnique(error, 'users_email_key')) throw new AppError('link-expired');
    throw error;
  }
}

/** Before the costly hash of a password: a dead link must be cheap to answer. */
async function requireUsable(...link: Parameters<typeof queries.findToken>) {
  const token = await queries.findToken(...link);
  if (!token) throw new AppError('link-expired');
  return token;
}

async function replacePassword(
  { mail, sessions }: Services,
  transaction: Parameters<typeof queries.updatePassword>[0],
  userId: string,
  passwordHash: string,
): Promise<void> {
  const { email } = await queries.updatePassword(transaction, userId, passwordHash);
  await queries.deleteTokensOf(transaction, userId, 'reset-password');
  await queries.deleteTokensOf(transaction, userId, 'change-address');
  await sessions.endAllOf(transaction, userId);
  await mail.queue(transaction, {
    cause: `password-changed:${uuidV7()}`,
    recipient: email,
    message: { kind: 'password-changed' },
  });
}

/** What the mail says when there is no link to send. */
const withoutLink = {
  'confirm-account': 'account-exists',
  'reset-password': 'no-account',
} as const;

/**
 * Queues a mail to the address whatever is known about it, by the same statements, so that
 * neither the answer nor its duration tells whether it has an account.
 */
async function mailLink(
  services: Services,
  wanted: queries.TokenByEmail,
  networkAddress: string,
): Promise<void> {
  const { db, mail, clock } = services;
  const { kind, email } = wanted;
  const goodForMs = kind === 'confirm-account' ? confirmationGoodForMs : resetGoodForMs;
  await countMailRequest(services, email, networkAddress);
  await db.transaction(async (transaction) => {
    const expiresAt = fromNow(clock, goodForMs);
    const token = await queries.insertTokenByEmail(transaction, wanted, clock.now(), expiresAt);
    await mail.queue(transaction, {
      cause: `${kind}:${token?.id ?? uuidV7()}`,
      recipient: email,
      message: token ? { kind, secret: token.secret } : { kind: withoutLink[kind] },
      goodForMs,
    });
  });
}

async function countMailRequest(
  { limits }: Services,
  email: string,
  networkAddress: string,
): Promise<void> {
  await limits.count('mail-from-network', networkOf(networkAddress));
  await limits.count('mail-to-address', email);
}

async function checkOwnPassword(
  services: Services,
  person: Person,
  password: string,
  networkAddress: string,
): Promise<void> {
  await checkPassword(services, person.email, password, networkAddress, () =>
    queries.findUserById(services.db, person.userId),
  );
}

/**
 * Counts the try before it looks (so that many at once cannot slip through), takes it back when
 * the password is right.
 */
async function checkPassword(
  { limits }: Services,
  email: string,
  password: string,
  networkAddress: string,
  findUser: () => Promise<{ id: string; passwordHash: string } | null>,
): Promise<string> {
  const network = networkOf(networkAddress);
  const counted = [
    ['password-network', network],
    ['password-from-network', `${email} ${network}`],
    ['password-of-account', email],
  ] as const;
  for (const [name, key] of counted) await limits.count(name, key);
  const user = await findUser();
  const right = await verifyPassword(user?.passwordHash ?? null, password);
  if (!user || !right) throw new AppError('sign-in-failed');
  for (const [name, key] of counted) await limits.giveBack(name, key);
  return user.id;
}
