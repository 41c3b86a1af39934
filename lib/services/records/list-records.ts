import { database } from '@/db/client';
import { listRecords as readRecords } from '@/db/reads/records/record';
import { isVerdict } from './register-words';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Outcome } from '@/lib/services/app-error';
import { documentOf } from './record-document';
import type { RegisterRow } from './record-view';

export interface RegisterFilter {
  /** Words that title, an author or a claim's quantity must hold. */
  readonly text?: string | undefined;
  readonly quantity?: string | undefined;
  readonly verdict?: string | undefined;
}

/** The register, the newest entry first; struck records stay in it. */
export async function listRecords(actor: Actor, filter: RegisterFilter = {}): Promise<Outcome<readonly RegisterRow[]>> {
  const grant = mayGenerally('register.read', actor);
  if (!grant.ok) return grant;
  const rows = await readRecords(database());
  return ok(rows.map(viewRow).filter((row) => matches(row, filter)));
}

function viewRow(row: Awaited<ReturnType<typeof readRecords>>[number]): RegisterRow {
  const document = documentOf(row);
  return {
    id: row.id,
    title: document.title,
    authors: document.authors,
    enteredOn: document.enteredAt,
    revision: document.revision,
    level: document.decision.level,
    standing: row.standing,
    quantities: [...new Set(document.claims.map((c) => c.quantity))],
    verdicts: document.claims.map((c) => c.verdict),
  };
}

function matches(row: RegisterRow, { text, quantity, verdict }: RegisterFilter): boolean {
  const words = (text ?? '').toLocaleLowerCase('en-GB').split(/\s+/).filter((w) => w !== '');
  const hay = [row.title, ...row.authors, ...row.quantities].join(' ').toLocaleLowerCase('en-GB');
  if (!words.every((word) => hay.includes(word))) return false;
  if (quantity !== undefined && !row.quantities.includes(quantity)) return false;
  return verdict === undefined || (isVerdict(verdict) && row.verdicts.includes(verdict));
}
