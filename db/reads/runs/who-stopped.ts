import { and, eq, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { auditEntries } from '@/db/schema/audit';
import { runs } from '@/db/schema/runs';

/**
 * Who asked a check to stop; undefined where nobody did. The audit trail names referees and is not shown: of it this
 * reads one act on a check, which none but its authors may stop.
 */
export async function findWhoStopped(reader: Reader, checkId: string): Promise<string | undefined> {
  const [row] = await reader
    .select({ name: users.name })
    .from(auditEntries)
    .innerJoin(runs, and(eq(runs.submissionId, auditEntries.subjectId), eq(runs.id, checkId), eq(runs.kind, 'check')))
    .innerJoin(users, eq(users.id, auditEntries.actorId))
    .where(and(eq(auditEntries.subjectKind, 'submission'), eq(auditEntries.action, 'submission.stop-run'), sql`${auditEntries.details}->>'runId' = ${checkId}`))
    .orderBy(auditEntries.at)
    .limit(1);
  return row?.name;
}
