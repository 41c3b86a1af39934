'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { removeFile as remove } from '@/lib/services/files/remove-file';
import { restoreFile as restore } from '@/lib/services/files/restore-file';
import { takeOverFile as takeOver, takeOverInput } from '@/lib/services/files/take-over-file';
import { addCoAuthor as addAuthor, confirmAuthorship as confirm, removeCoAuthor as removeAuthor, restoreCoAuthor as restoreAuthor } from '@/lib/services/submissions/change-people';
import { answerFinding as answer, findingAnswer } from '@/lib/services/submissions/answer-finding';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { createDraft as create } from '@/lib/services/submissions/create-draft';
import { duplicateInput, duplicateSubmission } from '@/lib/services/submissions/duplicate-submission';
import { listEarlierParts } from '@/lib/services/submissions/list-earlier-parts';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';
import { draftChange, updateDraft } from '@/lib/services/submissions/update-draft';
import { withdrawSubmission } from '@/lib/services/submissions/withdraw-submission';

const id = z.uuid({ version: 'v4' });
const onlyId = z.strictObject({ id });

export const createDraft = defineAction({
  door: 'action compose.createDraft',
  input: z.strictObject({ title: z.string().max(300).optional() }),
  rate: { points: 60, perS: 3600 },
  handle: ({ actor, input }) => create(actor, input),
});

export const saveDraft = defineAction({
  door: 'action compose.saveDraft',
  input: z.strictObject({ id, change: draftChange }),
  handle: ({ actor, input }) => updateDraft(actor, input.id, input.change),
});

export const duplicate = defineAction({
  door: 'action compose.duplicate',
  input: duplicateInput.extend({ id }),
  rate: { points: 60, perS: 3600 },
  handle: ({ actor, input: { id: submissionId, ...input } }) => duplicateSubmission(actor, submissionId, input),
});

export const listEarlier = defineAction({ door: 'action compose.listEarlier', input: z.strictObject({}), handle: ({ actor }) => listEarlierParts(actor) });

export const takeOverFile = defineAction({
  door: 'action compose.takeOverFile',
  input: z.strictObject({ id, from: takeOverInput }),
  handle: ({ actor, input }) => takeOver(actor, input.id, input.from),
});

export const removeFile = defineAction({
  door: 'action compose.removeFile',
  input: z.strictObject({ id, name: z.string().min(1).max(300) }),
  handle: ({ actor, input }) => remove(actor, input.id, { name: input.name }),
});

export const answerFinding = defineAction({
  door: 'action compose.answerFinding',
  input: z.strictObject({ id, finding: findingAnswer }),
  handle: ({ actor, input }) => answer(actor, input.id, input.finding),
});

export const restoreFile = defineAction({
  door: 'action compose.restoreFile',
  input: z.strictObject({ id, fileId: id, name: z.string().min(1).max(300) }),
  handle: ({ actor, input: { id: submissionId, ...file } }) => restore(actor, submissionId, file),
});

export const check = defineAction({ door: 'action compose.check', input: onlyId, handle: ({ actor, input }) => checkDraft(actor, input.id) });

export const lodge = defineAction({ door: 'action compose.lodge', input: onlyId, handle: ({ actor, input }) => lodgeSubmission(actor, input.id) });

export const revise = defineAction({ door: 'action compose.revise', input: onlyId, handle: ({ actor, input }) => reviseSubmission(actor, input.id) });

export const withdraw = defineAction({
  door: 'action compose.withdraw',
  input: z.strictObject({ id, reason: z.string().max(2000) }),
  handle: ({ actor, input }) => withdrawSubmission(actor, input.id, { reason: input.reason }),
});

export const addCoAuthor = defineAction({
  door: 'action compose.addCoAuthor',
  input: z.strictObject({ id, email: z.email('an e-mail address').max(254) }),
  rate: { points: 30, perS: 3600 },
  handle: ({ actor, input }) => addAuthor(actor, input.id, { email: input.email }),
});

export const removeCoAuthor = defineAction({
  door: 'action compose.removeCoAuthor',
  input: z.strictObject({ id, userId: id }),
  handle: ({ actor, input }) => removeAuthor(actor, input.id, { userId: input.userId }),
});

export const restoreCoAuthor = defineAction({
  door: 'action compose.restoreCoAuthor',
  input: z.strictObject({ id, userId: id }),
  handle: ({ actor, input }) => restoreAuthor(actor, input.id, { userId: input.userId }),
});

export const confirmAuthorship = defineAction({ door: 'action compose.confirmAuthorship', input: onlyId, handle: ({ actor, input }) => confirm(actor, input.id) });
