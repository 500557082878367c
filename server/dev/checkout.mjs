import { createHash } from 'node:crypto';
import { realpathSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** Absolute path of this checkout, symbolic links resolved, without a trailing slash. */
export const checkout = realpathSync(fileURLToPath(new URL('../..', import.meta.url)));

/** Absolute path of something in this checkout. @param {string[]} parts */
export function inCheckout(...parts) {
  return join(checkout, ...parts);
}

/** Twelve hexadecimal digits that stand for a folder's place on this machine. */
export function hashOfPlace(/** @type {string} */ folder) {
  return createHash('sha256').update(folder).digest('hex').slice(0, 12);
}
