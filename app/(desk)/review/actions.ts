'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { decide as decideIt } from '@/lib/services/decisions/decide';
import { answerInvitation as answer } from '@/lib/services/reviews/answer-invitation';
import { beginDeciding as begin } from '@/lib/services/reviews/begin-deciding';
import { closeThread as close } from '@/lib/services/reviews/close-thread';
import { handInReport as handIn } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee as invite } from '@/lib/services/reviews/invite-referee';
import { noteToEditor as note } from '@/lib/services/reviews/note-to-editor';
import { openThread as open } from '@/lib/services/reviews/open-thread';
import { remind as remindThem } from '@/lib/services/reviews/remind';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { closingInput, decisionInput, invitationAnswerInput, invitationInput, noteInput, replyInput, reportInput, threadInput } from '@/lib/services/reviews/review-inputs';
import { sendToReview as send } from '@/lib/services/reviews/send-to-review';
import { takeTriage as take } from '@/lib/services/reviews/take-triage';
import { withdrawInvitation as withdraw } from '@/lib/services/reviews/withdraw-invitation';

const id = z.uuid({ version: 'v4' });
const onlyId = z.strictObject({ id });

export const takeTriage = defineAction({ door: 'action review.takeTriage', input: onlyId, handle: ({ actor, input }) => take(actor, input.id) });

export const inviteReferee = defineAction({
  door: 'action review.inviteReferee',
  input: z.strictObject({ id, invitation: invitationInput }),
  handle: ({ actor, input }) => invite(actor, input.id, input.invitation),
});

export const withdrawInvitation = defineAction({ door: 'action review.withdrawInvitation', input: onlyId, handle: ({ actor, input }) => withdraw(actor, input.id) });

/** A door that sends letters stays narrow. */
export const remind = defineAction({
  door: 'action review.remind',
  input: onlyId,
  rate: { points: 60, perS: 3600 },
  handle: ({ actor, input }) => remindThem(actor, input.id),
});

export const answerInvitation = defineAction({
  door: 'action review.answerInvitation',
  input: z.strictObject({ id, answer: invitationAnswerInput }),
  handle: ({ actor, input }) => answer(actor, input.id, input.answer),
});

export const sendToReview = defineAction({ door: 'action review.sendToReview', input: onlyId, handle: ({ actor, input }) => send(actor, input.id) });

export const beginDeciding = defineAction({ door: 'action review.beginDeciding', input: onlyId, handle: ({ actor, input }) => begin(actor, input.id) });

export const openThread = defineAction({
  door: 'action review.openThread',
  input: z.strictObject({ id, thread: threadInput }),
  handle: ({ actor, input }) => open(actor, input.id, input.thread),
});

export const reply = defineAction({
  door: 'action review.reply',
  input: z.strictObject({ id, reply: replyInput }),
  handle: ({ actor, input }) => replyToThread(actor, input.id, input.reply),
});

export const closeThread = defineAction({
  door: 'action review.closeThread',
  input: z.strictObject({ id, closing: closingInput.shape.closing }),
  handle: ({ actor, input }) => close(actor, input.id, input.closing),
});

export const handInReport = defineAction({
  door: 'action review.handInReport',
  input: z.strictObject({ id, report: reportInput }),
  handle: ({ actor, input }) => handIn(actor, input.id, input.report),
});

export const noteToEditor = defineAction({
  door: 'action review.noteToEditor',
  input: z.strictObject({ id, note: noteInput }),
  handle: ({ actor, input }) => note(actor, input.id, input.note.body),
});

export const decide = defineAction({
  door: 'action review.decide',
  input: z.strictObject({ id, decision: decisionInput }),
  handle: ({ actor, input }) => decideIt(actor, input.id, input.decision),
});
