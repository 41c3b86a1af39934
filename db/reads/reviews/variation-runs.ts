import { and, desc, eq, inArray, or, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { comments } from '@/db/schema/comments';
import { runProgress, runResults } from '@/db/schema/runs';
import { variations } from '@/db/schema/variations';

/** Reruns that are attached to some comment of the submission, or were asked for by the reader; with what they found. */
export const listSeenVariations = (reader: Reader, submissionId: string, readerId: string | null, attached: readonly string[]) =>
  reader
    .select({
      id: variations.id,
      revisionId: variations.revisionId,
      claimId: variations.claimId,
      changes: variations.changes,
      note: variations.note,
      requestedBy: variations.requestedBy,
      requestedAt: variations.requestedAt,
      state: runProgress.state,
      result: runResults.result,
      attachedTo: comments.threadId,
    })
    .from(variations)
    .innerJoin(runProgress, eq(runProgress.runId, variations.runId))
    .leftJoin(runResults, eq(runResults.runId, variations.runId))
    .leftJoin(comments, eq(comments.variationId, variations.id))
    .where(
      and(
        eq(variations.submissionId, submissionId),
        or(readerId === null ? sql`false` : eq(variations.requestedBy, readerId), attached.length > 0 ? inArray(variations.id, [...attached]) : sql`false`),
      ),
    )
    .orderBy(desc(variations.requestedAt));
export type SeenVariationRow = Awaited<ReturnType<typeof listSeenVariations>>[number];
