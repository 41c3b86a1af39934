import { database } from '@/db/client';
import { countRegister, holdsWords, listRegister, listRegisterChoices } from '@/db/reads/records/register';
import type { Problem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Outcome } from '@/lib/services/app-error';
import type { RegisterRow } from './record-view';
import { isAsking, parseRegisterQuery, type AddressParams, type RegisterChoices, type RegisterQuery } from './register-query';
import { viewRows } from './register-rows';

export const PAGE_SIZE = 20;

/** One page of the register as its address asks for it, with what of the address was not understood. */
export interface RegisterView {
  readonly query: RegisterQuery;
  readonly problems: readonly Problem[];
  readonly rows: readonly RegisterRow[];
  /** Records that fit, and records in all. */
  readonly total: number;
  readonly everything: number;
  readonly pages: number;
  readonly choices: RegisterChoices;
}

export async function readRegister(actor: Actor, params: AddressParams, pageSize = PAGE_SIZE): Promise<Outcome<RegisterView>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  const reader = database();
  const choices = await listRegisterChoices(reader);
  const { query, problems } = parseRegisterQuery(params, choices);
  const everything = await countRegister(reader, {});
  const total = isAsking(query.ask) ? await countRegister(reader, query.ask) : everything;
  const pages = Math.max(1, Math.ceil(total / pageSize));
  const entries = query.page > pages ? [] : await listRegister(reader, query.ask, query.order, { limit: pageSize, offset: (query.page - 1) * pageSize });
  const told = [...problems, ...(total === 0 ? await unsearchable(query.ask.text) : []), ...(query.page > pages ? [beyondLast(query.page, pages)] : [])];
  return ok({ query, problems: told, rows: await viewRows(reader, entries), total, everything, pages, choices });
}

async function unsearchable(text: string | undefined): Promise<Problem[]> {
  if (text === undefined || (await holdsWords(database(), text))) return [];
  return [{ code: 'register/no-words', where: '/text', saw: 'only signs or words that are in every text', expected: 'a word of a title, name, quantity or statement' }];
}

const beyondLast = (page: number, pages: number): Problem => ({ code: 'register/no-such-page', where: '/page', saw: `page ${page}`, expected: pages === 1 ? 'page 1, the only one' : `a page from 1 to ${pages}` });
