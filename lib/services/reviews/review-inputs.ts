import { z } from 'zod';
import { DECISION_REMARKS } from '@/lib/reviews/decision';
import { RECOMMENDATIONS, REPORT_ANSWER_MAX_CHARACTERS } from '@/lib/reviews/report';
import { THREAD_KINDS, THREAD_VISIBILITIES } from '@/lib/reviews/threads';

/** Strict shapes of what people send to the verbs of review: for routes and actions alike. */
const id = z.uuid({ version: 'v4' });
const body = z.string().min(1).max(10_000);
const answer = z.string().max(REPORT_ANSWER_MAX_CHARACTERS);
const variationId = id.optional();

const anchor = z.strictObject({ claim: z.string().min(1).max(64), at: z.record(z.string().max(64), z.union([z.number(), z.string().max(64)])).nullable() });

export const threadInput = z.strictObject({
  kind: z.enum(THREAD_KINDS),
  visibility: z.enum(THREAD_VISIBILITIES),
  anchor,
  body,
  variationId,
});
export const replyInput = z.strictObject({ body, variationId });
export const closingInput = z.strictObject({ closing: z.enum(['resolved', 'overruled', 'moot']) });
export const invitationInput = z.strictObject({ refereeId: id, reason: z.string().max(500).optional() });
export const invitationAnswerInput = z.strictObject({ accept: z.boolean(), noConflict: z.boolean() });
export const noteInput = z.strictObject({ body });

export const reportInput = z.strictObject({
  answers: z.strictObject({ definition: answer, conventions: answer, data: answer, budget: answer, scope: answer, candidates: answer }),
  recommendation: z.enum(RECOMMENDATIONS),
  confidence: z.union([z.literal(1), z.literal(2), z.literal(3), z.literal(4), z.literal(5)]),
  noteToEditor: z.string().max(10_000).optional(),
});

const letter = { prose: z.string().max(20_000), typed: z.string().max(400) };
export const decisionInput = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('back-with-author'), ...letter }),
  z.strictObject({ kind: z.literal('set-aside'), ...letter }),
  z.strictObject({
    kind: z.literal('enter'),
    ...letter,
    publicSentence: z.string().max(600).optional(),
    level: z.union([z.literal(1), z.literal(2), z.literal(3)]),
    remarks: z.array(z.enum(DECISION_REMARKS)).max(DECISION_REMARKS.length),
  }),
]);
