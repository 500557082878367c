import { z } from 'zod';
import { defineEndpoint } from './endpoint.ts';
import {
  emailSchema,
  givenPasswordSchema,
  idSchema,
  newPasswordSchema,
  personNameSchema,
  slugSchema,
  tokenSchema,
} from './fields.ts';

/** What a person may do in a studio. */
export const studioRoleSchema = z.enum(['owner', 'assistant']);
export type StudioRole = z.output<typeof studioRoleSchema>;

/** Who is signed in, with what the first screen needs; `user` is null for a visitor. */
export const sessionSchema = z.strictObject({
  user: z
    .strictObject({
      id: idSchema,
      name: personNameSchema,
      email: z.string(),
      /** Where the person's own checks live. */
      privateProjectId: idSchema,
    })
    .nullable(),
  studios: z.array(
    z.strictObject({
      id: idSchema,
      slug: slugSchema,
      name: z.string(),
      role: studioRoleSchema,
    }),
  ),
});
export type Session = z.output<typeof sessionSchema>;

/**
 * Asks for an account. Always 204, whether the address is known or not: the mail that follows
 * carries either a link to `/confirm#token=…` or the news that the account exists already.
 * The password is chosen behind that link, so nobody can set one for an address not theirs.
 */
export const register = defineEndpoint({
  method: 'POST',
  path: '/api/accounts',
  body: z.strictObject({ name: personNameSchema, email: emailSchema }),
  response: null,
});

/** Confirms the address, makes the account and signs in. Errors: `link-expired`. */
export const confirmAccount = defineEndpoint({
  method: 'POST',
  path: '/api/accounts/confirm',
  body: z.strictObject({ token: tokenSchema, password: newPasswordSchema }),
  response: sessionSchema,
});

/** Signs in. Errors: `sign-in-failed` (never says which was wrong), `too-many-tries`. */
export const signIn = defineEndpoint({
  method: 'POST',
  path: '/api/session',
  body: z.strictObject({ email: emailSchema, password: givenPasswordSchema }),
  response: sessionSchema,
});

/** Who is signed in; answers 200 with `user: null` for a visitor. */
export const getSession = defineEndpoint({
  method: 'GET',
  path: '/api/session',
  response: sessionSchema,
});

/** Ends this session. Does nothing for a visitor. */
export const signOut = defineEndpoint({ method: 'DELETE', path: '/api/session', response: null });

/** Ends every session of the signed-in person, this one too. */
export const signOutEverywhere = defineEndpoint({
  method: 'DELETE',
  path: '/api/sessions',
  response: null,
});

/** Asks for a link to `/reset-password#token=…`. Always 204, whether the address is known or not. */
export const requestPasswordReset = defineEndpoint({
  method: 'POST',
  path: '/api/accounts/reset-requests',
  body: z.strictObject({ email: emailSchema }),
  response: null,
});

/** Sets a new password, ends all sessions and signs in anew. Errors: `link-expired`. */
export const resetPassword = defineEndpoint({
  method: 'POST',
  path: '/api/accounts/reset',
  body: z.strictObject({ token: tokenSchema, password: newPasswordSchema }),
  response: sessionSchema,
});

/**
 * Sets a new password and ends all other sessions; this one gets a new cookie.
 * Errors: `sign-in-failed` when the current password is wrong, `too-many-tries`.
 */
export const changePassword = defineEndpoint({
  method: 'POST',
  path: '/api/account/password',
  body: z.strictObject({ currentPassword: givenPasswordSchema, newPassword: newPasswordSchema }),
  response: null,
});

/**
 * Asks for another address: a link to `/confirm-address#token=…` goes to the new one. Always
 * 204 once the password is right, also when the new address belongs to somebody already.
 * Errors: `sign-in-failed` when the password is wrong, `too-many-tries`.
 */
export const requestAddressChange = defineEndpoint({
  method: 'POST',
  path: '/api/account/address',
  body: z.strictObject({ newEmail: emailSchema, password: givenPasswordSchema }),
  response: null,
});

/**
 * Makes the new address the account's own, tells the old one, and ends all sessions; somebody
 * signed in to this account in this browser gets a new one. Errors: `link-expired`.
 */
export const confirmAddressChange = defineEndpoint({
  method: 'POST',
  path: '/api/accounts/confirm-address',
  body: z.strictObject({ token: tokenSchema }),
  response: z.strictObject({ email: z.string() }),
});
