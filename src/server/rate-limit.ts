import { RateLimiterMemory, type RateLimiterRes } from 'rate-limiter-flexible';
import { Problem } from './problem';
import { sha256 } from './secrets';

/**
 * Tries and seconds. An address may be a whole institute, an account is one person; few tries at an account from one
 * address, more from all, so that nobody can lock its owner out by guessing. Common practice, no source.
 */
const LIMITS = {
  'sign-in by address': [100, 15 * 60],
  'sign-in by account and address': [10, 15 * 60],
  'sign-in by account': [100, 15 * 60],
  'sign-up by address': [30, 60 * 60],
  'reset by address': [30, 60 * 60],
  'reset by account': [5, 60 * 60],
  'team by account': [60, 60 * 60],
} as const satisfies Record<string, readonly [points: number, seconds: number]>;

export type Limit = keyof typeof LIMITS;

let limiters = new Map<Limit, RateLimiterMemory>();

function limiter(limit: Limit): RateLimiterMemory {
  let found = limiters.get(limit);
  if (!found) {
    const [points, duration] = LIMITS[limit];
    found = new RateLimiterMemory({ points, duration });
    limiters.set(limit, found);
  }
  return found;
}

/** Counts one try. @throws Problem `TooManyRequests` with `Retry-After` */
export async function countTry(limit: Limit, key: string): Promise<void> {
  try {
    await limiter(limit).consume(sha256(key));
  } catch (refused) {
    const seconds = Math.max(1, Math.ceil((refused as RateLimiterRes).msBeforeNext / 1000));
    throw new Problem('TooManyRequests', {
      detail: `Try again in ${seconds < 90 ? `${seconds} s` : `${Math.ceil(seconds / 60)} min`}.`,
      headers: { 'Retry-After': String(seconds) },
    });
  }
}

/** Gives a try back that turned out to be right: only failures count. */
export const giveBack = (limit: Limit, key: string) => limiter(limit).reward(sha256(key));

export function forgetTries(): void {
  limiters = new Map();
}
