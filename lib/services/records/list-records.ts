import { database } from '@/db/client';
import { listRegister, type RegisterAsk } from '@/db/reads/records/register';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Outcome } from '@/lib/services/app-error';
import type { RegisterRow } from './record-view';
import { viewRows } from './register-rows';

const most = 1000;

/** Records of the register, the newest entry first; struck records stay in it. */
export async function listRecords(actor: Actor, ask: RegisterAsk = {}): Promise<Outcome<readonly RegisterRow[]>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  return ok(await viewRows(database(), await listRegister(database(), ask, 'newest', { limit: most })));
}
