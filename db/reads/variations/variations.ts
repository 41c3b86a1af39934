import { and, count, desc, eq, gte, inArray, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { runProgress } from '@/db/schema/runs';
import { variations } from '@/db/schema/variations';

export const listVariations = (reader: Reader, submissionId: string, userId: string) =>
  reader
    .select()
    .from(variations)
    .where(and(eq(variations.submissionId, submissionId), eq(variations.requestedBy, userId)))
    .orderBy(desc(variations.requestedAt));

export async function findVariation(reader: Reader, submissionId: string, variationId: string) {
  const [row] = await reader.select().from(variations).where(and(eq(variations.submissionId, submissionId), eq(variations.id, variationId)));
  return row;
}

/** How many this person asked for here lately, and how many of theirs, anywhere, are not done. */
export async function countVariations(reader: Reader, submissionId: string, userId: string, sinceHours: number) {
  const [lately] = await reader
    .select({ n: count() })
    .from(variations)
    .where(and(eq(variations.submissionId, submissionId), eq(variations.requestedBy, userId), gte(variations.requestedAt, sql`now() - make_interval(hours => ${sinceHours})`)));
  const [open] = await reader
    .select({ n: count() })
    .from(variations)
    .innerJoin(runProgress, eq(runProgress.runId, variations.runId))
    .where(and(eq(variations.requestedBy, userId), inArray(runProgress.state, ['queued', 'running'])));
  return { lately: lately?.n ?? 0, open: open?.n ?? 0 };
}
