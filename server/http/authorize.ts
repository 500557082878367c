import { and, eq } from 'drizzle-orm';
import type { StudioRole } from '#shared/api/accounts.ts';
import type { ProjectRole } from '#shared/api/projects.ts';
import { AppError } from '#shared/errors.ts';
import type { Person } from '../accounts/sessions.ts';
import type { Queryable } from '../db/client.ts';
import {
  invitations,
  projectMembers,
  projects,
  reports,
  songs,
  studioMembers,
  studios,
} from '../db/schema.ts';

/*
 * The one place that decides who may do what. Services that touch studio or project data take
 * one of the values made here, and nothing else can make one: forgetting the check is a type
 * error. Who is no member gets `not-found`, so that keys tell strangers nothing; a member
 * whose role is not enough gets `not-allowed`.
 */

/** Who may do what in a studio. */
const studioActions = {
  'read-studio': ['owner', 'assistant'],
  'manage-staff': ['owner'],
  'open-project': ['owner'],
} as const satisfies Record<string, readonly StudioRole[]>;
export type StudioAction = keyof typeof studioActions;

/** `sender` is whoever stored the report at hand, beside their role in the project. */
type ProjectStanding = ProjectRole | 'sender';

/** Who may do what in a project, and with its songs and reports. */
const projectActions = {
  'read-project': ['owner', 'assistant', 'artist', 'bandmate'],
  'manage-assistants': ['owner'],
  'invite-artist': ['owner'],
  'invite-bandmate': ['owner', 'artist'],
  'read-invitations': ['owner', 'artist'],
  'add-song': ['owner', 'artist', 'bandmate'],
  'store-report': ['owner', 'assistant', 'artist', 'bandmate'],
  'add-overviews': ['sender'],
  'share-report': ['owner', 'sender'],
} as const satisfies Record<string, readonly ProjectStanding[]>;
export type ProjectAction = keyof typeof projectActions;

/** A private project is one person's own: nobody is put on it or invited to it. */
const studioProjectActions: ReadonlySet<ProjectAction> = new Set<ProjectAction>([
  'manage-assistants',
  'invite-artist',
  'invite-bandmate',
  'read-invitations',
]);

declare const checked: unique symbol;

/** The proof: only this module casts to it, the symbol is not exported. */
type Authorized<Facts, Action> = Readonly<Facts> & { readonly [checked]: Action };

export type AuthorizedStudio<Action extends StudioAction> = Authorized<
  { studioId: string; person: Person; role: StudioRole },
  Action
>;

type ProjectFacts = {
  projectId: string;
  kind: 'private' | 'studio';
  /** Null in a private project. */
  studioId: string | null;
  person: Person;
  role: ProjectRole;
};
export type AuthorizedProject<Action extends ProjectAction> = Authorized<ProjectFacts, Action>;
export type AuthorizedSong<Action extends ProjectAction> = Authorized<
  ProjectFacts & { songId: string },
  Action
>;
export type AuthorizedReport<Action extends ProjectAction> = Authorized<
  ProjectFacts & { reportId: string },
  Action
>;
export type AuthorizedRemoval = Authorized<{ projectId: string; userId: string }, 'remove-member'>;
export type AuthorizedInvitation = Authorized<{ invitationId: string }, 'revoke-invitation'>;

export async function authorizeStudio<Action extends StudioAction>(
  db: Queryable,
  person: Person,
  studio: { id: string } | { slug: string },
  action: Action,
): Promise<AuthorizedStudio<Action>> {
  const [member] = await db
    .select({ studioId: studioMembers.studioId, role: studioMembers.role })
    .from(studioMembers)
    .innerJoin(studios, eq(studios.id, studioMembers.studioId))
    .where(
      and(
        'id' in studio ? eq(studios.id, studio.id) : eq(studios.slug, studio.slug),
        eq(studioMembers.userId, person.userId),
      ),
    );
  if (!member) throw new AppError('not-found');
  requireStanding<StudioRole>(studioActions[action], [member.role]);
  return { ...member, person } as AuthorizedStudio<Action>;
}

export async function authorizeProject<Action extends ProjectAction>(
  db: Queryable,
  person: Person,
  projectId: string,
  action: Action,
): Promise<AuthorizedProject<Action>> {
  const [row] = await selectStanding(db, person).where(eq(projects.id, projectId));
  const facts = toFacts(row, person);
  requireProjectAction(action, facts);
  return facts as AuthorizedProject<Action>;
}

