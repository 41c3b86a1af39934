import { and, desc, eq, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { auditEntries } from '@/db/schema/audit';

/** Where a co-author stood who was taken off within the last ten minutes. The trail alone remembers it. */
export async function findRecentRemoval(reader: Reader, submissionId: string, userId: string): Promise<{ readonly position: number; readonly confirmedAt: Date | null } | undefined> {
  const [row] = await reader
    .select({ details: auditEntries.details })
    .from(auditEntries)
    .where(and(eq(auditEntries.subjectKind, 'submission'), eq(auditEntries.subjectId, submissionId), sql`${auditEntries.details}->>'removedCoAuthor' = ${userId}`, sql`${auditEntries.at} > now() - interval '10 minutes'`))
    .orderBy(desc(auditEntries.at))
    .limit(1);
  if (!row) return undefined;
  const { position, confirmedAt } = row.details;
  return { position: Number(position), confirmedAt: typeof confirmedAt === 'string' ? new Date(confirmedAt) : null };
}
