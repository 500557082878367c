import { isIPv6 } from 'node:net';
import { RateLimiterDrizzle, RateLimiterRes } from 'rate-limiter-flexible';
import { AppError } from '#shared/errors.ts';
import type { Database } from '../db/client.ts';
import { rateLimits } from '../db/work-tables.ts';
import { sha256Hex } from '../secret.ts';

const minute = 60;
const hour = 60 * minute;

/**
 * How many tries are allowed in how many seconds, counted in PostgreSQL so that all servers
 * share one count. OWASP ASVS 4.0, 2.2.1 allows at most 100 failed tries an hour on one
 * account; ours stays under it by the account alone, whatever addresses they come from.
 */
const limitTable = {
  /** Wrong passwords for one account from one network: stops guessing, locks out nobody else. */
  'password-from-network': { points: 10, duration: 15 * minute },
  /** Wrong passwords for one account from everywhere. */
  'password-of-account': { points: 80, duration: hour },
  /** Wrong passwords from one network, whatever the account. */
  'password-network': { points: 60, duration: 15 * minute },
  /** Mails about an account to one address. */
  'mail-to-address': { points: 5, duration: hour },
  /** Requests for such mails from one network. */
  'mail-from-network': { points: 30, duration: hour },
  /** Invitations one person sends. */
  'invitations-of-person': { points: 60, duration: hour },
  /** Studios one person founds. */
  'studios-of-person': { points: 10, duration: hour },
  /** Reports one person stores, up to 2 MiB each. */
  'reports-of-person': { points: 120, duration: hour },
} as const;
export type LimitName = keyof typeof limitTable;

export type Limits = {
  /** Counts one try; throws `too-many-tries` {retryAfterSeconds} when there were enough. */
  count(name: LimitName, key: string): Promise<void>;
  /** Takes one counted try back, because it turned out right. */
  giveBack(name: LimitName, key: string): Promise<void>;
};

export function createLimits(db: Database): Limits {
  const limiters = new Map(
    Object.entries(limitTable).map(([name, { points, duration }]) => [
      name,
      new RateLimiterDrizzle({
        storeClient: db,
        schema: rateLimits,
        keyPrefix: name,
        points,
        duration,
        // Swept with everything else that has expired: jobs/sweep.ts.
        clearExpiredByTimeout: false,
      }),
    ]),
  );
  const limiterOf = (name: LimitName) => {
    const limiter = limiters.get(name);
    if (!limiter) throw new Error(`no limit is called ${name}`);
    return limiter;
  };
  // Keys are hashed: the table holds no addresses.
  return {
    async count(name, key) {
      try {
        await limiterOf(name).consume(sha256Hex(key));
      } catch (refused) {
        if (!(refused instanceof RateLimiterRes)) throw refused;
        const retryAfterSeconds = Math.max(1, Math.ceil(refused.msBeforeNext / 1000));
        throw new AppError('too-many-tries', { retryAfterSeconds });
      }
    },
    async giveBack(name, key) {
      await limiterOf(name).reward(sha256Hex(key));
    },
  };
}

/**
 * What counts as one network: an IPv4 address, or the /64 of an IPv6 one, since a single
 * connection commonly gets that many addresses (RFC 6177, section 2).
 */
export function networkOf(address: string): string {
  const plain = address.replace(/^::ffff:(?=\d+\.)/i, '').replace(/%.*$/, '');
  if (!isIPv6(plain)) return plain;
  const [head = '', tail] = plain.split('::');
  const before = head === '' ? [] : head.split(':');
  const after = tail ? tail.split(':') : [];
  const zeros = tail === undefined ? 0 : Math.max(0, 8 - before.length - after.length);
  return [...before, ...Array<string>(zeros).fill('0'), ...after]
    .slice(0, 4)
    .map((group) => group.toLowerCase().replace(/^0+(?=.)/, ''))
    .join(':');
}
