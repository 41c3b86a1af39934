import type { RecordDocument } from '@/lib/badges/record';
import type { SignatureDocument } from '@/lib/badges/signature';
import type { RecordRow } from '@/db/reads/records/record';

/** The stored bytes as documents. They were checked by the signer before they were stored and cannot change since. */
export const documentOf = (row: Pick<RecordRow, 'document'>): RecordDocument => JSON.parse(row.document.toString('utf8')) as RecordDocument;
export const signatureOf = (row: Pick<RecordRow, 'signature'>): SignatureDocument => JSON.parse(row.signature.toString('utf8')) as SignatureDocument;
