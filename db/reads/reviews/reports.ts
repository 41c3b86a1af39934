import { and, asc, eq, ne, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { editorNotes, reports } from '@/db/schema/reports';

export type ReportRow = typeof reports.$inferSelect;

/** By round, then by letter, which says nothing about who was quick. */
export const listReports = (reader: Reader, submissionId: string): Promise<ReportRow[]> =>
  reader.select().from(reports).where(eq(reports.submissionId, submissionId)).orderBy(asc(reports.round), asc(reports.slot));

/** Referees whose report counts towards a level, over all rounds; each once. */
export async function countReports(reader: Reader, submissionId: string): Promise<number> {
  const [row] = await reader
    .select({ n: sql<number>`count(distinct ${reports.slot})::int` })
    .from(reports)
    .where(and(eq(reports.submissionId, submissionId), ne(reports.recommendation, 'outside')));
  return row?.n ?? 0;
}

export const listEditorNotes = (reader: Reader, submissionId: string) =>
  reader.select().from(editorNotes).where(eq(editorNotes.submissionId, submissionId)).orderBy(asc(editorNotes.writtenAt));
