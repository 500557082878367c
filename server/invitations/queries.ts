import { and, desc, eq, gt, sql } from 'drizzle-orm';
import { v7 as uuidV7 } from 'uuid';
import type { InvitedRole } from '#shared/api/invitations.ts';
import type { Queryable, Transaction } from '../db/client.ts';
import {
  invitations,
  projectMembers,
  projects,
  studioMembers,
  studios,
  users,
} from '../db/schema.ts';
import { olderThan, type KeyPage } from '../http/page-by-key.ts';
import { sha256Hex } from '../secret.ts';

/** Where somebody is invited to: exactly one of a studio and a project. */
export type InvitedTo = { studioId: string } | { projectId: string };

function isFor(to: InvitedTo) {
  return 'studioId' in to
    ? eq(invitations.studioId, to.studioId)
    : eq(invitations.projectId, to.projectId);
}

/** Stores an invitation; an open one to the same address and place is replaced. */
export async function putInvitation(
  transaction: Transaction,
  to: InvitedTo,
  invitation: {
    tokenHash: string;
    email: string;
    role: InvitedRole;
    invitedBy: string;
    createdAt: Date;
    expiresAt: Date;
  },
) {
  const values = { id: uuidV7(), ...invitation };
  const place = 'studioId' in to ? invitations.studioId : invitations.projectId;
  const [row] = await transaction
    .insert(invitations)
    .values({ ...values, ...to })
    .onConflictDoUpdate({ target: [place, invitations.email], set: values })
    .returning();
  if (!row) throw new Error('no key of the new invitation');
  return row;
}

/** Open invitations to one place, newest first. */
export async function listInvitations(db: Queryable, to: InvitedTo, now: Date, page: KeyPage) {
  return db
    .select()
    .from(invitations)
    .where(and(isFor(to), gt(invitations.expiresAt, now), olderThan(page, invitations.id)))
    .orderBy(desc(invitations.id))
    .limit(page.fetch);
}

/** An open invitation with the names its page shows; null when the link does not work. */
export async function readInvitation(db: Queryable, secret: string, now: Date) {
  const [row] = await db
    .select({
      invitation: invitations,
      invitedBy: users.name,
      studioSlug: studios.slug,
      studioName: studios.name,
      projectTitle: projects.title,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .leftJoin(projects, eq(projects.id, invitations.projectId))
    // The studio that invites, or the one whose project it is.
    .leftJoin(studios, studioOfInvitation())
    .where(and(eq(invitations.tokenHash, sha256Hex(secret)), gt(invitations.expiresAt, now)));
  return row ?? null;
}

function studioOfInvitation() {
  return sql`${studios.id} = coalesce(${invitations.studioId}, ${projects.studioId})`;
}

/** Uses an invitation up: of several who use it at once, one gets it. */
export async function takeInvitation(transaction: Transaction, secret: string, now: Date) {
  const [row] = await transaction
    .delete(invitations)
    .where(and(eq(invitations.tokenHash, sha256Hex(secret)), gt(invitations.expiresAt, now)))
    .returning();
  return row ?? null;
}

export async function deleteInvitation(db: Queryable, invitationId: string): Promise<void> {
  await db.delete(invitations).where(eq(invitations.id, invitationId));
}

export async function findStudioRole(db: Queryable, studioId: string, userId: string) {
  const [member] = await db
    .select({ role: studioMembers.role })
    .from(studioMembers)
    .where(and(eq(studioMembers.studioId, studioId), eq(studioMembers.userId, userId)));
  return member?.role ?? null;
}

export async function insertAssistant(
  transaction: Transaction,
  member: { studioId: string; userId: string; joinedAt: Date },
): Promise<void> {
  await transaction
    .insert(studioMembers)
    .values({ ...member, role: 'assistant' })
    .onConflictDoNothing();
}

export async function findProjectForInvitation(db: Queryable, projectId: string) {
  const [project] = await db
    .select({
      title: projects.title,
      artistName: projects.artistName,
      studioId: projects.studioId,
      studioName: studios.name,
    })
    .from(projects)
    .leftJoin(studios, eq(studios.id, projects.studioId))
    .where(eq(projects.id, projectId));
  return project ?? null;
}

export async function findProjectRole(db: Queryable, projectId: string, userId: string) {
  const [member] = await db
    .select({ role: projectMembers.role })
    .from(projectMembers)
    .where(and(eq(projectMembers.projectId, projectId), eq(projectMembers.userId, userId)));
  return member?.role ?? null;
}

/** Makes somebody artist or bandmate; a bandmate can become the artist, not the other way. */
export async function putProjectMember(
  transaction: Transaction,
  member: { projectId: string; userId: string; role: 'artist' | 'bandmate'; joinedAt: Date },
): Promise<void> {
  const insert = transaction.insert(projectMembers).values(member);
  const target = [projectMembers.projectId, projectMembers.userId];
  if (member.role === 'artist') {
    await insert.onConflictDoUpdate({
      target,
      set: { role: 'artist' },
      setWhere: eq(projectMembers.role, 'bandmate'),
    });
  } else {
    await insert.onConflictDoNothing({ target });
  }
}
