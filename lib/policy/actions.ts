import type { Standing } from './facts';
import { EDITABLE_STATES, PUBLIC_STATES, SUBMISSION_STATES, type SubmissionState } from './submission-state';

type States = readonly SubmissionState[];
type Rule = Readonly<Partial<Record<Standing, States>>>;

const editable: States = EDITABLE_STATES;
const published: States = PUBLIC_STATES;
const everywhere: States = SUBMISSION_STATES;
const without = (...states: SubmissionState[]): States => SUBMISSION_STATES.filter((s) => !states.includes(s));
// Checking is also where a second revision is while its author checks it; before any lodging nothing is shown anyway.
const seenByEditor = without('draft');
const seenByReferee = without('draft', 'withdrawn', 'expired');
const discussed: States = ['in-review', 'deciding', 'back-with-author'];
const underWay: States = ['draft', 'checking', 'lodged', 'triage', 'in-review', 'deciding', 'back-with-author', 'on-hold'];
const answerable: States = [...EDITABLE_STATES.filter((s) => s !== 'back-with-author'), 'triage', ...discussed];
const underReview: States = ['triage', 'in-review', 'deciding'];

/**
 * Who may do what to a submission, and in which state: the whole of it. The matrix test prints this
 * table cell by cell. An action listed with a standing but in another state answers *conflict*; with
 * another standing *denied*; to somebody who may not see the submission at all, *not found*.
 */
export const SUBMISSION_ACTIONS = {
  /** Composer: draft, its check, its files. */
  'submission.view-draft': { author: everywhere, 'co-author': everywhere },
  /** A lodged revision with its official run and threads. */
  'submission.view-review': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor },
  'submission.view-public': { author: published, 'co-author': published, referee: published, invited: published, editor: published, administrator: published, member: published, visitor: published },

  /** Title, statement, sheet, files; also loading a claim-sheet folder. */
  'submission.edit': { author: editable, 'co-author': editable },
  'submission.check': { author: editable, 'co-author': editable },
  'submission.lodge': { author: editable },
  'submission.revise': { author: ['back-with-author'], 'co-author': ['back-with-author'] },
  'submission.withdraw': { author: underWay },
  'submission.manage-people': { author: editable },
  'submission.confirm-authorship': { author: everywhere, 'co-author': everywhere },

  /** The authors' word on a reading under which a claim would agree; it changes no number. */
  'submission.answer-candidate': { author: answerable, 'co-author': answerable },

  /** Authors also on the draft they are writing; the service sees to it that nobody else can. */
  'submission.vary': {
    author: ['draft', ...discussed, 'triage', ...published], 'co-author': ['draft', ...discussed, 'triage', ...published],
    referee: [...underReview, ...published], editor: [...underReview, 'back-with-author', ...published], member: published,
  },

  /** One's own check or variation under way; the service sees to it that it is. Never an official run. */
  'submission.stop-run': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor, member: published },

  /** One's own reruns, wherever one may still see the submission. */
  'submission.view-variations': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor, member: published },
  /** One rerun: one's own, one attached to a comment that one may read, or one that its owner opened by its link. */
  'submission.view-variation': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor, member: published, visitor: published },
  /** Opens one's own rerun on a record to whoever has its link, or shuts it. */
  'submission.share-variation': { author: published, 'co-author': published, referee: published, editor: published, member: published },

  /** An editor becomes the one who holds the submission. */
  'review.take': { editor: ['triage', 'in-review', 'deciding'] },
  'review.invite': { editor: ['triage', 'in-review'] },
  'review.withdraw-invitation': { editor: ['triage', 'in-review'] },
  'review.answer-invitation': { invited: ['triage', 'in-review'] },
  'review.begin': { editor: ['triage'] },
  'review.read-threads': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor },
  'review.open-thread': { author: discussed, 'co-author': discussed, referee: underReview, editor: [...discussed, 'triage'] },
  'review.comment': { author: discussed, 'co-author': discussed, referee: [...underReview, 'back-with-author'], editor: [...discussed, 'triage'] },
  'review.set-thread-state': { author: discussed, 'co-author': discussed, referee: [...underReview, 'back-with-author'], editor: [...discussed, 'triage'] },
  'review.note-to-editor': { referee: [...underReview, 'back-with-author'] },
  'review.report': { referee: ['in-review'] },
  /** To authors only what a decision released; the reading sees to that. */
  'review.read-reports': { author: everywhere, 'co-author': everywhere, referee: seenByReferee, editor: seenByEditor },
  'review.see-identities': { editor: seenByEditor },
  'review.call-for-decision': { editor: ['in-review'], worker: ['in-review'] },
  /** Setting aside is open at triage too: out of scope, or no claim that can be checked. */
  'review.set-aside': { editor: ['triage', 'deciding'] },
  'review.send-back': { editor: ['deciding'] },
  'review.enter': { editor: ['deciding'] },
  'review.hold': { editor: ['lodged', 'triage', 'in-review', 'deciding', 'back-with-author'] },
  'review.resume': { editor: ['on-hold'] },
  /** After a change of the engine. */
  'record.recheck': { administrator: ['entered', 'under-recheck'] },
  'record.strike': { editor: ['entered', 'superseded', 'under-recheck', 'lapsed'] },

  /** Moves of the machine. */
  'run.finish-check': { worker: ['checking'] },
  'run.finish-official': { worker: ['lodged'] },
  'run.finish-variation': { worker: everywhere },
} as const satisfies Readonly<Record<string, Rule>>;

export type SubmissionAction = keyof typeof SUBMISSION_ACTIONS;

/** What needs no submission: only what kind of account asks. */
export const ACCOUNT_ACTIONS = {
  'register.read': ['visitor', 'member', 'editor', 'administrator'],
  'account.read-own': ['member', 'editor', 'administrator'],
  /** Name, address, ways in, sessions, letters: one's own alone. */
  'account.edit-own': ['member', 'editor', 'administrator'],
  'account.manage-tokens': ['member', 'editor', 'administrator'],
  'submission.create': ['member', 'editor', 'administrator'],
  'submission.list-own': ['member', 'editor', 'administrator'],
  'review.list-own': ['member', 'editor', 'administrator'],
  'queue.read': ['editor'],
  'admin.read-jobs': ['administrator'],
  'admin.retry-job': ['administrator'],
  'admin.read-audit': ['administrator'],
  'admin.manage-people': ['administrator'],
} as const satisfies Readonly<Record<string, readonly AccountStanding[]>>;

export type AccountStanding = 'visitor' | 'member' | 'editor' | 'administrator';
export type AccountAction = keyof typeof ACCOUNT_ACTIONS;

export const ruleOf = (action: SubmissionAction): Rule => SUBMISSION_ACTIONS[action];
export const accountRuleOf = (action: AccountAction): readonly AccountStanding[] => ACCOUNT_ACTIONS[action];
