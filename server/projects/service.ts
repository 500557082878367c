import type { PageQuery } from '#shared/api/page.ts';
import type { Project, ProjectMember, Song } from '#shared/api/projects.ts';
import { AppError } from '#shared/errors.ts';
import type { Person } from '../accounts/sessions.ts';
import type {
  AuthorizedProject,
  AuthorizedRemoval,
  AuthorizedSong,
  AuthorizedStudio,
} from '../http/authorize.ts';
import { keyPage, toPage } from '../http/page-by-key.ts';
import type { Services } from '../services.ts';
import * as queries from './queries.ts';

type ProjectRow = Awaited<ReturnType<typeof queries.findProject>>;

function toProject(row: ProjectRow, userId: string): Project {
  const owns = row.ownerId === userId || row.studioRole === 'owner';
  const role = owns ? 'owner' : row.projectRole;
  if (!role) throw new Error('a listed project without a role in it');
  const { id, kind, title, artistName, rulesEditionNumber } = row;
  return {
    ...{ id, kind, title, artistName, rulesEditionNumber, role },
    studio:
      row.studioId && row.studioSlug && row.studioName
        ? { id: row.studioId, slug: row.studioSlug, name: row.studioName }
        : null,
    createdAt: row.createdAt.toISOString(),
  };
}

export async function listMyProjects({ db }: Services, { userId }: Person, query: PageQuery) {
  const page = keyPage(query);
  const rows = await queries.listProjectsOf(db, userId, page);
  return toPage(page, rows, (row) => toProject(row, userId));
}

export async function getProject(
  { db }: Services,
  { projectId, person }: AuthorizedProject<'read-project'>,
): Promise<Project> {
  return toProject(await queries.findProject(db, person.userId, projectId), person.userId);
}

export async function createProject(
  { db, clock }: Services,
  { studioId, person }: AuthorizedStudio<'open-project'>,
  { title, artistName }: { title: string; artistName: string },
): Promise<Project> {
  const row = await db.transaction(async (transaction) => {
    const createdAt = clock.now();
    const project = { studioId, title, artistName, createdAt };
    const projectId = await queries.insertProject(transaction, project);
    return queries.findProject(transaction, person.userId, projectId);
  });
  return toProject(row, person.userId);
}

export async function listMembers(
  { db }: Services,
  { projectId }: AuthorizedProject<'read-project'>,
  query: PageQuery,
) {
  const page = keyPage(query);
  const rows = await queries.listMembers(db, projectId, page);
  return toPage(page, rows, ({ userId, name, email, role, joinedAt }): ProjectMember => ({
    ...{ userId, name, email, role },
    joinedAt: joinedAt.toISOString(),
  }));
}

/** `not-found` when the person is no assistant of this studio, `conflict` when they are its artist. */
export async function putAssistantOnProject(
  { db, clock }: Services,
  { projectId, studioId }: AuthorizedProject<'manage-assistants'>,
  userId: string,
): Promise<void> {
  if (!studioId) throw new AppError('not-allowed');
  await db.transaction(async (transaction) => {
    if (!(await queries.isAssistantOf(transaction, studioId, userId))) {
      throw new AppError('not-found');
    }
    const before = await queries.putAssistant(transaction, {
      ...{ projectId, userId },
      assistantStudioId: studioId,
      joinedAt: clock.now(),
    });
    if (before === 'artist' || before === 'bandmate') {
      throw new AppError('conflict', { current: before });
    }
  });
}

export async function removeMember({ db }: Services, may: AuthorizedRemoval): Promise<void> {
  await queries.deleteMember(db, may.projectId, may.userId);
}

type SongRow = Awaited<ReturnType<typeof queries.findSong>>;

function toSong({ id, projectId, title, createdAt }: SongRow): Song {
  return { id, projectId, title, createdAt: createdAt.toISOString() };
}

export async function listSongs(
  { db }: Services,
  { projectId }: AuthorizedProject<'read-project'>,
  query: PageQuery,
) {
  const page = keyPage(query);
  return toPage(page, await queries.listSongs(db, projectId, page), toSong);
}

export async function createSong(
  { db, clock }: Services,
  { projectId }: AuthorizedProject<'add-song'>,
  title: string,
): Promise<Song> {
  return toSong(await queries.insertSong(db, { projectId, title, createdAt: clock.now() }));
}

export async function getSong(
  { db }: Services,
  { songId }: AuthorizedSong<'read-project'>,
): Promise<Song> {
  return toSong(await queries.findSong(db, songId));
}
