import { z } from 'zod';
import { pageQuery, pageSchema } from '@/lib/services/paging';
import { conflictFlagSchema, decisionDraftSchema, deskSchema } from '@/lib/services/reviews/desk-schema';
import { queueSchema, refereeCandidatesSchema } from '@/lib/services/reviews/queue-schema';
import { closingInput, decisionInput, invitationAnswerInput, invitationInput, noteInput, replyInput, reportInput, threadInput } from '@/lib/services/reviews/review-inputs';
import { threadSchema } from '@/lib/services/reviews/thread-schema';
import { operation } from '../operation';
import { idParam } from './submissions';

const uuid = z.uuid({ version: 'v4' });
const nothing = z.null();

export const readDesk = operation({ door: 'GET /api/v1/submissions/{id}/desk', summary: 'Everything people said about a submission, as you may see it.', params: idParam, answer: deskSchema });
export const listThreads = operation({ door: 'GET /api/v1/submissions/{id}/threads', summary: 'Threads on the numbers, in the order of opening.', params: idParam, query: z.strictObject(pageQuery), answer: pageSchema(threadSchema) });
export const openThread = operation({ door: 'POST /api/v1/submissions/{id}/threads', summary: 'Opens a thread on a number, with its first comment.', params: idParam, body: threadInput, status: 201, answer: z.object({ threadId: uuid }) });
export const reply = operation({ door: 'POST /api/v1/threads/{id}/comments', summary: 'A further comment; from the authors it answers, from the other side it asks again.', params: idParam, body: replyInput, status: 201, answer: z.object({ commentId: uuid }) });
export const closeThread = operation({ door: 'POST /api/v1/threads/{id}/close', summary: 'Closes a thread as resolved, overruled or moot.', params: idParam, body: closingInput, answer: nothing });
export const handInReport = operation({ door: 'POST /api/v1/submissions/{id}/reports', summary: 'Hands in the report of this round; a report is never changed.', params: idParam, body: reportInput, status: 201, answer: z.object({ reportId: uuid, allIn: z.boolean() }) });
export const noteToEditor = operation({ door: 'POST /api/v1/submissions/{id}/notes', summary: 'A referee’s line for the editor alone.', params: idParam, body: noteInput, status: 201, answer: z.object({ noteId: uuid }) });
export const answerInvitation = operation({ door: 'POST /api/v1/invitations/{id}/answer', summary: 'Accepts or declines an invitation to referee.', params: idParam, body: invitationAnswerInput, answer: z.object({ submissionId: uuid }) });
export const listCandidates = operation({ door: 'GET /api/v1/submissions/{id}/invitations', summary: 'Whom the editor might ask, with what speaks against it.', params: idParam, answer: refereeCandidatesSchema });
export const invite = operation({ door: 'POST /api/v1/submissions/{id}/invitations', summary: 'Asks one person to referee.', params: idParam, body: invitationInput, status: 201, answer: z.object({ invitationId: uuid, flags: z.array(conflictFlagSchema) }) });
export const remind = operation({ door: 'POST /api/v1/submissions/{id}/reminders', summary: 'A word to everybody who owes an answer or a report.', params: idParam, answer: z.object({ reminded: z.int() }) });
export const draftDecision = operation({ door: 'GET /api/v1/submissions/{id}/decisions', summary: 'What the editor’s decision starts from.', params: idParam, answer: decisionDraftSchema });
export const decide = operation({ door: 'POST /api/v1/submissions/{id}/decisions', summary: 'Sends back, sets aside or enters, with one letter.', params: idParam, body: decisionInput, status: 201, answer: z.object({ decisionId: uuid }) });
export const readQueue = operation({ door: 'GET /api/v1/queue', summary: 'The editor’s queue.', answer: queueSchema });

export const reviewOperations = [readDesk, listThreads, openThread, reply, closeThread, handInReport, noteToEditor, answerInvitation, listCandidates, invite, remind, draftDecision, decide, readQueue] as const;
