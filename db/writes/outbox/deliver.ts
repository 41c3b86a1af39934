import { and, asc, eq, lte, sql } from 'drizzle-orm';
import type { Database, Transaction } from '@/db/client';
import { outbox } from '@/db/schema/outbox';

/** Delivery takes no Grant: the act that wrote a mail had one, and only the worker's role can mark it. */
export type OutboxRow = typeof outbox.$inferSelect;

/** The oldest mail that is due, held by this transaction; others skip it. Undefined when nothing is due. */
export async function claimDueMail(tx: Transaction): Promise<OutboxRow | undefined> {
  const [row] = await tx
    .select()
    .from(outbox)
    .where(and(eq(outbox.state, 'waiting'), lte(outbox.dueAt, sql`now()`)))
    .orderBy(asc(outbox.dueAt), asc(outbox.id))
    .limit(1)
    .for('update', { skipLocked: true });
  return row;
}

/** Blanks who it went to and what it said: the row then only tells that it went. */
export async function markSent(tx: Transaction, id: string): Promise<void> {
  await tx
    .update(outbox)
    .set({ state: 'sent', sentAt: sql`now()`, attempts: sql`${outbox.attempts} + 1`, lastError: null, recipient: '', subject: '', body: '' })
    .where(eq(outbox.id, id));
}

export async function putOff(tx: Transaction, id: string, error: string, seconds: number, giveUp: boolean): Promise<void> {
  await tx
    .update(outbox)
    .set({
      attempts: sql`${outbox.attempts} + 1`,
      lastError: error.slice(0, 500),
      dueAt: sql`now() + make_interval(secs => ${seconds})`,
      ...(giveUp && { state: 'given-up' as const }),
    })
    .where(eq(outbox.id, id));
}

export async function countWaiting(db: Database): Promise<number> {
  const [row] = await db.select({ n: sql<number>`count(*)::int` }).from(outbox).where(eq(outbox.state, 'waiting'));
  return row?.n ?? 0;
}
