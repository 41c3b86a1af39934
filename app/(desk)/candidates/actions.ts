'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { answerCandidate as answer, candidateAnswerInput, namedCandidate } from '@/lib/services/candidates/answer-candidate';
import { takeOverCandidate as takeOverConfirmed } from '@/lib/services/candidates/take-over-candidate';

const id = z.uuid({ version: 'v4' });

export const answerCandidate = defineAction({
  door: 'action candidates.answer',
  input: z.strictObject({ id, answer: candidateAnswerInput }),
  handle: ({ actor, input }) => answer(actor, input.id, input.answer),
});

export const takeOver = defineAction({
  door: 'action candidates.takeOver',
  input: z.strictObject({ id, candidate: namedCandidate }),
  handle: ({ actor, input }) => takeOverConfirmed(actor, input.id, input.candidate),
});
