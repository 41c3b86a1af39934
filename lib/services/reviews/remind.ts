import { listInvitations } from '@/db/reads/reviews/invitations';
import { listReports } from '@/db/reads/reviews/reports';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { utcDay } from '@/lib/reviews/anonymity';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { appOrigin } from '@/lib/services/mail-outbox/app-origin';
import { reminderLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';
import { findOfficialResult } from './official-result';

/** A word to everybody who owes an answer or a report and wants reminders; each gets at most one a day, however often it is asked for. */
export function remind(actor: Actor, submissionId: string): Promise<Outcome<{ readonly reminded: number }>> {
  return actOnSubmission({ actor, action: 'review.invite', submissionId }, async ({ tx, facts, note }) => {
    const reported = new Set((await listReports(tx, submissionId)).filter((r) => r.round === facts.round).map((r) => r.refereeId));
    const owing = (await listInvitations(tx, submissionId)).filter((i) => i.state === 'asked' || (facts.state === 'in-review' && i.state === 'accepted' && !reported.has(i.refereeId)));
    if (owing.length === 0) return fail('precondition', 'Nobody owes an answer or a report here.');
    const title = (await findOfficialResult(tx, submissionId))?.title ?? '';
    const today = utcDay(new Date().toISOString());
    let reminded = 0;
    for (const { id, name, email, state } of owing) {
      const url = state === 'asked' ? `${appOrigin()}/desk/invitations/${id}` : `${appOrigin()}/review/${submissionId}`;
      const sent = await queueMail(tx, email, `reminder:${id}:${today}`, reminderLetter({ name, title, owes: state === 'asked' ? 'answer' : 'report', url }));
      if (sent) reminded++;
    }
    if (reminded === 0) return fail('precondition', 'Nobody was reminded: those who owe something here want no reminders. Ask somebody else, or wait for the date.');
    note({ reminded });
    return ok({ reminded });
  });
}
