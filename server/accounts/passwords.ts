import { hash, verify } from '@node-rs/argon2';

/**
 * argon2id with 19 MiB, two passes, one lane: the parameters of OWASP's Password Storage Cheat
 * Sheet (m=19456, t=2, p=1). `algorithm: 2` is argon2id; the package's enum cannot be imported
 * by a compiler that looks at one file at a time.
 */
const argon2id = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** Accents typed on different systems must give the same password (Unicode NFKC). */
function normalise(password: string): string {
  return password.normalize('NFKC');
}

/** A hash in PHC string format, with its own random salt. */
export function hashPassword(password: string): Promise<string> {
  return hash(normalise(password), argon2id);
}

let hashOfNobody: Promise<string> | undefined;

/**
 * Whether the password belongs to the hash. Without a hash (no such account) it does the same
 * work and says no, so that the time of an answer does not tell whether an address is known.
 */
export async function verifyPassword(
  passwordHash: string | null,
  password: string,
): Promise<boolean> {
  if (passwordHash !== null) return verify(passwordHash, normalise(password));
  hashOfNobody ??= hashPassword('nobody has this password');
  await verify(await hashOfNobody, normalise(password));
  return false;
}
