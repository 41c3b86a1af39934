import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import type { Outcome } from '@/lib/services/app-error';
import { getSubmission } from './get-submission';

/** `claim.json` as it can be put beside the files and run on any machine. */
export async function exportSheet(actor: Actor, submissionId: string): Promise<Outcome<{ readonly text: string }>> {
  const seen = await getSubmission(actor, submissionId);
  if (!seen.ok) return seen;
  const { format, title, statement, ...rest } = seen.value.revision.sheet;
  return ok({ text: `${JSON.stringify({ format, title, statement, ...rest }, null, 2)}\n` });
}
