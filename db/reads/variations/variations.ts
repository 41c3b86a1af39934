import { and, count, desc, eq, getTableColumns, gte, inArray, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { comments } from '@/db/schema/comments';
import { runProgress, runs } from '@/db/schema/runs';
import { revisions } from '@/db/schema/submissions';
import { variations } from '@/db/schema/variations';

/** Where a variation stands and who sees it, told with its row. */
const columns = {
  ...getTableColumns(variations),
  revision: revisions.number,
  lodgedAt: revisions.lodgedAt,
  baseKind: runs.kind,
  attachedTo: comments.threadId,
  readable: sql<boolean>`coalesce((select s.readable from variation_sharings s where s.variation_id = ${variations.id} order by s.at desc limit 1), false)`,
};

const selectVariations = (reader: Reader) =>
  reader
    .select(columns)
    .from(variations)
    .innerJoin(revisions, eq(revisions.id, variations.revisionId))
    .leftJoin(runs, eq(runs.id, variations.baseRunId))
    .leftJoin(comments, eq(comments.variationId, variations.id));

export type VariationRow = Awaited<ReturnType<typeof selectVariations>>[number];

export const listVariations = (reader: Reader, submissionId: string, userId: string): Promise<VariationRow[]> =>
  selectVariations(reader)
    .where(and(eq(variations.submissionId, submissionId), eq(variations.requestedBy, userId)))
    .orderBy(desc(variations.requestedAt));

export async function findVariation(reader: Reader, submissionId: string, variationId: string): Promise<VariationRow | undefined> {
  const [row] = await selectVariations(reader).where(and(eq(variations.submissionId, submissionId), eq(variations.id, variationId)));
  return row;
}

export async function findVariationByRun(reader: Reader, runId: string): Promise<VariationRow | undefined> {
  const [row] = await selectVariations(reader).where(eq(variations.runId, runId));
  return row;
}

/** Of which submission it is; says nothing to a reader before policy was asked. */
export async function findVariedSubmission(reader: Reader, variationId: string): Promise<string | undefined> {
  const [row] = await reader.select({ submissionId: variations.submissionId }).from(variations).where(eq(variations.id, variationId));
  return row?.submissionId;
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
