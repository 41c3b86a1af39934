import { database } from '@/db/client';
import { listLiveSessions } from '@/db/reads/accounts/ways-in';
import { endOtherSessions as endOthers, endOwnSession } from '@/db/writes/accounts/end-sessions';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { actGenerally } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { deviceWords } from './device-words';

export interface SessionView {
  readonly id: string;
  /** Browser and system as the browser calls itself. */
  readonly device: string;
  readonly startedAt: string;
  /** Noted at most every five minutes. */
  readonly lastSeenAt: string;
  readonly current: boolean;
}

export async function listOwnSessions(actor: Actor, currentId: string | null): Promise<Outcome<readonly SessionView[]>> {
  const grant = mayGenerally('account.read-own', actor);
  if (!grant.ok) return grant;
  const rows = await listLiveSessions(database(), userIdOf(actor) ?? '');
  const views = rows.map((row) => ({ id: row.id, device: deviceWords(row.userAgent), startedAt: row.startedAt.toISOString(), lastSeenAt: row.lastSeenAt.toISOString(), current: row.id === currentId }));
  return ok(views.sort((a, b) => Number(b.current) - Number(a.current)));
}

export function endSession(actor: Actor, { id }: { readonly id: string }): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    if (!(await endOwnSession(tx, grant, id))) return fail('not-found', 'This session has ended already. Reload the page.');
    note('account', userIdOf(actor));
    return ok(null);
  });
}

export function endOtherSessions(actor: Actor, currentId: string | null): Promise<Outcome<{ readonly ended: number }>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    if (currentId === null) return fail('signed-out', 'Nobody is signed in here. Sign in and try again.');
    const ended = await endOthers(tx, grant, currentId);
    note('account', userIdOf(actor), { ended });
    return ok({ ended });
  });
}
