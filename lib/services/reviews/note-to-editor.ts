import { keepNote } from '@/db/writes/reviews/reports';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import { checkSpeech } from './check-speech';

/** A line that only the editor reads, and that is no part of the report. */
export function noteToEditor(actor: Actor, submissionId: string, body: string): Promise<Outcome<{ readonly noteId: string }>> {
  return actOnSubmission({ actor, action: 'review.note-to-editor', submissionId }, async ({ tx, grant }) => {
    const speech = await checkSpeech(tx, actor, submissionId, { body });
    return speech.ok ? ok({ noteId: await keepNote(tx, grant, speech.value.body) }) : speech;
  });
}
