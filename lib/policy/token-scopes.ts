import type { AccountAction, SubmissionAction } from './actions';

/** What a bearer token may be made for. A token does nothing that is not named here, whoever made it. */
export const TOKEN_SCOPES = ['read', 'draft', 'lodge', 'review'] as const;
export type TokenScope = (typeof TOKEN_SCOPES)[number];

export const SCOPE_MEANINGS: Readonly<Record<TokenScope, string>> = {
  read: 'see your submissions, runs, variations and threads',
  draft: 'make and edit drafts, check them, ask for variations, stop either',
  lodge: 'lodge a draft and withdraw a submission',
  review: 'open, answer and close threads, and hand in a report',
};

const anyScope: readonly TokenScope[] = TOKEN_SCOPES;

/**
 * The scopes of which one is needed. What is not listed is closed to every token: making tokens,
 * naming authors, confirming authorship, stating that there is no conflict, and all that an editor or
 * an administrator does.
 */
const SCOPES: Readonly<Partial<Record<SubmissionAction | AccountAction, readonly TokenScope[]>>> = {
  'register.read': anyScope,
  'submission.list-own': ['read'],
  'submission.view-draft': ['read'],
  'submission.view-review': ['read'],
  'submission.view-public': ['read'],
  'submission.view-variations': ['read'],
  'submission.view-variation': ['read'],
  'review.read-threads': ['read'],
  'review.read-reports': ['read'],
  'submission.create': ['draft'],
  'submission.edit': ['draft'],
  'submission.check': ['draft'],
  'submission.answer-candidate': ['draft'],
  'submission.revise': ['draft'],
  'submission.vary': ['draft', 'review'],
  'submission.stop-run': ['draft', 'review'],
  'submission.share-variation': ['draft', 'review'],
  'submission.lodge': ['lodge'],
  'submission.withdraw': ['lodge'],
  'review.list-own': ['review'],
  'review.open-thread': ['review'],
  'review.comment': ['review'],
  'review.set-thread-state': ['review'],
  'review.note-to-editor': ['review'],
  'review.report': ['review'],
};

export const scopesFor = (action: SubmissionAction | AccountAction): readonly TokenScope[] => SCOPES[action] ?? [];
export const isTokenScope = (word: string): word is TokenScope => (TOKEN_SCOPES as readonly string[]).includes(word);
