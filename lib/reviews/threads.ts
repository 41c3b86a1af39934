/** Kinds and states of a thread, and who may move it: domain.md 6.5 in the words of product.md. */
export const THREAD_KINDS = ['question', 'must-change', 'should-change', 'note'] as const;
export type ThreadKind = (typeof THREAD_KINDS)[number];

export const THREAD_KIND_WORDS: Readonly<Record<ThreadKind, string>> = {
  question: 'question',
  'must-change': 'must change',
  'should-change': 'should change',
  note: 'note',
};

export const THREAD_STATES = ['open', 'answered', 'resolved', 'overruled', 'moot'] as const;
export type ThreadState = (typeof THREAD_STATES)[number];

export const THREAD_STATE_WORDS: Readonly<Record<ThreadState, string>> = {
  open: 'open',
  answered: 'answered',
  resolved: 'resolved by referee',
  overruled: 'overruled by editor',
  moot: 'moot after revision',
};

/** Who reads a thread. `authors` threads become public with the record; the others never do. */
export const THREAD_VISIBILITIES = ['editor-only', 'referees', 'authors'] as const;
export type ThreadVisibility = (typeof THREAD_VISIBILITIES)[number];

/** On which side of the anonymity line a person stands in this submission. */
export type Side = 'authors' | 'referee' | 'editor';

/** How a thread may be closed. The words follow from who closes it. */
export type Closing = 'resolved' | 'overruled' | 'moot';

export const isOpen = (state: ThreadState): boolean => state === 'open' || state === 'answered';

/** A reply by the authors answers; a further word of the referee's or editor's asks again. A closed thread stays closed. */
export function stateAfterReply(state: ThreadState, by: Side): ThreadState {
  if (!isOpen(state)) return state;
  return by === 'authors' ? 'answered' : 'open';
}

/** Only the opener or the editor closes a thread; only the editor overrules; moot needs a later revision. */
export function mayClose(
  closing: Closing,
  facts: { readonly state: ThreadState; readonly side: Side; readonly isOpener: boolean; readonly openedOnRevision: number; readonly revision: number },
): boolean {
  if (!isOpen(facts.state)) return false;
  if (closing === 'overruled') return facts.side === 'editor';
  const mayAtAll = facts.side === 'editor' || facts.isOpener;
  return closing === 'moot' ? mayAtAll && facts.revision > facts.openedOnRevision : mayAtAll;
}

export function mayRead(visibility: ThreadVisibility, side: Side, isOpener: boolean): boolean {
  if (side === 'editor' || isOpener) return true;
  if (visibility === 'editor-only') return false;
  return side === 'referee' || visibility === 'authors';
}
