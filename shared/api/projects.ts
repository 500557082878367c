import { z } from 'zod';
import { defineEndpoint } from './endpoint.ts';
import { emailSchema, idSchema, lineSchema, momentSchema, slugSchema } from './fields.ts';
import { invitationSchema } from './invitations.ts';
import { pageQuerySchema, pageSchema } from './page.ts';

/** What a person is in a project. `owner` owns the studio, or the private project. */
export const projectRoleSchema = z.enum(['owner', 'assistant', 'artist', 'bandmate']);
export type ProjectRole = z.output<typeof projectRoleSchema>;

export const projectTitleSchema = lineSchema(120);
export const artistNameSchema = lineSchema(120);
export const songTitleSchema = lineSchema(120);

export const projectSchema = z.strictObject({
  id: idSchema,
  /** `private`: one person's own checks. `studio`: an engineer's work for an artist. */
  kind: z.enum(['private', 'studio']),
  title: projectTitleSchema,
  /** Null in a private project. */
  artistName: artistNameSchema.nullable(),
  studio: z.strictObject({ id: idSchema, slug: slugSchema, name: z.string() }).nullable(),
  /** The edition of the studio's house rules the project is held to, once there is one. */
  rulesEditionNumber: z.number().int().positive().nullable(),
  /** What the person who asks is there. */
  role: projectRoleSchema,
  createdAt: momentSchema,
});
export type Project = z.output<typeof projectSchema>;

const projectParams = z.strictObject({ projectId: idSchema });

/** Every project the signed-in person may see, newest first, their private one among them. */
export const listMyProjects = defineEndpoint({
  method: 'GET',
  path: '/api/projects',
  query: pageQuerySchema,
  response: pageSchema(projectSchema),
});

export const getProject = defineEndpoint({
  method: 'GET',
  path: '/api/projects/:projectId',
  params: projectParams,
  response: projectSchema,
});

/** Opens a project in a studio, held to its newest edition of house rules. Owner only. */
export const createProject = defineEndpoint({
  method: 'POST',
  path: '/api/studios/:studioId/projects',
  params: z.strictObject({ studioId: idSchema }),
  body: z.strictObject({ title: projectTitleSchema, artistName: artistNameSchema }),
  response: projectSchema,
});

export const projectMemberSchema = z.strictObject({
  userId: idSchema,
  name: z.string(),
  email: z.string(),
  role: z.enum(['assistant', 'artist', 'bandmate']),
  joinedAt: momentSchema,
});
export type ProjectMember = z.output<typeof projectMemberSchema>;

/** Who was put on or invited to the project, in the order of joining. Everybody in it. */
export const listProjectMembers = defineEndpoint({
  method: 'GET',
  path: '/api/projects/:projectId/members',
  params: projectParams,
  query: pageQuerySchema,
  response: pageSchema(projectMemberSchema),
});

/**
 * Puts an assistant of the studio on the project; does nothing when they are on it already.
 * Owner only. Errors: `not-found` when the person is no assistant of this studio.
 */
export const putAssistantOnProject = defineEndpoint({
  method: 'PUT',
  path: '/api/projects/:projectId/assistants/:userId',
  params: z.strictObject({ projectId: idSchema, userId: idSchema }),
  response: null,
});

/**
 * Takes a person off the project. The owner takes off anybody, the artist takes off bandmates,
 * everybody may leave.
 */
export const removeProjectMember = defineEndpoint({
  method: 'DELETE',
  path: '/api/projects/:projectId/members/:userId',
  params: z.strictObject({ projectId: idSchema, userId: idSchema }),
  response: null,
});

/**
 * Invites by mail: the owner an artist or a bandmate, the artist a bandmate. A second
 * invitation to the same address replaces the first. Errors: `too-many-tries`.
 */
export const inviteToProject = defineEndpoint({
  method: 'POST',
  path: '/api/projects/:projectId/invitations',
  params: projectParams,
  body: z.strictObject({ email: emailSchema, role: z.enum(['artist', 'bandmate']) }),
  response: invitationSchema,
});

/** Invitations to the project that nobody has accepted yet, newest first. Owner and artist. */
export const listProjectInvitations = defineEndpoint({
  method: 'GET',
  path: '/api/projects/:projectId/invitations',
  params: projectParams,
  query: pageQuerySchema,
  response: pageSchema(invitationSchema),
});

export const songSchema = z.strictObject({
  id: idSchema,
  projectId: idSchema,
  title: songTitleSchema,
  createdAt: momentSchema,
});
export type Song = z.output<typeof songSchema>;

/** The project's songs, in the order they were added. */
export const listSongs = defineEndpoint({
  method: 'GET',
  path: '/api/projects/:projectId/songs',
  params: projectParams,
  query: pageQuerySchema,
  response: pageSchema(songSchema),
});

/** Adds a song. Everybody in the project but its assistants. */
export const createSong = defineEndpoint({
  method: 'POST',
  path: '/api/projects/:projectId/songs',
  params: projectParams,
  body: z.strictObject({ title: songTitleSchema }),
  response: songSchema,
});

export const getSong = defineEndpoint({
  method: 'GET',
  path: '/api/songs/:songId',
  params: z.strictObject({ songId: idSchema }),
  response: songSchema,
});
