import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import type { Queryable, Transaction } from '../db/client.ts';
import {
  houseRulesEditions,
  projectMembers,
  projects,
  songs,
  studioMembers,
  studios,
  users,
} from '../db/schema.ts';
import { newerThan, type KeyPage } from '../http/page-by-key.ts';

const projectColumns = {
  id: projects.id,
  kind: projects.kind,
  title: projects.title,
  artistName: projects.artistName,
  createdAt: projects.createdAt,
  ownerId: projects.ownerId,
  studioId: projects.studioId,
  studioSlug: studios.slug,
  studioName: studios.name,
  rulesEditionNumber: houseRulesEditions.number,
  studioRole: studioMembers.role,
  projectRole: projectMembers.role,
};

function selectProjects(db: Queryable, userId: string) {
  return db
    .select(projectColumns)
    .from(projects)
    .leftJoin(studios, eq(studios.id, projects.studioId))
    .leftJoin(houseRulesEditions, eq(houseRulesEditions.id, projects.rulesEditionId))
    .leftJoin(
      studioMembers,
      and(eq(studioMembers.studioId, projects.studioId), eq(studioMembers.userId, userId)),
    )
    .leftJoin(
      projectMembers,
      and(eq(projectMembers.projectId, projects.id), eq(projectMembers.userId, userId)),
    )
    .$dynamic();
}

/**
 * The projects a person may see, newest first: their private one, all of the studios they own,
 * and those they are a member of. Each of the three is read in the order of its own index and
 * only as far as the page goes.
 */
export async function listProjectsOf(db: Queryable, userId: string, page: KeyPage) {
  const isAfter = (id: typeof projects.id | typeof projectMembers.projectId) =>
    page.after === null ? sql`true` : sql`${id} < ${page.after}::uuid`;
  const visible = sql`(
    (select ${projects.id} as id from ${projects}
      where ${projects.ownerId} = ${userId} and ${isAfter(projects.id)})
    union all
    (select ${projects.id} from ${studioMembers}
      join ${projects} on ${projects.studioId} = ${studioMembers.studioId}
      where ${studioMembers.userId} = ${userId} and ${studioMembers.role} = 'owner'
        and ${isAfter(projects.id)}
      order by ${projects.id} desc limit ${page.fetch})
    union all
    (select ${projectMembers.projectId} from ${projectMembers}
      where ${projectMembers.userId} = ${userId} and ${isAfter(projectMembers.projectId)}
      order by ${projectMembers.projectId} desc limit ${page.fetch}))`;
  return selectProjects(db, userId)
    .where(inArray(projects.id, visible))
    .orderBy(desc(projects.id))
    .limit(page.fetch);
}

export async function findProject(db: Queryable, userId: string, projectId: string) {
  const [project] = await selectProjects(db, userId).where(eq(projects.id, projectId));
  if (!project) throw new Error('an authorised project that is not there');
  return project;
}

/** Opens a project held to the studio's newest edition of house rules, if there is one. */
export async function insertProject(
  transaction: Transaction,
  project: { studioId: string; title: string; artistName: string; createdAt: Date },
): Promise<string> {
  const [edition] = await transaction
    .select({ id: houseRulesEditions.id })
    .from(houseRulesEditions)
    .where(eq(houseRulesEditions.studioId, project.studioId))
    .orderBy(desc(houseRulesEditions.number))
    .limit(1);
  const [row] = await transaction
    .insert(projects)
    .values({ ...project, kind: 'studio', rulesEditionId: edition?.id ?? null })
    .returning({ id: projects.id });
  if (!row) throw new Error('no key of the new project');
  return row.id;
}

/** Who is on a project, in the order of joining; `id` is the membership's. */
export async function listMembers(db: Queryable, projectId: string, page: KeyPage) {
  return db
    .select({
      id: projectMembers.id,
      userId: users.id,
      name: users.name,
      email: users.email,
      role: projectMembers.role,
      joinedAt: projectMembers.joinedAt,
    })
    .from(projectMembers)
    .innerJoin(users, eq(users.id, projectMembers.userId))
    .where(and(eq(projectMembers.projectId, projectId), newerThan(page, projectMembers.id)))
    .orderBy(asc(projectMembers.id))
    .limit(page.fetch);
}

/** Whether the person is an assistant of the studio. */
export async function isAssistantOf(db: Queryable, studioId: string, userId: string) {
  const rows = await db
    .select({ id: studioMembers.id })
    .from(studioMembers)
    .where(
      and(
        eq(studioMembers.studioId, studioId),
        eq(studioMembers.userId, userId),
        eq(studioMembers.role, 'assistant'),
      ),
    );
  return rows.length > 0;
}

/** Returns what the person was on the project before, null when nothing. */
export async function putAssistant(
  transaction: Transaction,
  member: { projectId: string; userId: string; assistantStudioId: string; joinedAt: Date },
) {
  const [before] = await transaction
    .select({ role: projectMembers.role })
    .from(projectMembers)
    .where(
      and(eq(projectMembers.projectId, member.projectId), eq(projectMembers.userId, member.userId)),
    );
  await transaction
    .insert(projectMembers)
    .values({ ...member, role: 'assistant' })
    .onConflictDoNothing({ target: [projectMembers.projectId, projectMembers.userId] });
  return before?.role ?? null;
}

export async function deleteMember(db: Queryable, projectId: string, userId: string) {
  await db
    .delete(projectMembers)
    .where(and(eq(projectMembers.projectId, projectId), eq(projectMembers.userId, userId)));
}

/** The songs of a project in the order they were added. */
export async function listSongs(db: Queryable, projectId: string, page: KeyPage) {
  return db
    .select()
    .from(songs)
    .where(and(eq(songs.projectId, projectId), newerThan(page, songs.id)))
    .orderBy(asc(songs.id))
    .limit(page.fetch);
}

export async function insertSong(
  db: Queryable,
  song: { projectId: string; title: string; createdAt: Date },
) {
  const [row] = await db.insert(songs).values(song).returning();
  if (!row) throw new Error('no key of the new song');
  return row;
}

export async function findSong(db: Queryable, songId: string) {
  const [song] = await db.select().from(songs).where(eq(songs.id, songId));
  if (!song) throw new Error('an authorised song that is not there');
  return song;
}
