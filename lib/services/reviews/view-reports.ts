import type { Reader } from '@/db/client';
import type { DecisionRow } from '@/db/reads/decisions/decisions';
import { listEditorNotes, listReports, type ReportRow } from '@/db/reads/reviews/reports';
import { loadWriters } from '@/db/reads/reviews/writers';
import { bylineFor, utcDay, type Viewer } from '@/lib/reviews/anonymity';
import type { EditorNoteView, ReportView } from './report-view';

/** The day on which a decision released a round's reports, all together; undefined while it has not. */
const releaseOf = (round: number, decisions: readonly DecisionRow[]): Date | undefined =>
  decisions.filter((d) => d.round === round).map((d) => d.decidedAt).sort((a, b) => a.getTime() - b.getTime())[0];

/** The editor sees every report, a referee their own and the released ones, everybody else the released ones. */
export async function viewReports(reader: Reader, submissionId: string, viewer: Viewer, decisions: readonly DecisionRow[]): Promise<readonly ReportView[]> {
  const rows = await listReports(reader, submissionId);
  const writerOf = await loadWriters(reader, submissionId);
  const views: ReportView[] = [];
  for (const row of rows) {
    const released = releaseOf(row.round, decisions);
    const own = row.refereeId === viewer.userId;
    if (!released && !own && viewer.side !== 'editor') continue;
    const writer = { ...(await writerOf(row.refereeId)), side: 'referee' as const, slot: row.slot };
    views.push(viewReport(row, bylineFor(writer, viewer), own || viewer.side === 'editor' ? undefined : released));
  }
  return views;
}

function viewReport(row: ReportRow, byline: { readonly by: string; readonly yours: boolean }, releasedOn: Date | undefined): ReportView {
  const { id, round, revision, answers, recommendation, confidence } = row;
  const { by, yours } = byline;
  // When it was handed in says who was quick; across the line there is only the day of the release.
  const when = releasedOn ? ({ precision: 'day', on: utcDay(releasedOn.toISOString()) } as const) : ({ precision: 'instant', at: row.handedInAt.toISOString() } as const);
  return { id, by, yours, round, revision, when, answers, recommendation, confidence };
}

/** All to the editor, their own to a referee, none to anybody else. */
export async function viewNotes(reader: Reader, submissionId: string, viewer: Viewer): Promise<readonly EditorNoteView[]> {
  if (viewer.side === 'authors') return [];
  const rows = (await listEditorNotes(reader, submissionId)).filter((n) => viewer.side === 'editor' || n.writerId === viewer.userId);
  const writerOf = await loadWriters(reader, submissionId);
  const views: EditorNoteView[] = [];
  for (const row of rows) {
    const writer = await writerOf(row.writerId);
    views.push({ id: row.id, by: writer.name, yours: row.writerId === viewer.userId, at: row.writtenAt.toISOString(), body: row.body });
  }
  return views;
}
