/** `counterfoil-signature/1`: detached, beside the record it signs. */
export interface SignatureDocument {
  readonly format: 'counterfoil-signature/1';
  /** First 16 hexadecimal digits of the SHA-256 of the public key (SubjectPublicKeyInfo, DER). */
  readonly keyId: string;
  /** base64url without padding, 64 bytes. */
  readonly signature: string;
}
