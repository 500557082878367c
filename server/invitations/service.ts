import type { Invitation, InvitedRole } from '#shared/api/invitations.ts';
import type { PageQuery } from '#shared/api/page.ts';
import { AppError } from '#shared/errors.ts';
import { hashPassword } from '../accounts/passwords.ts';
import { findUserByEmail, insertUser } from '../accounts/queries.ts';
import type { Person } from '../accounts/sessions.ts';
import { fromNow, msPerDay } from '../clock.ts';
import type { Transaction } from '../db/client.ts';
import { violatesUnique } from '../db/failures.ts';
import type {
  AuthorizedInvitation,
  AuthorizedProject,
  AuthorizedStudio,
} from '../http/authorize.ts';
import { keyPage, toPage } from '../http/page-by-key.ts';
import type { MailMessage } from '../mail/messages.ts';
import { newSecret } from '../secret.ts';
import type { Services } from '../services.ts';
import { findStudio } from '../studios/queries.ts';
import * as queries from './queries.ts';

const goodForMs = 14 * msPerDay;

type InvitationRow = Awaited<ReturnType<typeof queries.putInvitation>>;

function toInvitation({ id, email, role, createdAt, expiresAt }: InvitationRow): Invitation {
  return {
    ...{ id, email, role },
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
  };
}

export async function inviteAssistant(
  services: Services,
  may: AuthorizedStudio<'manage-staff'>,
  email: string,
): Promise<Invitation> {
  const { studioId, person } = may;
  return invite(services, person, { studioId }, email, 'assistant', async (transaction, secret) => {
    const { name: studioName } = await findStudio(transaction, studioId);
    return { kind: 'invitation-to-studio', secret, invitedBy: person.name, studioName };
  });
}

export async function inviteToProject(
  services: Services,
  may: AuthorizedProject<'invite-artist'> | AuthorizedProject<'invite-bandmate'>,
  email: string,
  role: 'artist' | 'bandmate',
): Promise<Invitation> {
  const { projectId, person } = may;
  return invite(services, person, { projectId }, email, role, async (transaction, secret) => {
    const project = await queries.findProjectForInvitation(transaction, projectId);
    if (!project?.studioName || !project.artistName) throw new AppError('not-allowed');
    return {
      kind: 'invitation-to-project',
      ...{ secret, role },
      invitedBy: person.name,
      projectTitle: project.title,
      artistName: project.artistName,
      studioName: project.studioName,
    };
  });
}

async function invite(
  { db, clock, limits, mail }: Services,
  person: Person,
  to: queries.InvitedTo,
  email: string,
  role: InvitedRole,
  writeMessage: (transaction: Transaction, secret: string) => Promise<MailMessage>,
): Promise<Invitation> {
  await limits.count('invitations-of-person', person.userId);
  await limits.count('mail-to-address', email);
  const { secret, secretHash } = newSecret();
  const row = await db.transaction(async (transaction) => {
    const invitation = await queries.putInvitation(transaction, to, {
      tokenHash: secretHash,
      ...{ email, role },
      invitedBy: person.userId,
      createdAt: clock.now(),
      expiresAt: fromNow(clock, goodForMs),
    });
    await mail.queue(transaction, {
      cause: `invitation:${invitation.id}`,
      recipient: email,
      message: await writeMessage(transaction, secret),
    });
    return invitation;
  });
  return toInvitation(row);
}

export async function listStudioInvitations(
  services: Services,
  { studioId }: AuthorizedStudio<'manage-staff'>,
  query: PageQuery,
) {
  return listInvitations(services, { studioId }, query);
}

export async function listProjectInvitations(
  services: Services,
  { projectId }: AuthorizedProject<'read-invitations'>,
  query: PageQuery,
) {
  return listInvitations(services, { projectId }, query);
}

async function listInvitations({ db, clock }: Services, to: queries.InvitedTo, query: PageQuery) {
  const page = keyPage(query);
  return toPage(page, await queries.listInvitations(db, to, clock.now(), page), toInvitation);
}

export async function revokeInvitation({ db }: Services, may: AuthorizedInvitation): Promise<void> {
  await queries.deleteInvitation(db, may.invitationId);
}

/** What a link stands for. Whoever has the link is its reader: no other right is needed. */
export async function readInvitation({ db, clock }: Services, secret: string) {
  const found = await queries.readInvitation(db, secret, clock.now());
  if (!found) throw new AppError('link-expired');
  const { role, email, expiresAt } = found.invitation;
  return {
    ...{ role, email },
    invitedBy: found.invitedBy,
    hasAccount: (await findUserByEmail(db, email)) !== null,
    studioName: found.studioName,
    projectTitle: found.projectTitle,
    expiresAt: expiresAt.toISOString(),
  };
}

/**
 * Joins the person, or a new account for the address the invitation went to. Returns whose
 * session must begin and where they now belong.
 */
export async function acceptInvitation(
  { db, clock }: Services,
  person: Person | null,
  secret: string,
  newAccount: { name: string; password: string } | undefined,
): Promise<{ userId: string; studioSlug: string | null; projectId: string | null }> {
  const found = await queries.readInvitation(db, secret, clock.now());
  if (!found) throw new AppError('link-expired');
  if (!person && !newAccount) throw new AppError('sign-in-required');
  const passwordHash = person || !newAccount ? '' : await hashPassword(newAccount.password);
  try {
    return await db.transaction(async (transaction) => {
      const invitation = await queries.takeInvitation(transaction, secret, clock.now());
      if (!invitation) throw new AppError('link-expired');
      const userId =
        person?.userId ??
        (await insertUser(transaction, {
          name: newAccount?.name ?? '',
          email: invitation.email,
          passwordHash,
          createdAt: clock.now(),
        }));
      await join(transaction, invitation, userId, clock.now());
      const { projectId } = invitation;
      return { userId, studioSlug: projectId ? null : found.studioSlug, projectId };
    });
  } catch (error) {
    if (violatesUnique(error, 'users_email_key')) {
      throw new AppError('already-taken', { field: 'email' });
    }
    throw error;
  }
}

/** Makes the membership. Who is already more than they are invited to be gets `conflict`. */
async function join(
  transaction: Transaction,
  { role, studioId, projectId }: InvitationRow,
  userId: string,
  joinedAt: Date,
): Promise<void> {
  if (role === 'assistant' && studioId) {
    const current = await queries.findStudioRole(transaction, studioId, userId);
    if (current === 'owner') throw new AppError('conflict', { current });
    await queries.insertAssistant(transaction, { studioId, userId, joinedAt });
  } else if (role !== 'assistant' && projectId) {
    const project = await queries.findProjectForInvitation(transaction, projectId);
    const staff =
      project?.studioId &&
      (await queries.findStudioRole(transaction, project.studioId, userId)) === 'owner'
        ? 'owner'
        : null;
    const current = staff ?? (await queries.findProjectRole(transaction, projectId, userId));
    if (current === 'owner' || current === 'assistant') throw new AppError('conflict', { current });
    await queries.putProjectMember(transaction, { projectId, userId, role, joinedAt });
  }
}
