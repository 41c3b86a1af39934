import { database } from '@/db/client';
import { findRevision, listRevisionFiles } from '@/db/reads/submissions/revision';
import { listOwnSubmissions } from '@/db/reads/submissions/own-submissions';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Outcome } from '@/lib/services/app-error';
import { asDraftSheet } from './draft-sheet';
import type { FileView } from './submission-view';

type Json = Readonly<Record<string, unknown>>;

/** What one submission of one's own has that another may take over. */
export interface EarlierParts {
  readonly submissionId: string;
  readonly title: string;
  readonly revision: number;
  readonly noise: readonly { readonly name: string; readonly declaration: Json; /** Null for a built-in curve. */ readonly file: FileView | null }[];
  readonly claims: readonly { readonly id: string; readonly quantity: string; readonly settings: Json }[];
}

const MOST = 50;

/** Noise curves and claim settings of one's own submissions, the latest changed first. */
export async function listEarlierParts(actor: Actor): Promise<Outcome<readonly EarlierParts[]>> {
  const grant = mayGenerally('submission.list-own', actor);
  if (!grant.ok) return grant;
  const lines = (await listOwnSubmissions(database(), userIdOf(grant.value.actor) ?? '')).slice(0, MOST);
  const parts = await Promise.all(lines.map(({ id, title, revision }) => partsOf(id, title, revision)));
  return ok(parts.filter((one) => one !== null).filter((one) => one.noise.length > 0 || one.claims.length > 0));
}

async function partsOf(submissionId: string, title: string, revision: number): Promise<EarlierParts | null> {
  const row = await findRevision(database(), submissionId, revision);
  if (!row) return null;
  const sheet = asDraftSheet(row.sheet, row);
  const files = await listRevisionFiles(database(), row.id);
  const fileOf = ({ file }: Json): FileView | null => {
    const found = files.find(({ name }) => name === file);
    return found ? { id: found.id, name: found.name, bytes: found.bytes, sha256: found.sha256 } : null;
  };
  return {
    submissionId, title, revision,
    // A declaration whose file is not there is of no use to anybody else.
    noise: Object.entries(sheet.noise).map(([name, declaration]) => ({ name, declaration, file: fileOf(declaration) })).filter(({ declaration, file }) => declaration['file'] === undefined || file !== null),
    claims: sheet.claims.flatMap((claim) => (typeof claim['settings'] === 'object' && claim['settings'] !== null ? [{ id: String(claim['id'] ?? ''), quantity: String(claim['quantity'] ?? ''), settings: claim['settings'] as Json }] : [])),
  };
}
