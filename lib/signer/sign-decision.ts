import { randomInt } from 'node:crypto';
import type { Database } from '@/db/client';
import { findSigningFacts, listUnsigned, type SigningFacts } from '@/db/reads/records/signing-facts';
import { enterRecord, refuseToSign } from '@/db/writes/records/enter-record';
import { buildRecord } from '@/lib/badges/build-record';
import { canonicalJson, sha256Hex } from '@/lib/badges/canonical-json';
import { drawRecordId } from '@/lib/badges/record-id';
import { signRecord } from '@/lib/badges/signature';
import { verifyRecord } from '@/lib/badges/verify-record';
import { createPublicKey } from 'node:crypto';
import type { ObjectStore } from '@/lib/storage/object-store';
import { rehash, type Rehashed } from './rehash';
import { findRefusal, type SigningRefusal } from './requirements';
import type { SigningKey } from './signing-key';

export interface SignerRoom {
  readonly database: Database;
  readonly store: ObjectStore;
  readonly key: SigningKey;
  /** Origin at which records are published. */
  readonly domain: string;
  readonly now: () => Date;
}

export type Signing = { readonly outcome: 'signed'; readonly recordId: string } | { readonly outcome: 'refused'; readonly refusal: SigningRefusal } | { readonly outcome: 'passed-over' };

/** A decision at which something broke; it waits for the next round, and holds up no other. */
export interface SigningFault {
  readonly outcome: 'broken';
  readonly decisionId: string;
  readonly because: string;
}

/** Every decision that waits, the oldest first. */
export async function signWaiting(room: SignerRoom): Promise<readonly (Signing | SigningFault)[]> {
  const done: (Signing | SigningFault)[] = [];
  for (const { id } of await listUnsigned(room.database)) done.push(await signDecision(room, id).catch((cause: unknown) => broken(id, cause)));
  return done;
}

const broken = (decisionId: string, cause: unknown): SigningFault => ({ outcome: 'broken', decisionId, because: cause instanceof Error ? cause.message : String(cause) });

export async function signDecision(room: SignerRoom, decisionId: string): Promise<Signing> {
  const facts = await findSigningFacts(room.database, decisionId);
  if (!facts) return { outcome: 'passed-over' };
  const refusal = findRefusal(facts);
  if (refusal) return putDown(room, facts, refusal);
  const hashed = await rehash(room.store, facts.files);
  if (!hashed.ok) return putDown(room, facts, hashed.error);
  return sign(room, facts, hashed.value);
}

async function putDown(room: SignerRoom, { decision }: SigningFacts, refusal: SigningRefusal): Promise<Signing> {
  await refuseToSign(room.database, { decisionId: decision.id, submissionId: decision.submissionId, ...refusal });
  return { outcome: 'refused', refusal };
}

async function sign(room: SignerRoom, facts: SigningFacts, hashed: Rehashed): Promise<Signing> {
  const { decision } = facts;
  const id = drawRecordId((n) => randomInt(n));
  const document = canonicalJson(assemble(room, facts, hashed, id));
  const signature = canonicalJson(signRecord(document, room.key.privateKey));
  // Read back as a stranger would: a record that our own verifier refuses must never be published.
  const checked = verifyRecord({ record: document, signature }, createPublicKey(room.key.privateKey));
  if (!checked.ok) throw new Error(`the signer made a record that does not verify: ${checked.error.sentence}`);
  const entered = await enterRecord(room.database, {
    id,
    submissionId: decision.submissionId,
    decisionId: decision.id,
    revision: decision.revision,
    level: checked.value.decision.level,
    document: Buffer.from(document, 'utf8'),
    signature: Buffer.from(signature, 'utf8'),
    documentDigest: sha256Hex(document),
    keyId: room.key.id,
    supersedes: facts.supersedes,
  });
  return entered ? { outcome: 'signed', recordId: id } : { outcome: 'passed-over' };
}

function assemble(room: SignerRoom, facts: SigningFacts, hashed: Rehashed, id: string) {
  const { decision, result } = facts;
  if (result === null || decision.level === null) throw new Error('a decision without result or level came past the requirements');
  return buildRecord({
    domain: room.domain,
    id,
    title: facts.revision.title,
    authors: facts.authors.map(({ name }) => name),
    orcids: facts.authors.flatMap(({ orcid }, i) => (orcid ? [{ position: i + 1, orcid }] : [])),
    revision: decision.revision,
    enteredAt: room.now(),
    decision: { by: facts.by, role: 'editor', on: decision.decidedAt.toISOString().slice(0, 10), level: decision.level, remarks: decision.remarks, reports: facts.reports },
    covers: decision.covers,
    result,
    sheet: facts.run.sheet,
    files: hashed.files,
    isDemonstration: hashed.isDemonstration,
    supersedes: facts.supersedes,
    keyId: room.key.id,
  });
}
