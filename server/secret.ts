import { createHash, randomBytes } from 'node:crypto';

/**
 * The secret of a link: 32 random bytes in base64url (43 characters, the contracts'
 * `tokenSchema`), and the SHA-256 of it that is stored. A plain hash is enough because nobody
 * can guess 256 random bits; passwords are another matter, see accounts/passwords.ts.
 */
export function newSecret(): { secret: string; secretHash: string } {
  const secret = randomBytes(32).toString('base64url');
  return { secret, secretHash: sha256Hex(secret) };
}

/** SHA-256 of a text in lower-case hexadecimal, 64 digits. */
export function sha256Hex(text: string): string {
  return createHash('sha256').update(text).digest('hex');
}
