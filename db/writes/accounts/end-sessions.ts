import { and, eq, ne } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import { sessions } from '@/db/schema/accounts';
import { userIdOf } from '@/lib/policy/actor';
import type { Grant } from '@/lib/policy/grant';

type OwnAccount = Grant<'account.edit-own'>;

/** Takes no Grant: whoever holds a session's token may end it. */
export const endSessionByToken = async (token: string): Promise<void> => void (await database().delete(sessions).where(eq(sessions.token, token)));

/** One of one's own; false when it is not there any more, or somebody else's. */
export async function endOwnSession(tx: Transaction, grant: OwnAccount, sessionId: string): Promise<boolean> {
  const ended = await tx.delete(sessions).where(and(eq(sessions.id, sessionId), eq(sessions.userId, userIdOf(grant.actor) ?? ''))).returning({ id: sessions.id });
  return ended.length === 1;
}

/** All of one's own but the one that asks. */
export async function endOtherSessions(tx: Transaction, grant: OwnAccount, keptId: string): Promise<number> {
  const ended = await tx.delete(sessions).where(and(eq(sessions.userId, userIdOf(grant.actor) ?? ''), ne(sessions.id, keptId))).returning({ id: sessions.id });
  return ended.length;
}
