import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { database, type Database } from '@/db/client';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { DoorError } from './problem-response';

/** So many calls of one door by one person in so many seconds. */
export interface Rate {
  readonly points: number;
  readonly perS: number;
}

export const WRITE_RATE: Rate = { points: 120, perS: 60 };

const limiters = new WeakMap<Database, Map<string, RateLimiterPostgres>>();

function limiterFor(door: string, rate: Rate): RateLimiterPostgres {
  const db = database();
  const own = limiters.get(db) ?? new Map<string, RateLimiterPostgres>();
  limiters.set(db, own);
  const made = own.get(door) ?? new RateLimiterPostgres({
    storeClient: db.$client,
    storeType: 'pool',
    tableName: 'rate_points',
    tableCreated: true,
    keyPrefix: door,
    points: rate.points,
    duration: rate.perS,
    inMemoryBlockOnConsumed: rate.points,
  });
  own.set(door, made);
  return made;
}

/** Spends one point; the error says when to come back. Visitors share one count a door: their addresses prove nothing. */
export async function spend(door: string, rate: Rate, actor: Actor): Promise<DoorError | null> {
  const visitor = userIdOf(actor) === null;
  const limiter = limiterFor(visitor ? `${door}:visitors` : door, visitor ? { ...rate, points: rate.points * 20 } : rate);
  try {
    await limiter.consume(userIdOf(actor) ?? 'all');
    return null;
  } catch (refused) {
    if (!(refused instanceof RateLimiterRes)) throw refused;
    const retryAfterS = Math.max(1, Math.ceil(refused.msBeforeNext / 1000));
    return { code: 'limit', sentence: `This was asked ${rate.points} times within ${rate.perS} s. Wait ${retryAfterS} s and try again.`, retryAfterS };
  }
}
