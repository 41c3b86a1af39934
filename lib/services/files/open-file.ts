import type { Readable } from 'node:stream';
import { database } from '@/db/client';
import { listFileUses } from '@/db/reads/files/stored-file';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { fittingView } from '@/lib/services/submissions/get-submission';
import { fileStore } from './file-store';
import { readsCopy, refereeCopy } from './referee-copy';

export interface OpenFile {
  readonly name: string;
  readonly bytes: number;
  /** Of what was attached, also where a copy is given. */
  readonly sha256: string;
  /** A referee reads text with what says whose it is blanked in its comments. */
  readonly isCopy: boolean;
  readonly open: () => Promise<Readable>;
}

/** A file for whoever may see the revision it belongs to; what only a draft uses is for its authors. */
export async function openFile(actor: Actor, submissionId: string, fileId: string): Promise<Outcome<OpenFile>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  const view = facts && fittingView(actor, facts);
  if (!view || !isUuid(fileId)) return { ok: false, error: NOT_FOUND };
  const uses = await listFileUses(database(), submissionId, fileId);
  const seen = uses.find((use) => use.lodged) ?? (facts.authorship ? uses[0] : undefined);
  if (!seen) return { ok: false, error: NOT_FOUND };
  const { name, bytes, sha256, storageKey } = seen;
  const original = (): Promise<Readable> => fileStore().get(storageKey);
  const isCopy = view === 'review' && readsCopy(facts);
  return ok({ name, bytes, sha256, isCopy, open: isCopy ? async () => refereeCopy(await original()) : original });
}
