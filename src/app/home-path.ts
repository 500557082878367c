import type { Session } from '#shared/api/accounts.ts';

/** Where a person lands after signing in, when no page sent them. */
export function homePath({ studios }: Session): string {
  return studios[0] === undefined ? '/my/checks' : `/studio/${studios[0].slug}`;
}
