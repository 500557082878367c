import { z } from 'zod';
import { studioRoleSchema } from './accounts.ts';
import { defineEndpoint } from './endpoint.ts';
import { emailSchema, idSchema, lineSchema, momentSchema, slugSchema } from './fields.ts';
import { invitationSchema } from './invitations.ts';
import { pageQuerySchema, pageSchema } from './page.ts';

export const studioNameSchema = lineSchema(80);

export const studioSchema = z.strictObject({
  id: idSchema,
  slug: slugSchema,
  name: studioNameSchema,
  /** What the person who asks is there. */
  role: studioRoleSchema,
  createdAt: momentSchema,
});
export type Studio = z.output<typeof studioSchema>;

const studioParams = z.strictObject({ studioId: idSchema });

/** Founds a studio; whoever asks owns it. Errors: `already-taken` {field: 'slug'}. */
export const foundStudio = defineEndpoint({
  method: 'POST',
  path: '/api/studios',
  body: z.strictObject({ name: studioNameSchema, slug: slugSchema }),
  response: studioSchema,
});

/** The studios the signed-in person owns or works for, the oldest first. */
export const listMyStudios = defineEndpoint({
  method: 'GET',
  path: '/api/studios',
  query: pageQuerySchema,
  response: pageSchema(studioSchema),
});

/** One studio by its slug, for the people who work there; `not-found` for everybody else. */
export const getStudio = defineEndpoint({
  method: 'GET',
  path: '/api/studios/:slug',
  params: z.strictObject({ slug: slugSchema }),
  response: studioSchema,
});

export const studioMemberSchema = z.strictObject({
  userId: idSchema,
  name: z.string(),
  email: z.string(),
  role: studioRoleSchema,
  joinedAt: momentSchema,
});
export type StudioMember = z.output<typeof studioMemberSchema>;

/** Who works for the studio, in the order of joining. Owner only. */
export const listStudioMembers = defineEndpoint({
  method: 'GET',
  path: '/api/studios/:studioId/members',
  params: studioParams,
  query: pageQuerySchema,
  response: pageSchema(studioMemberSchema),
});

/**
 * Takes an assistant out of the studio and off all its projects. Owner only; the owner cannot
 * be removed (`not-allowed`).
 */
export const removeStudioMember = defineEndpoint({
  method: 'DELETE',
  path: '/api/studios/:studioId/members/:userId',
  params: z.strictObject({ studioId: idSchema, userId: idSchema }),
  response: null,
});

/**
 * Invites an assistant by mail; a second invitation to the same address replaces the first.
 * Owner only. Errors: `too-many-tries`.
 */
export const inviteAssistant = defineEndpoint({
  method: 'POST',
  path: '/api/studios/:studioId/invitations',
  params: studioParams,
  body: z.strictObject({ email: emailSchema }),
  response: invitationSchema,
});

/** Invitations to the studio that nobody has accepted yet, newest first. Owner only. */
export const listStudioInvitations = defineEndpoint({
  method: 'GET',
  path: '/api/studios/:studioId/invitations',
  params: studioParams,
  query: pageQuerySchema,
  response: pageSchema(invitationSchema),
});
