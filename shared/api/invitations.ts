import { z } from 'zod';
import { sessionSchema } from './accounts.ts';
import { defineEndpoint } from './endpoint.ts';
import {
  idSchema,
  momentSchema,
  newPasswordSchema,
  personNameSchema,
  tokenSchema,
} from './fields.ts';

/** What somebody can be invited to be: in a studio, or in one project. */
export const invitedRoleSchema = z.enum(['assistant', 'artist', 'bandmate']);
export type InvitedRole = z.output<typeof invitedRoleSchema>;

export const invitationSchema = z.strictObject({
  id: idSchema,
  email: z.string(),
  role: invitedRoleSchema,
  createdAt: momentSchema,
  expiresAt: momentSchema,
});
export type Invitation = z.output<typeof invitationSchema>;

/**
 * What the link of an invitation mail (`/invitation#token=…`) stands for. The token travels in
 * the body, so this is a POST although it changes nothing. Errors: `link-expired`.
 */
export const readInvitation = defineEndpoint({
  method: 'POST',
  path: '/api/invitations/read',
  body: z.strictObject({ token: tokenSchema }),
  response: z.strictObject({
    role: invitedRoleSchema,
    invitedBy: z.string(),
    /** The address the mail went to. */
    email: z.string(),
    /** Whether that address has an account: sign in to accept, or make one. */
    hasAccount: z.boolean(),
    studioName: z.string().nullable(),
    projectTitle: z.string().nullable(),
    expiresAt: momentSchema,
  }),
});

/**
 * Accepts an invitation. A signed-in person joins with their own account, whatever its
 * address. A visitor gives `newAccount`: it is made for the address the mail went to (which the
 * link has proved) and signed in. Either way the cookie is new afterwards.
 * Errors: `link-expired`, `sign-in-required` (visitor without `newAccount`), `already-taken`
 * {field: 'email'} (visitor whose address has an account: sign in first).
 */
export const acceptInvitation = defineEndpoint({
  method: 'POST',
  path: '/api/invitations/accept',
  body: z.strictObject({
    token: tokenSchema,
    newAccount: z.strictObject({ name: personNameSchema, password: newPasswordSchema }).optional(),
  }),
  response: z.strictObject({
    session: sessionSchema,
    studioSlug: z.string().nullable(),
    projectId: idSchema.nullable(),
  }),
});

/** Takes an invitation back; its link stops working. For those who may invite there. */
export const revokeInvitation = defineEndpoint({
  method: 'DELETE',
  path: '/api/invitations/:invitationId',
  params: z.strictObject({ invitationId: idSchema }),
  response: null,
});
