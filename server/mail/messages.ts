import { z } from 'zod';

const secret = z.string();

/**
 * Every mail there is, with what its sentences need. What a stranger typed does not appear in
 * mails to an address that nobody has confirmed: nobody can have us send their words around.
 */
export const mailMessageSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('confirm-account'), secret }),
  /** Somebody asked for an account under an address that has one. */
  z.strictObject({ kind: z.literal('account-exists') }),
  z.strictObject({ kind: z.literal('reset-password'), secret }),
  /** Somebody asked to reset the password of an account that does not exist. */
  z.strictObject({ kind: z.literal('no-account') }),
  z.strictObject({ kind: z.literal('password-changed') }),
  /** To the new address. */
  z.strictObject({ kind: z.literal('change-address'), secret }),
  /** To the new address, when it belongs to another account. */
  z.strictObject({ kind: z.literal('address-in-use') }),
  /** To the old address, when the new one was confirmed. */
  z.strictObject({ kind: z.literal('address-changed') }),
  z.strictObject({
    kind: z.literal('invitation-to-studio'),
    secret,
    invitedBy: z.string(),
    studioName: z.string(),
  }),
  z.strictObject({
    kind: z.literal('invitation-to-project'),
    secret,
    invitedBy: z.string(),
    role: z.enum(['artist', 'bandmate']),
    projectTitle: z.string(),
    artistName: z.string(),
    studioName: z.string(),
  }),
]);
export type MailMessage = z.output<typeof mailMessageSchema>;
