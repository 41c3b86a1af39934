import { createHash } from 'node:crypto';
import { database } from '@/db/client';
import { listRegister, listRegisterChoices, type RegisterEntryRow } from '@/db/reads/records/register';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { webEnv } from '@/lib/env';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { fail, type Outcome } from '@/lib/services/app-error';
import { parseRegisterQuery, type AddressParams, type RegisterAsk, type RegisterOrder } from './register-query';

/** A search as a file: which records, in which order, and the state by which a copy is still good. */
export interface RegisterExport {
  readonly ask: RegisterAsk;
  readonly entries: readonly RegisterEntryRow[];
  /** Origin of every address in the file. */
  readonly origin: string;
  /** The file is a function of these alone, so their digest is a strong entity tag before a byte is written. */
  readonly digest: string;
  /** Last entry or change of standing anywhere in the register: a record that leaves a search changes the file too. */
  readonly changedAt: Date;
}

interface ExportShape {
  readonly name: string;
  /** Raised when the same records make other bytes. */
  readonly edition: number;
  readonly order: RegisterOrder;
  readonly limit: number;
}

/** Here nothing is left off: who fetches a file by a program does not read a notice beside it. */
export async function exportRegister(actor: Actor, params: AddressParams, shape: ExportShape): Promise<Outcome<RegisterExport>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  const reader = database();
  const { query, problems } = parseRegisterQuery(params, await listRegisterChoices(reader));
  if (problems.length > 0) return fail('invalid', problems.length === 1 ? 'One part of this address is not understood.' : `${problems.length} parts of this address are not understood.`, problems);
  const entries = await listRegister(reader, query.ask, shape.order, { limit: shape.limit });
  const [newest] = await listRegister(reader, {}, 'changed', { limit: 1 });
  const origin = webEnv().APP_URL;
  return ok({ ask: query.ask, entries, origin, digest: digestOf(shape, origin, query.ask, entries), changedAt: newest ? changeOf(newest) : new Date(0) });
}

export const changeOf = (entry: Pick<RegisterEntryRow, 'enteredAt' | 'since'>): Date => (entry.since > entry.enteredAt ? entry.since : entry.enteredAt);

function digestOf({ name, edition }: ExportShape, origin: string, ask: RegisterAsk, entries: readonly RegisterEntryRow[]): string {
  const state = entries.map(({ id, digest, standing, since, reason }) => [id, digest, standing, since.toISOString(), reason]);
  return createHash('sha256').update(JSON.stringify([name, edition, ENGINE_VERSION, origin, ask, state])).digest('hex');
}
