import type { ReactNode } from 'react';
import { Icon } from '@/app/_ui/primitives/icon';
import { samePlace, type Place } from '@/lib/kernel/place';
import { anchoredText } from '@/app/views/anchored-text';
import type { NumberChange } from '@/lib/services/reviews/desk-view';
import type { ThreadView } from '@/lib/services/reviews/thread-view';

/** Threads hanging on this number; a claim of one point is its own whole. */
export const threadsAt = (threads: readonly ThreadView[], claimId: string, at: Place, single: boolean): readonly ThreadView[] =>
  threads.filter(({ anchor }) => anchor.claim === claimId && (anchor.at === null || Object.keys(anchor.at).length === 0 ? single : samePlace(anchor.at, at)));

interface ThreadAnchorProps {
  readonly threads: readonly ThreadView[];
  readonly claimId: string;
  readonly at: Place;
  readonly single: boolean;
}

/** The count of threads beside the very number, leading to them. */
export function ThreadAnchor({ threads, claimId, at, single }: ThreadAnchorProps): ReactNode {
  return threadsAt(threads, claimId, at, single).map((thread) => (
    <a key={thread.id} href={`#${claimId}`} className="anchor ml-2" aria-label={`Thread ${thread.number} on this number`}>{thread.number}</a>
  ));
}

/** "This number changed: 23.710 ± 0.012 → 23.690 ± 0.011", where the revision before had another. */
export function changeAt(changes: readonly NumberChange[], claimId: string, at: Place): ReactNode {
  const change = changes.find((c) => c.claim === claimId && samePlace(c.at, at));
  if (!change) return null;
  const { standing } = change;
  return (
    <p className="mt-1 text-small text-ink-2">
      <Icon name="open" className="mr-1 inline size-2.5" />
      {standing.standing === 'lost' ? 'This number is no longer claimed.' : <>This number changed: {anchoredText(standing.was)} → {anchoredText(standing.now)}</>}
    </p>
  );
}
