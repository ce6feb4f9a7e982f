/** Limits on tries, kept in PostgreSQL so that all web processes share them. */
import 'server-only';
import { createHash } from 'node:crypto';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { rateLimitPool } from '@/db/client';
import { Refusal } from '@/lib/api/problem';

const WINDOW_SECONDS = 15 * 60;
/** Wrong passwords and mail requests per account, and per address (a workshop shares one). */
const LIMITS = { account: 10, address: 200 } as const;

let limiters: { account: RateLimiterPostgres; address: RateLimiterPostgres } | null = null;

function limiter(by: keyof typeof LIMITS): RateLimiterPostgres {
  const make = (keyPrefix: keyof typeof LIMITS) =>
    new RateLimiterPostgres({
      storeClient: rateLimitPool(),
      storeType: 'pool',
      tableName: 'rate_limit',
      tableCreated: true,
      keyPrefix,
      points: LIMITS[keyPrefix],
      duration: WINDOW_SECONDS,
    });
  limiters ??= { account: make('account'), address: make('address') };
  return limiters[by];
}

const hashed = (what: string, key: string): string => createHash('sha256').update(`${what}:${key}`).digest('hex');

/** Counts one try; refuses with `too-many` when the account or the address has had its share. */
export async function countTry(what: 'sign-in' | 'mail' | 'token', account: string, address: string): Promise<void> {
  try {
    await limiter('address').consume(hashed(what, address));
    await limiter('account').consume(hashed(what, account.toLowerCase()));
  } catch (error) {
    if (error instanceof RateLimiterRes) {
      throw new Refusal(
        'too-many',
        `Too many tries. Wait ${Math.max(1, Math.ceil(error.msBeforeNext / 60_000))} minutes and try again.`,
      );
    }
    throw error;
  }
}

/** A success clears the account's tries. */
export async function forgetTries(what: 'sign-in', account: string): Promise<void> {
  await limiter('account').delete(hashed(what, account.toLowerCase()));
}
