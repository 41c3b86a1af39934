import type { ReactNode } from 'react';
import { changesInWords } from '@/app/(public)/variations/variation-words';
import { Prose } from '@/app/_ui/math/render-markdown';
import { placeText } from '@/app/views/place-text';
import type { ResultPoint } from '@/lib/pipeline/result';
import type { DeskView } from '@/lib/services/reviews/desk-view';
import type { ThreadView } from '@/lib/services/reviews/thread-view';
import type { VariationView } from '@/lib/services/variations/variation-view';
import { NewThread } from './new-thread';
import { ThreadCard } from './thread-card';

interface ClaimDiscussionProps {
  readonly desk: DeskView;
  readonly claimId: string;
  readonly points: readonly ResultPoint[];
  readonly variations: readonly VariationView[];
}

/** The threads of one claim, at its numbers, and the form for a new one. */
export function ClaimDiscussion({ desk, claimId, points, variations }: ClaimDiscussionProps): ReactNode {
  const threads = desk.threads.filter((t) => t.anchor.claim === claimId);
  const attachable = variations.filter((v) => v.run.state === 'measured' && !v.ofDraft && v.visibility !== 'comment').map((v) => ({ id: v.id, words: changesInWords(v.changes) }));
  return (
    <section aria-label={`Threads on ${claimId}`} className="grid gap-3">
      <h4 className="text-h3">Threads <span className="text-ink-2">{threads.length}</span></h4>
      {threads.length === 0 && <p className="text-ui text-ink-2">Nobody has asked about this number yet.</p>}
      {threads.map((thread) => <Thread key={thread.id} thread={thread} attachable={attachable} />)}
      {desk.may.openThread && (
        <NewThread
          submissionId={desk.submissionId}
          claimId={claimId}
          isAuthor={desk.you.role === 'author' || desk.you.role === 'co-author'}
          places={points.map((p) => ({ at: p.at, words: placeText(p.at) ?? 'the number' }))}
          attachable={attachable}
        />
      )}
    </section>
  );
}

/** Bodies are set on the server: the card itself carries no Markdown machinery to the browser. */
function Thread({ thread, attachable }: { readonly thread: ThreadView; readonly attachable: readonly { readonly id: string; readonly words: string }[] }) {
  const bodies = thread.comments.map((comment) => <Prose key={comment.id} source={comment.body} />);
  return <ThreadCard thread={thread} bodies={bodies} place={thread.anchor.at ? placeText(thread.anchor.at) : null} attachable={attachable} />;
}
