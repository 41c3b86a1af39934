import { z } from 'zod';
import { SUBMISSION_STATES } from '@/lib/policy/submission-state';
import { DECISION_KINDS, DECISION_REMARKS } from '@/lib/reviews/decision';
import { RECOMMENDATIONS } from '@/lib/reviews/report';
import { THREAD_STATES } from '@/lib/reviews/threads';
import { anchorSchema, reAnchoringSchema, seenTimeSchema, seenVariationSchema, threadSchema } from './thread-schema';

/** `desk-view.ts`, `decision-view.ts`, `report-view.ts` and `invitation-view.ts` as schemas. */
const level = z.union([z.literal(1), z.literal(2), z.literal(3)]);
const at = z.record(z.string(), z.union([z.number(), z.string()]));
const nullable = z.number().nullable();

const letterNumber = z.object({ claim: z.string(), quantity: z.string(), unit: z.string(), at, claimed: z.string(), recomputed: nullable, expandedUncertainty: nullable, tolerance: nullable, verdict: z.string() });
const letterPoint = z.object({ threadId: z.string(), kind: z.enum(['must-change', 'should-change']), anchor: anchorSchema, state: z.enum(THREAD_STATES), text: z.string() });
const letter = { numbers: z.array(letterNumber), points: z.array(letterPoint) };

const signing = z.union([
  z.object({ state: z.enum(['not-needed', 'waiting']) }),
  z.object({ state: z.literal('signed'), recordId: z.string() }),
  z.object({ state: z.literal('refused'), reason: z.string() }),
]);
const decision = z
  .object({
    id: z.string(),
    kind: z.enum(DECISION_KINDS),
    round: z.int(),
    revision: z.int(),
    by: z.string(),
    at: z.string(),
    level: level.nullable(),
    remarks: z.array(z.enum(DECISION_REMARKS)),
    covers: z.array(z.string()),
    letter: z.object({ ...letter, prose: z.string() }),
    publicSentence: z.string(),
    signing,
  })
  .meta({ id: 'Decision' });

const answers = z.object({ definition: z.string(), conventions: z.string(), data: z.string(), budget: z.string(), scope: z.string(), candidates: z.string() });
const report = z
  .object({ id: z.string(), by: z.string(), yours: z.boolean(), round: z.int(), revision: z.int(), when: seenTimeSchema, answers, recommendation: z.enum(RECOMMENDATIONS), confidence: z.int().min(1).max(5) })
  .meta({ id: 'Report' });

export const conflictFlagSchema = z.object({ code: z.string(), level: z.enum(['bar', 'ask', 'note']), text: z.string() });
const invitation = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  affiliation: z.string().nullable(),
  slot: z.string(),
  state: z.enum(['asked', 'accepted', 'declined', 'lapsed', 'relieved']),
  invitedAt: z.string(),
  answeredAt: z.string().nullable(),
  reportDue: z.string().nullable(),
  hasReported: z.boolean(),
  flags: z.array(conflictFlagSchema),
  reason: z.string().nullable(),
});

export const deskSchema = z
  .object({
    submissionId: z.string(),
    title: z.string(),
    state: z.enum(SUBMISSION_STATES),
    stateWords: z.string(),
    round: z.int(),
    revision: z.int(),
    you: z.object({ role: z.enum(['author', 'co-author', 'referee', 'editor']), name: z.string() }),
    report: z.object({ due: z.string().nullable(), handedIn: z.boolean() }).nullable(),
    threads: z.array(threadSchema),
    variations: z.array(seenVariationSchema),
    reports: z.array(report),
    decisions: z.array(decision),
    changes: z.array(z.object({ claim: z.string(), at, standing: reAnchoringSchema })),
    notes: z.array(z.object({ id: z.string(), by: z.string(), yours: z.boolean(), at: z.string(), body: z.string() })),
    invitations: z.array(invitation).nullable(),
    may: z.object({ openThread: z.boolean(), report: z.boolean(), noteToEditor: z.boolean(), takeTriage: z.boolean(), invite: z.boolean(), sendToReview: z.boolean(), beginDeciding: z.boolean(), decide: z.boolean() }),
  })
  .meta({ id: 'Desk' });

/** What the editor's decision starts from. */
export const decisionDraftSchema = z
  .object({
    levels: z.array(z.object({ level, open: z.boolean(), covers: z.array(z.string()), refusals: z.array(z.object({ code: z.string(), text: z.string() })) })),
    remarks: z.array(z.enum(DECISION_REMARKS)),
    letter: z.object(letter),
    signingWords: z.string(),
  })
  .meta({ id: 'DecisionDraft' });
