import { generateKeyPairSync, type KeyObject } from 'node:crypto';
import { buildRecord, type RecordInputs } from '@/lib/badges/build-record';
import { canonicalJson } from '@/lib/badges/canonical-json';
import { keyIdOf, signRecord } from '@/lib/badges/signature';
import type { SignedText } from '@/lib/badges/verify-record';
import { result } from '../../support/result-documents';

export const newKeys = (): { publicKey: KeyObject; privateKey: KeyObject } => generateKeyPairSync('ed25519');

export const recordInputs = (over: Partial<RecordInputs> = {}): RecordInputs => ({
  domain: 'https://counterfoil.example',
  id: '4q7m-2tnd',
  title: 'High-precision match of two models, “ε ≤ 10⁻⁶”',
  authors: ['K. Dovrel', 'E. Tansley-Mbeki'],
  revision: 2,
  enteredAt: new Date('2026-11-28T23:59:59Z'),
  decision: { by: 'J. Okonjo-Vale', role: 'editor', on: '2026-11-28', level: 1, remarks: ['digits reduced'], reports: 2 },
  covers: ['C1'],
  result: result(),
  sheet: { format: 'counterfoil-claim/1', claims: [{ id: 'C1' }] },
  files: [{ name: 'a.txt', bytes: 4, sha256: 'a'.repeat(64) }],
  isDemonstration: true,
  supersedes: null,
  keyId: '0'.repeat(16),
  ...over,
});

export function signedWith(privateKey: KeyObject, over: Partial<RecordInputs> = {}): SignedText {
  const record = canonicalJson(buildRecord(recordInputs({ keyId: keyIdOf(privateKey), ...over })));
  return { record, signature: canonicalJson(signRecord(record, privateKey)) };
}
