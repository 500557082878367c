import { and, asc, eq } from 'drizzle-orm';
import type { Queryable, Transaction } from '../db/client.ts';
import { studioMembers, studios, users } from '../db/schema.ts';
import { newerThan, type KeyPage } from '../http/page-by-key.ts';

const studioColumns = {
  id: studios.id,
  slug: studios.slug,
  name: studios.name,
  role: studioMembers.role,
  createdAt: studios.createdAt,
};

export async function insertStudio(
  transaction: Transaction,
  studio: { slug: string; name: string; createdAt: Date },
  ownerId: string,
) {
  const [row] = await transaction.insert(studios).values(studio).returning();
  if (!row) throw new Error('no key of the new studio');
  await transaction
    .insert(studioMembers)
    .values({ studioId: row.id, userId: ownerId, role: 'owner', joinedAt: studio.createdAt });
  return { ...row, role: 'owner' as const };
}

/** The studios of a person, in the order they were founded. */
export async function listStudiosOf(db: Queryable, userId: string, page: KeyPage) {
  return db
    .select(studioColumns)
    .from(studioMembers)
    .innerJoin(studios, eq(studios.id, studioMembers.studioId))
    .where(and(eq(studioMembers.userId, userId), newerThan(page, studios.id)))
    .orderBy(asc(studios.id))
    .limit(page.fetch);
}

export async function findStudio(db: Queryable, studioId: string) {
  const [studio] = await db.select().from(studios).where(eq(studios.id, studioId));
  if (!studio) throw new Error('a membership without its studio');
  return studio;
}

/** Who works for a studio, in the order of joining; `id` is the membership's. */
export async function listMembers(db: Queryable, studioId: string, page: KeyPage) {
  return db
    .select({
      id: studioMembers.id,
      userId: users.id,
      name: users.name,
      email: users.email,
      role: studioMembers.role,
      joinedAt: studioMembers.joinedAt,
    })
    .from(studioMembers)
    .innerJoin(users, eq(users.id, studioMembers.userId))
    .where(and(eq(studioMembers.studioId, studioId), newerThan(page, studioMembers.id)))
    .orderBy(asc(studioMembers.id))
    .limit(page.fetch);
}

export async function findMember(db: Queryable, studioId: string, userId: string) {
  const [member] = await db
    .select({ id: studioMembers.id, role: studioMembers.role })
    .from(studioMembers)
    .where(and(eq(studioMembers.studioId, studioId), eq(studioMembers.userId, userId)));
  return member ?? null;
}

/** The database takes them off the studio's projects at the same time. */
export async function deleteMember(db: Queryable, memberId: string): Promise<void> {
  await db.delete(studioMembers).where(eq(studioMembers.id, memberId));
}