export async function authorizeSong<Action extends ProjectAction>(
  db: Queryable,
  person: Person,
  songId: string,
  action: Action,
): Promise<AuthorizedSong<Action>> {
  const [row] = await selectStanding(db, person)
    .innerJoin(songs, eq(songs.projectId, projects.id))
    .where(eq(songs.id, songId));
  const facts = { ...toFacts(row, person), songId };
  requireProjectAction(action, facts);
  return facts as AuthorizedSong<Action>;
}

export async function authorizeReport<Action extends ProjectAction>(
  db: Queryable,
  person: Person,
  reportId: string,
  action: Action,
): Promise<AuthorizedReport<Action>> {
  const [report] = await db
    .select({ createdBy: reports.createdBy, projectId: songs.projectId })
    .from(reports)
    .innerJoin(songs, eq(songs.id, reports.songId))
    .where(eq(reports.id, reportId));
  if (!report) throw new AppError('not-found');
  const [row] = await selectStanding(db, person).where(eq(projects.id, report.projectId));
  const facts = { ...toFacts(row, person), reportId };
  requireProjectAction(action, facts, report.createdBy === person.userId);
  return facts as AuthorizedReport<Action>;
}

/**
 * Taking somebody off a project: the owner takes off anybody, the artist takes off bandmates,
 * everybody may leave. `not-found` when that person is not on it.
 */
export async function authorizeRemoval(
  db: Queryable,
  person: Person,
  projectId: string,
  userId: string,
): Promise<AuthorizedRemoval> {
  const { role } = await authorizeProject(db, person, projectId, 'read-project');
  const [member] = await db
    .select({ role: projectMembers.role })
    .from(projectMembers)
    .where(and(eq(projectMembers.projectId, projectId), eq(projectMembers.userId, userId)));
  if (!member) throw new AppError('not-found');
  const may =
    role === 'owner' ||
    userId === person.userId ||
    (role === 'artist' && member.role === 'bandmate');
  if (!may) throw new AppError('not-allowed');
  return { projectId, userId } as AuthorizedRemoval;
}

/** An invitation is taken back by those who may make such a one. */
export async function authorizeInvitation(
  db: Queryable,
  person: Person,
  invitationId: string,
): Promise<AuthorizedInvitation> {
  const [row] = await db.select().from(invitations).where(eq(invitations.id, invitationId));
  if (!row) throw new AppError('not-found');
  if (row.studioId) await authorizeStudio(db, person, { id: row.studioId }, 'manage-staff');
  if (row.projectId) {
    const action = row.role === 'artist' ? 'invite-artist' : 'invite-bandmate';
    await authorizeProject(db, person, row.projectId, action);
  }
  return { invitationId } as AuthorizedInvitation;
}

/** A project with what the person is in it, as far as the database says. */
function selectStanding(db: Queryable, person: Person) {
  return db
    .select({
      projectId: projects.id,
      kind: projects.kind,
      studioId: projects.studioId,
      ownerId: projects.ownerId,
      studioRole: studioMembers.role,
      projectRole: projectMembers.role,
    })
    .from(projects)
    .leftJoin(
      studioMembers,
      and(eq(studioMembers.studioId, projects.studioId), eq(studioMembers.userId, person.userId)),
    )
    .leftJoin(
      projectMembers,
      and(eq(projectMembers.projectId, projects.id), eq(projectMembers.userId, person.userId)),
    )
    .$dynamic();
}

type StandingRow = Awaited<ReturnType<typeof selectStanding>>[number];

function toFacts(row: StandingRow | undefined, person: Person): ProjectFacts {
  if (!row) throw new AppError('not-found');
  const { projectId, kind, studioId } = row;
  const owns = row.ownerId === person.userId || row.studioRole === 'owner';
  // An assistant of the studio who is not put on the project is a stranger to it.
  const role = owns ? 'owner' : row.projectRole;
  if (!role) throw new AppError('not-found');
  return { projectId, kind, studioId, person, role };
}

function requireProjectAction(action: ProjectAction, facts: ProjectFacts, isSender = false): void {
  if (facts.kind === 'private' && studioProjectActions.has(action)) {
    throw new AppError('not-allowed');
  }
  requireStanding<ProjectStanding>(
    projectActions[action],
    isSender ? [facts.role, 'sender'] : [facts.role],
  );
}

function requireStanding<Standing>(allowed: readonly Standing[], has: readonly Standing[]): void {
  if (!has.some((standing) => allowed.includes(standing))) throw new AppError('not-allowed');
}
