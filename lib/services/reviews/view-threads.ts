import type { Reader } from '@/db/client';
import { listComments, listThreads, type CommentRow, type ThreadRow } from '@/db/reads/reviews/threads';
import { listSeenVariations } from '@/db/reads/reviews/variation-runs';
import { loadWriters } from '@/db/reads/reviews/writers';
import type { ResultDocument } from '@/lib/pipeline/result';
import { reAnchor } from '@/lib/reviews/anchors';
import { bylineFor, timeFor, type Viewer } from '@/lib/reviews/anonymity';
import { isOpen, mayClose, mayRead, type Closing } from '@/lib/reviews/threads';
import type { CommentView, ThreadView, VariationView } from './thread-view';
import { viewVariation } from './view-variation';

export interface ThreadScene {
  readonly submissionId: string;
  readonly viewer: Viewer;
  /** Newest lodged revision and its numbers. */
  readonly revision: number;
  readonly result: ResultDocument | null;
  readonly may: { readonly reply: boolean; readonly close: boolean };
}

type WriterOf = Awaited<ReturnType<typeof loadWriters>>;

/** Threads as one reader may see them, numbered among those. */
export async function viewThreads(reader: Reader, scene: ThreadScene): Promise<readonly ThreadView[]> {
  const { viewer, submissionId } = scene;
  const rows = (await listThreads(reader, submissionId)).filter((t) => mayRead(t.visibility, viewer.side, t.openedBy === viewer.userId));
  const comments = await listComments(reader, rows.map((t) => t.id));
  const writerOf = await loadWriters(reader, submissionId);
  const variations = await attachedVariations(reader, scene, rows, comments);
  const views: ThreadView[] = [];
  for (const row of rows) {
    const own = comments.filter((c) => c.threadId === row.id);
    views.push(viewThread(row, views.length + 1, scene, await viewComments(own, viewer, writerOf, variations)));
  }
  return views;
}

function viewThread(row: ThreadRow, number: number, scene: ThreadScene, comments: readonly CommentView[]): ThreadView {
  const { viewer, result, revision } = scene;
  const facts = { state: row.state, side: viewer.side, isOpener: row.openedBy === viewer.userId, openedOnRevision: row.openedOnRevision, revision };
  const closings = (['resolved', 'overruled', 'moot'] as const satisfies readonly Closing[]).filter((c) => mayClose(c, facts));
  const now = result ? reAnchor(row.anchor, row.anchored, result) : ({ standing: 'waiting' } as const);
  return {
    id: row.id,
    number,
    kind: row.kind,
    state: row.state,
    visibility: row.visibility,
    anchor: { ...row.anchor, opened: row.anchored, openedOnRevision: row.openedOnRevision, now },
    comments,
    may: { reply: scene.may.reply && isOpen(row.state), close: scene.may.close ? closings : [] },
  };
}

async function viewComments(rows: readonly CommentRow[], viewer: Viewer, writerOf: WriterOf, variations: ReadonlyMap<string, VariationView>): Promise<CommentView[]> {
  const views: CommentView[] = [];
  for (const row of rows) {
    // The side is the one on which it was written: an editor does not become an author afterwards.
    const writer = { ...(await writerOf(row.writerId)), side: row.side };
    views.push({
      id: row.id,
      ...bylineFor(writer, viewer),
      when: timeFor(row.writtenAt.toISOString(), writer, viewer),
      body: row.body,
      variation: row.variationId === null ? null : (variations.get(row.variationId) ?? null),
    });
  }
  return views;
}

async function attachedVariations(reader: Reader, scene: ThreadScene, threads: readonly ThreadRow[], comments: readonly CommentRow[]): Promise<ReadonlyMap<string, VariationView>> {
  const attached = comments.flatMap((c) => (c.variationId === null ? [] : [c.variationId]));
  const rows = await listSeenVariations(reader, scene.submissionId, null, attached);
  const visibility = new Map(threads.map((t) => [t.id, t.visibility]));
  return new Map(rows.map((row) => [row.id, viewVariation(row, scene.result, row.attachedTo === null ? null : (visibility.get(row.attachedTo) ?? null))]));
}

/** The reader's own reruns that are attached to nothing. */
export async function viewPrivateVariations(reader: Reader, scene: ThreadScene): Promise<readonly VariationView[]> {
  if (scene.viewer.userId === '') return [];
  const rows = await listSeenVariations(reader, scene.submissionId, scene.viewer.userId, []);
  return rows.filter((row) => row.attachedTo === null).map((row) => viewVariation(row, scene.result, null));
}
