import { z } from 'zod';

/** Key of a row: a UUID, version 7 where we make it, so that keys sort by the time of making. */
export const idSchema = z.uuid();

/** A moment as ISO 8601 in UTC (`2026-12-01T15:20:00.000Z`). */
export const momentSchema = z.iso.datetime();

/**
 * An e-mail address as it is stored and compared: trimmed and in lower case. At most 254
 * characters (RFC 5321, section 4.5.3.1.3: a path has 256 octets with its two brackets).
 */
export const emailSchema = z.string().trim().toLowerCase().max(254).pipe(z.email());

/**
 * A new password: 12 to 128 characters of any kind, spaces included, nothing trimmed, at least
 * five of them different. Length is what OWASP ASVS 4.0 section 2.1 asks for (2.1.1: 12 or more;
 * 2.1.2: 128 allowed, more refused); it asks for no particular kinds of characters (2.1.9).
 * That a repeated handful is refused follows NIST SP 800-63B, section 5.1.1.2 (repetitive
 * characters). Both numbers of sections from memory.
 */
export const newPasswordSchema = z
  .string()
  .min(12)
  .max(128)
  .refine((password) => new Set(password).size >= 5, { error: 'too-few-different-characters' });

/** A password to be compared: any length that a stored one can have. */
export const givenPasswordSchema = z.string().min(1).max(128);

/** The secret part of a link in a mail or of a shared report: 32 random bytes in base64url. */
export const tokenSchema = z.string().regex(/^[A-Za-z0-9_-]{43}$/);

/** One line of text a person typed: trimmed, not empty, no control characters. */
export function lineSchema(maxLength: number) {
  return z
    .string()
    .trim()
    .min(1)
    .max(maxLength)
    .regex(/^[^\p{Cc}]*$/u);
}

/** A person's name as they write it themselves. */
export const personNameSchema = lineSchema(80);

/** The part of a studio's web address that it chooses: `harbour-lane-mixing`. */
export const slugSchema = z
  .string()
  .min(3)
  .max(40)
  .regex(/^[a-z0-9]+(?:-[a-z0-9]+)*$/);
