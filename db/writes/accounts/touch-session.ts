import { and, eq, lt, sql } from 'drizzle-orm';
import { database } from '@/db/client';
import { sessions } from '@/db/schema/accounts';

/** Writes about one's own session take no Grant: holding its token is the right to it. */
const olderThan = (seconds: number) => lt(sessions.updatedAt, sql`now() - make_interval(secs => ${seconds})`);

/** True when the session had been idle too long and is now gone. */
export async function endIdleSession(token: string, idleS: number): Promise<boolean> {
  const ended = await database().delete(sessions).where(and(eq(sessions.token, token), olderThan(idleS))).returning({ id: sessions.id });
  return ended.length > 0;
}

/** Notes that the session is in use, at most once in five minutes. */
export async function touchSession(token: string): Promise<void> {
  await database().update(sessions).set({ updatedAt: sql`now()` }).where(and(eq(sessions.token, token), olderThan(300)));
}
