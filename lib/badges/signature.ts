import { createHash, createPublicKey, sign, verify, type KeyObject } from 'node:crypto';

/** `counterfoil-signature/1`: detached, beside the record it signs. */
export interface SignatureDocument {
  readonly format: 'counterfoil-signature/1';
  /** First 16 hexadecimal digits of the SHA-256 of the public key (SubjectPublicKeyInfo, DER). */
  readonly keyId: string;
  /** base64url without padding, 64 bytes. */
  readonly signature: string;
}

/** Signed in front of every record, so that a signature made here means nothing under any other kind of document. */
const DOMAIN_STRING = 'counterfoil-record/1\n';

export const signedBytes = (canonicalRecord: string): Buffer => Buffer.from(DOMAIN_STRING + canonicalRecord, 'utf8');

const publicHalf = (key: KeyObject): KeyObject => (key.type === 'private' ? createPublicKey(key) : key);

export function keyIdOf(key: KeyObject): string {
  const der = publicHalf(key).export({ type: 'spki', format: 'der' });
  return createHash('sha256').update(der).digest('hex').slice(0, 16);
}

export function signRecord(canonicalRecord: string, privateKey: KeyObject): SignatureDocument {
  if (privateKey.asymmetricKeyType !== 'ed25519') throw new Error(`a record is signed with Ed25519, not ${privateKey.asymmetricKeyType}`);
  const signature = sign(null, signedBytes(canonicalRecord), privateKey);
  return { format: 'counterfoil-signature/1', keyId: keyIdOf(privateKey), signature: signature.toString('base64url') };
}

/**
 * The 64 bytes of a signature, or null. The last base64url character carries four unused bits, so the
 * text is compared with its own re-encoding: there is one spelling of a signature and no other.
 */
export function signatureBytes(text: string): Buffer | null {
  const bytes = Buffer.from(text, 'base64url');
  return bytes.length === 64 && bytes.toString('base64url') === text ? bytes : null;
}

export const holds = (canonicalRecord: string, signature: Buffer, publicKey: KeyObject): boolean =>
  verify(null, signedBytes(canonicalRecord), publicKey, signature);
