import { isRecordId } from '@/lib/badges/record-id';
import { database } from '@/db/client';
import { isInRegister, listRegister, listRegisterChoices, type RegisterAsk } from '@/db/reads/records/register';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { fail, type Outcome } from '@/lib/services/app-error';
import { cursorOf, idOfCursor, noSuchPlace, type Page, type PageAsk } from '@/lib/services/paging';
import type { RegisterRow } from './record-view';
import { parseRegisterQuery, type AddressParams } from './register-query';
import { viewRows } from './register-rows';

const most = 1000;

/** Records of the register, the newest entry first; struck records stay in it. */
export async function listRecords(actor: Actor, ask: RegisterAsk = {}): Promise<Outcome<readonly RegisterRow[]>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  return ok(await viewRows(database(), await listRegister(database(), ask, 'newest', { limit: most })));
}

/** The same in pages, for what an address asks; a word that is not understood is refused, not left off. */
export async function pageRecords(actor: Actor, { limit, cursor }: PageAsk, asked: AddressParams): Promise<Outcome<Page<RegisterRow>>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  const { query, problems } = parseRegisterQuery(asked, await listRegisterChoices(database()));
  if (problems.length > 0) return fail('invalid', 'A word of the search is not understood.', problems);
  const after = cursor === undefined ? undefined : idOfCursor(cursor);
  if (cursor !== undefined && !(isRecordId(after ?? '') && (await isInRegister(database(), after ?? '')))) return noSuchPlace(cursor);
  const rows = await listRegister(database(), query.ask, 'newest', { limit: limit + 1, after });
  const items = await viewRows(database(), rows.slice(0, limit));
  const last = items.at(-1);
  return ok({ items, next: rows.length > limit && last ? cursorOf(last.id) : null });
}
