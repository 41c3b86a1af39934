import { asc, eq, inArray } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { comments } from '@/db/schema/comments';
import { threads } from '@/db/schema/threads';

export type ThreadRow = typeof threads.$inferSelect;
export type CommentRow = typeof comments.$inferSelect;

/** In the order of opening. */
export const listThreads = (reader: Reader, submissionId: string): Promise<ThreadRow[]> =>
  reader.select().from(threads).where(eq(threads.submissionId, submissionId)).orderBy(asc(threads.openedAt), asc(threads.id));

export async function listComments(reader: Reader, threadIds: readonly string[]): Promise<CommentRow[]> {
  if (threadIds.length === 0) return [];
  return reader.select().from(comments).where(inArray(comments.threadId, [...threadIds])).orderBy(asc(comments.writtenAt), asc(comments.id));
}

export async function findThread(reader: Reader, threadId: string): Promise<ThreadRow | undefined> {
  const [row] = await reader.select().from(threads).where(eq(threads.id, threadId));
  return row;
}
