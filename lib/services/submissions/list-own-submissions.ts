import { database } from '@/db/client';
import { listOwnSubmissionIds, listOwnSubmissions as readOwn } from '@/db/reads/submissions/own-submissions';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { isEditableState } from '@/lib/policy/submission-state';
import { formatState } from '@/lib/reviews/states';
import type { Outcome } from '@/lib/services/app-error';
import { pageOf, type Page, type PageAsk } from '@/lib/services/paging';
import type { SubmissionLine } from './submission-view';
import { dayOnly } from './view-parts';

/** What the one who asks wrote or wrote with others, the latest change first. */
export async function listOwnSubmissions(actor: Actor): Promise<Outcome<readonly SubmissionLine[]>> {
  const grant = mayGenerally('submission.list-own', actor);
  if (!grant.ok) return grant;
  return ok((await readOwn(database(), userIdOf(grant.value.actor) ?? '')).map(viewLine));
}

/** The same in pages, the newest submission first: a place in this order holds while states change. */
export async function pageOwnSubmissions(actor: Actor, ask: PageAsk): Promise<Outcome<Page<SubmissionLine>>> {
  const grant = mayGenerally('submission.list-own', actor);
  if (!grant.ok) return grant;
  const userId = userIdOf(grant.value.actor) ?? '';
  const page = pageOf(await listOwnSubmissionIds(database(), userId), ask, ({ id }) => id);
  if (!page.ok) return page;
  const rows = page.value.items.length === 0 ? [] : await readOwn(database(), userId, page.value.items.map(({ id }) => id));
  return ok({ items: page.value.items.flatMap(({ id }) => rows.filter((row) => row.id === id).map(viewLine)), next: page.value.next });
}

function viewLine(row: Awaited<ReturnType<typeof readOwn>>[number]): SubmissionLine {
  return {
    ...row,
    stateWords: formatState(row.state, row.round),
    verdicts: (row.verdicts ?? []) as SubmissionLine['verdicts'],
    // Referees move a submission too: the hour would tell who was quick.
    updatedAt: isEditableState(row.state) ? row.updatedAt.toISOString() : dayOnly(row.updatedAt),
  };
}
