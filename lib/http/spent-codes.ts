import { createHash } from 'node:crypto';
import { RateLimiterPostgres } from 'rate-limiter-flexible';
import { database, type Database } from '@/db/client';
import { endSessionByToken } from '@/db/writes/accounts/end-sessions';
import { isUuid } from '@/lib/kernel/uuid';
import { problemResponse } from './problem-response';

/** A code is good for its own half minute and one on either side; remembered a little longer. */
const REMEMBERED_S = 120;
const limiters = new WeakMap<Database, RateLimiterPostgres>();

function limiter(): RateLimiterPostgres {
  const db = database();
  const made = limiters.get(db) ?? new RateLimiterPostgres({ storeClient: db.$client, storeType: 'pool', tableName: 'rate_points', tableCreated: true, keyPrefix: 'spent-code', points: 1, duration: REMEMBERED_S });
  limiters.set(db, made);
  return made;
}

/**
 * One code opens one session: who reads it over a shoulder comes too late. The library would take it
 * again within its half minute, so the session of a second use is ended before its cookie goes out.
 */
export async function refuseSecondUse(answer: Response, code: string): Promise<Response> {
  if (!answer.ok) return answer;
  const said = (await answer.clone().json().catch(() => null)) as { token?: unknown; user?: { id?: unknown } } | null;
  if (!isUuid(said?.user?.id) || typeof said.token !== 'string') return answer;
  const key = createHash('sha256').update(`${said.user.id}:${code}`).digest('hex').slice(0, 32);
  const first = await limiter().consume(key).then(() => true, () => false);
  if (first) return answer;
  await endSessionByToken(said.token);
  return problemResponse({ code: 'conflict', sentence: 'This code has signed somebody in already. Sign in again and give the next one.' });
}
