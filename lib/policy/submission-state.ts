/**
 * The states of a submission, in the words of the product. Who may move what is the table in
 * `actions.ts`; the moves a machine makes (Checking back to Draft, Lodged to Triage) are there too,
 * under the actor `worker`.
 */
export const SUBMISSION_STATES = [
  'draft',
  'checking',
  'lodged',
  'triage',
  'in-review',
  'deciding',
  'back-with-author',
  'set-aside',
  'entered',
  'withdrawn',
  'expired',
  'on-hold',
  'superseded',
  'under-recheck',
  'lapsed',
  'struck',
] as const;
export type SubmissionState = (typeof SUBMISSION_STATES)[number];

export const STATE_WORDS: Readonly<Record<SubmissionState, string>> = {
  draft: 'Draft',
  checking: 'Checking',
  lodged: 'Lodged',
  triage: 'Triage',
  'in-review': 'In review',
  deciding: 'Deciding',
  'back-with-author': 'Back with author',
  'set-aside': 'Set aside',
  entered: 'Entered',
  withdrawn: 'Withdrawn',
  expired: 'Expired',
  'on-hold': 'On hold',
  superseded: 'Superseded',
  'under-recheck': 'Under recheck',
  lapsed: 'Lapsed',
  struck: 'Struck',
};

/** States in which a record can be read by everyone. */
export const PUBLIC_STATES = ['entered', 'superseded', 'under-recheck', 'lapsed', 'struck'] as const satisfies readonly SubmissionState[];

/** States in which the author may change the current, unlodged revision. */
export const EDITABLE_STATES = ['draft', 'back-with-author'] as const satisfies readonly SubmissionState[];

/** After lodging and before a decision has ended the matter. */
export const REVIEW_STATES = ['lodged', 'triage', 'in-review', 'deciding', 'back-with-author', 'on-hold'] as const satisfies readonly SubmissionState[];

export const isPublicState = (state: SubmissionState): boolean => (PUBLIC_STATES as readonly SubmissionState[]).includes(state);
export const isEditableState = (state: SubmissionState): boolean => (EDITABLE_STATES as readonly SubmissionState[]).includes(state);
