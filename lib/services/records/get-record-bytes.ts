import { database } from '@/db/client';
import { findPublicKey, findRecord, getStanding } from '@/db/reads/records/record';
import { drawBadge } from '@/lib/badges/badge-svg';
import { canonicalJson, sha256Hex } from '@/lib/badges/canonical-json';
import { isRecordId } from '@/lib/badges/record-id';
import { wordOf } from '@/lib/badges/sentences';
import { ok } from '@/lib/kernel/result';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { documentOf, signatureOf } from './record-document';

/** Bytes to serve as they are, with the digest that is their strong ETag. */
export interface PublishedBytes {
  readonly bytes: Buffer;
  readonly digest: string;
  readonly type: string;
  readonly fileName: string;
  /** Never changes under this address; the badge does, when the standing does. */
  readonly isForEver: boolean;
}

export type RecordPart = 'record' | 'signature' | 'signed-record' | 'badge';

const json = (bytes: Buffer, fileName: string): PublishedBytes => ({ bytes, digest: sha256Hex(bytes), type: 'application/json', fileName, isForEver: true });

/** Any part of a published record, for everybody. */
export async function getRecordBytes(id: string, part: RecordPart): Promise<Outcome<PublishedBytes>> {
  const row = isRecordId(id) ? await findRecord(database(), id) : undefined;
  if (!row) return { ok: false, error: NOT_FOUND };
  const name = `counterfoil-${row.id}`;
  switch (part) {
    case 'record': return ok(json(row.document, `${name}.json`));
    case 'signature': return ok(json(row.signature, `${name}.sig.json`));
    case 'signed-record': {
      const both = canonicalJson({ format: 'counterfoil-signed-record/1', record: documentOf(row), signature: signatureOf(row) });
      return ok(json(Buffer.from(both, 'utf8'), `${name}.signed.json`));
    }
    case 'badge': return ok(await badge(row, name));
  }
}

async function badge(row: NonNullable<Awaited<ReturnType<typeof findRecord>>>, name: string): Promise<PublishedBytes> {
  const document = documentOf(row);
  const { standing, since } = await getStanding(database(), row.id);
  const on = standing === 'entered' ? document.enteredAt : since.toISOString().slice(0, 10);
  const bytes = Buffer.from(drawBadge({ recordId: row.id, revision: row.revision, standing, word: wordOf(document), level: document.decision.level, on }), 'utf8');
  return { bytes, digest: sha256Hex(bytes), type: 'image/svg+xml', fileName: `${name}.svg`, isForEver: false };
}

/** A public key under its id. Keys that no longer sign stay published. */
export async function getPublicKey(keyId: string): Promise<Outcome<PublishedBytes>> {
  const pem = /^[0-9a-f]{16}$/.test(keyId) ? await findPublicKey(database(), keyId) : undefined;
  if (pem === undefined) return { ok: false, error: NOT_FOUND };
  const bytes = Buffer.from(pem, 'utf8');
  return ok({ bytes, digest: sha256Hex(bytes), type: 'application/x-pem-file', fileName: `counterfoil-${keyId}.pem`, isForEver: true });
}
