import type { PageQuery } from '#shared/api/page.ts';
import type { Studio, StudioMember } from '#shared/api/studios.ts';
import { AppError } from '#shared/errors.ts';
import type { Person } from '../accounts/sessions.ts';
import { violatesUnique } from '../db/failures.ts';
import type { AuthorizedStudio } from '../http/authorize.ts';
import { keyPage, toPage } from '../http/page-by-key.ts';
import type { Services } from '../services.ts';
import * as queries from './queries.ts';

type StudioRow = Awaited<ReturnType<typeof queries.listStudiosOf>>[number];

function toStudio(row: StudioRow): Studio {
  return { ...row, createdAt: row.createdAt.toISOString() };
}

export async function foundStudio(
  { db, clock, limits }: Services,
  person: Person,
  { name, slug }: { name: string; slug: string },
): Promise<Studio> {
  await limits.count('studios-of-person', person.userId);
  try {
    const studio = await db.transaction((transaction) =>
      queries.insertStudio(transaction, { name, slug, createdAt: clock.now() }, person.userId),
    );
    return toStudio(studio);
  } catch (error) {
    if (violatesUnique(error, 'studios_slug_key')) {
      throw new AppError('already-taken', { field: 'slug' });
    }
    throw error;
  }
}

export async function listMyStudios({ db }: Services, person: Person, query: PageQuery) {
  const page = keyPage(query);
  return toPage(page, await queries.listStudiosOf(db, person.userId, page), toStudio);
}

export async function getStudio(
  { db }: Services,
  may: AuthorizedStudio<'read-studio'>,
): Promise<Studio> {
  return toStudio({ ...(await queries.findStudio(db, may.studioId)), role: may.role });
}

export async function listMembers(
  { db }: Services,
  may: AuthorizedStudio<'manage-staff'>,
  query: PageQuery,
) {
  const page = keyPage(query);
  const rows = await queries.listMembers(db, may.studioId, page);
  return toPage(page, rows, ({ userId, name, email, role, joinedAt }): StudioMember => ({
    ...{ userId, name, email, role },
    joinedAt: joinedAt.toISOString(),
  }));
}

export async function removeMember(
  { db }: Services,
  may: AuthorizedStudio<'manage-staff'>,
  userId: string,
): Promise<void> {
  const member = await queries.findMember(db, may.studioId, userId);
  if (!member) throw new AppError('not-found');
  if (member.role === 'owner') throw new AppError('not-allowed');
  await queries.deleteMember(db, member.id);
}
