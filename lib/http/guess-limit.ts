import { createHash } from 'node:crypto';
import { RateLimiterPostgres } from 'rate-limiter-flexible';
import { database, type Database } from '@/db/client';

/** Wrong passwords for one address before it rests, whoever sends them. */
const WRONG_AT_MOST = 10;
const WITHIN_S = 15 * 60;

const limiters = new WeakMap<Database, RateLimiterPostgres>();

function limiter(): RateLimiterPostgres {
  const db = database();
  const made = limiters.get(db) ?? new RateLimiterPostgres({ storeClient: db.$client, storeType: 'pool', tableName: 'rate_points', tableCreated: true, keyPrefix: 'wrong-password', points: WRONG_AT_MOST, duration: WITHIN_S });
  limiters.set(db, made);
  return made;
}

/** Addresses are not kept here as text. */
const keyOf = (email: string): string => createHash('sha256').update(email.trim().toLowerCase()).digest('hex').slice(0, 32);

/** Seconds to wait, or 0 when a try is open. */
export async function guessingRests(email: string): Promise<number> {
  const spent = await limiter().get(keyOf(email));
  return spent && spent.consumedPoints >= WRONG_AT_MOST ? Math.max(1, Math.ceil(spent.msBeforeNext / 1000)) : 0;
}

export const noteWrongGuess = async (email: string): Promise<void> => void (await limiter().consume(keyOf(email)).catch(() => undefined));
export const forgetGuesses = async (email: string): Promise<void> => void (await limiter().delete(keyOf(email)));
