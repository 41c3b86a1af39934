import { database } from '@/db/client';
import { recordAudit } from '@/db/writes/audit/record-audit';
import { auth } from '@/lib/auth/auth';
import { isUuid } from '@/lib/kernel/uuid';
import { userIdOf, type Actor } from '@/lib/policy/actor';

/** The library has its own transactions, so this entry follows the act instead of sharing one with it. */
export async function noteAccountAct(actor: Actor, path: string, answer: Response): Promise<void> {
  const said = (await answer.clone().json().catch(() => null)) as { user?: { id?: unknown } } | null;
  const userId = isUuid(said?.user?.id) ? said.user.id : userIdOf(actor);
  await note(actor, `account${path.replaceAll('/', '.')}`, userId);
}

/** Somebody came back from ORCID; without a session in the answer nothing has happened yet. */
export async function noteReturn(actor: Actor, answer: Response): Promise<void> {
  const cookie = answer.headers.getSetCookie().map((line) => line.split(';')[0]).join('; ');
  const opened = cookie.includes('counterfoil.session=') ? await auth().api.getSession({ headers: new Headers({ cookie }) }) : null;
  if (opened) await note(actor, 'account.sign-in.orcid', opened.user.id);
}

const note = (actor: Actor, action: string, subjectId: string | null): Promise<void> =>
  database().transaction((tx) => recordAudit(tx, { actor, action, subjectKind: 'account', subjectId }));
