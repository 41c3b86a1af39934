import { generateKeyPairSync, sign } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '@/lib/badges/canonical-json';
import { keyIdOf, signatureBytes, signedBytes, signRecord } from '@/lib/badges/signature';
import { decodeText, splitBundle, verifyRecord, type SignedText } from '@/lib/badges/verify-record';
import { newKeys, signedWith } from './signed-record';

const { publicKey, privateKey } = newKeys();
const signed = signedWith(privateKey);
const bundle = canonicalJson({ format: 'counterfoil-signed-record/1', record: JSON.parse(signed.record) as unknown, signature: JSON.parse(signed.signature) as unknown });

const accepts = (text: SignedText): boolean => verifyRecord(text, publicKey).ok;
const codeOf = (text: SignedText): string => {
  const checked = verifyRecord(text, publicKey);
  return checked.ok ? 'accepted' : checked.error.code;
};
/** As the command does: bytes to text, one file or two. */
function acceptsBytes(record: Uint8Array, signature?: Uint8Array): boolean {
  const text = decodeText(record, 'the record');
  if (!text.ok) return false;
  if (signature) {
    const other = decodeText(signature, 'the signature');
    return other.ok && accepts({ record: text.value, signature: other.value });
  }
  const both = splitBundle(text.value);
  return both?.ok === true && accepts(both.value);
}
const changedAt = (bytes: Buffer, i: number, to: number): Buffer => {
  const copy = Buffer.from(bytes);
  copy[i] = to;
  return copy;
};

describe('a record is accepted as it was signed and in no other form', () => {
  it('the record as published', () => {
    expect(accepts(signed)).toBe(true);
    expect(acceptsBytes(Buffer.from(bundle))).toBe(true);
  });

  it('one changed byte anywhere in the record is refused', () => {
    const bytes = Buffer.from(signed.record);
    const signature = Buffer.from(signed.signature);
    const survivors = [...bytes.keys()].filter((i) => acceptsBytes(changedAt(bytes, i, bytes.readUInt8(i) ^ (i % 3 === 0 ? 0x80 : 1)), signature));
    expect(bytes.length).toBeGreaterThan(2000);
    expect(survivors).toEqual([]);
  });

  it('one changed bit anywhere in the signature is refused', () => {
    const record = Buffer.from(signed.record);
    const bytes = Buffer.from(signed.signature);
    const bits = [1, 2, 4, 8, 16, 32, 64, 128];
    const survivors = [...bytes.keys()].flatMap((i) => bits.filter((bit) => acceptsBytes(record, changedAt(bytes, i, bytes.readUInt8(i) ^ bit))).map((bit) => `${i}^${bit}`));
    expect(survivors).toEqual([]);
  });

  it('one changed byte anywhere in the one-file form is refused', () => {
    const bytes = Buffer.from(bundle);
    expect([...bytes.keys()].filter((i) => acceptsBytes(changedAt(bytes, i, bytes.readUInt8(i) ^ 1)))).toEqual([]);
  });

  it('a byte taken out or put in is refused', () => {
    const bytes = Buffer.from(signed.record);
    const signature = Buffer.from(signed.signature);
    const without = (i: number): Buffer => Buffer.concat([bytes.subarray(0, i), bytes.subarray(i + 1)]);
    const withSpace = (i: number): Buffer => Buffer.concat([bytes.subarray(0, i), Buffer.from(' '), bytes.subarray(i)]);
    expect([...bytes.keys()].filter((i) => i % 5 === 0 && (acceptsBytes(without(i), signature) || acceptsBytes(withSpace(i), signature)))).toEqual([]);
  });
});

describe('what else a forger might try', () => {
  it('the signature of another record under the same key', () => {
    const other = signedWith(privateKey, { revision: 3 });
    expect(codeOf({ record: signed.record, signature: other.signature })).toBe('badges/signature-differs');
  });

  it('a whole record signed with another key', () => {
    expect(codeOf(signedWith(newKeys().privateKey))).toBe('badges/other-key');
  });

  it('another key that claims to be ours', () => {
    const forger = newKeys().privateKey;
    const forged = signedWith(forger, { keyId: keyIdOf(publicKey) });
    const signature = canonicalJson({ ...(JSON.parse(forged.signature) as object), keyId: keyIdOf(publicKey) });
    expect(codeOf({ record: forged.record, signature })).toBe('badges/signature-differs');
  });

  it('a record of ours that names another key inside', () => {
    expect(codeOf(signedWith(privateKey, { keyId: '1'.repeat(16) }))).toBe('badges/key-named-inside');
  });

  it.each([
    ['spaces', (text: string) => JSON.stringify(JSON.parse(text), null, 1)],
    ['another order of fields', (text: string) => JSON.stringify(Object.fromEntries(Object.entries(JSON.parse(text) as object).reverse()))],
    ['a number spelt otherwise', (text: string) => text.replace('"revision":2', '"revision":2.0')],
    ['a field said twice', (text: string) => text.replace('"revision":2', '"revision":1,"revision":2')],
    ['a line break at the end', (text: string) => `${text}\n`],
    ['an escape that is not needed', (text: string) => text.replace('K. Dovrel', '\\u004b. Dovrel')],
  ])('a validly signed text that is not canonical: %s', (_what, respell) => {
    const record = respell(signed.record);
    expect(record).not.toBe(signed.record);
    expect(codeOf({ record, signature: canonicalJson(signRecord(record, privateKey)) })).toBe('badges/not-canonical');
  });

  it('a signature over the bare record, without our domain string', () => {
    const bare = sign(null, Buffer.from(signed.record), privateKey).toString('base64url');
    expect(codeOf({ record: signed.record, signature: canonicalJson({ format: 'counterfoil-signature/1', keyId: keyIdOf(publicKey), signature: bare }) })).toBe('badges/signature-differs');
    expect(signedBytes('{}').toString()).toBe('counterfoil-record/1\n{}');
  });

  it('the same 64 bytes spelt with other unused bits', () => {
    const text = (JSON.parse(signed.signature) as { signature: string }).signature;
    const alphabet = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789-_';
    const twins = [...alphabet].map((letter) => text.slice(0, -1) + letter).filter((twin) => Buffer.from(twin, 'base64url').equals(Buffer.from(text, 'base64url')));
    expect(twins).toHaveLength(16);
    expect(twins.filter((twin) => signatureBytes(twin) !== null)).toEqual([text]);
    expect(signatureBytes(`${text}=`)).toBeNull();
  });

  it.each(['claims', 'decision', 'files', 'resultDigest', 'cautions', 'keyId'])('a signed document without %s', (field) => {
    const { [field]: _, ...rest } = JSON.parse(signed.record) as Record<string, unknown>;
    const record = canonicalJson(rest);
    expect(codeOf({ record, signature: canonicalJson(signRecord(record, privateKey)) })).toMatch(/record-shape|key-named-inside/);
  });

  it('a key of another kind is no key for records', () => {
    const rsa = generateKeyPairSync('rsa', { modulusLength: 2048 }).publicKey;
    expect(verifyRecord(signed, rsa)).toMatchObject({ ok: false, error: { kind: 'unreadable', code: 'badges/key-kind' } });
  });
});
