import type { KeyObject } from 'node:crypto';
import { ok, type Result } from '@/lib/kernel/result';
import { canonicalJson } from './canonical-json';
import type { RecordDocument } from './record';
import { bundleSchema, recordSchema, signatureSchema } from './record-schema';
import { holds, keyIdOf, signatureBytes } from './signature';

/** Why a record is not accepted. `unreadable`: no JSON of a kind we know; `refused`: readable, and not what was signed. */
export interface Refusal {
  readonly kind: 'unreadable' | 'refused';
  readonly code: string;
  readonly sentence: string;
}

export interface SignedText {
  /** The record exactly as published. */
  readonly record: string;
  readonly signature: string;
}

type Refused = { readonly ok: false; readonly error: Refusal };
const refuse = (kind: Refusal['kind'], code: string, sentence: string): Refused => ({ ok: false, error: { kind, code: `badges/${code}`, sentence } });
const unreadable = (code: string, sentence: string): Refused => refuse('unreadable', code, sentence);
const refused = (code: string, sentence: string): Refused => refuse('refused', code, sentence);

/** Several, so that no one changed byte makes a damaged record look like some other kind of file. */
const MARKS = ['counterfoil-', '"keyId"', '"signature"', '"resultDigest"'];
const isMeantAsRecord = (text: string): boolean => MARKS.some((mark) => text.includes(mark));

/** What cannot be parsed is refused when it was once ours, and unreadable when it never was. */
const spoilt = (text: string, code: string, sentence: string): Refused => refuse(isMeantAsRecord(text) ? 'refused' : 'unreadable', code, sentence);

/** Bytes that are not UTF-8 must not become a replacement character that happens to verify. */
export function decodeText(bytes: Uint8Array, name: string): Result<string, Refusal> {
  try {
    return ok(new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes));
  } catch {
    return spoilt(Buffer.from(bytes).toString('latin1'), 'not-text', `${name} is not UTF-8 text.`);
  }
}

function parseJson(text: string, name: string): Result<unknown, Refusal> {
  try {
    return ok(JSON.parse(text) as unknown);
  } catch (error) {
    return spoilt(text, 'not-json', `${name} is not JSON: ${(error as Error).message}.`);
  }
}

/** A text that is not the canonical form of what it says could say two things to two readers. */
function canonical(text: string, name: string): Result<unknown, Refusal> {
  const parsed = parseJson(text, name);
  if (!parsed.ok) return parsed;
  let again: string;
  try {
    again = canonicalJson(parsed.value);
  } catch (error) {
    return refused('no-canonical-form', `${name} has no canonical form: ${(error as Error).message}.`);
  }
  if (again === text) return ok(parsed.value);
  const where = text === `${again}\n` ? 'it ends with a line break' : `it parts from it at character ${firstDifference(again, text) + 1}`;
  return refused('not-canonical', `${name} is not in canonical form (RFC 8785): ${where}. Use the file as it was downloaded.`);
}

function firstDifference(a: string, b: string): number {
  let i = 0;
  while (i < a.length && a[i] === b[i]) i++;
  return i;
}

/** Takes a download with record and signature in one apart; undefined when the text is no such thing. */
export function splitBundle(text: string): Result<SignedText, Refusal> | undefined {
  const parsed = parseJson(text, 'the record');
  if (!parsed.ok || typeof parsed.value !== 'object' || parsed.value === null) return undefined;
  if ((parsed.value as { format?: unknown }).format !== 'counterfoil-signed-record/1') return undefined;
  const exact = canonical(text, 'the signed record');
  if (!exact.ok) return exact;
  const bundle = bundleSchema.safeParse(exact.value);
  if (!bundle.success) return refused('bundle-shape', `The signed record is not whole: ${bundle.error.issues[0]?.message ?? 'a part is missing'}.`);
  return ok({ record: canonicalJson(bundle.data.record), signature: canonicalJson(bundle.data.signature) });
}

/** Signature, canonical form and shape, against a key that the reader holds. Never a key from the record. */
export function verifyRecord(signed: SignedText, publicKey: KeyObject): Result<RecordDocument, Refusal> {
  if (publicKey.asymmetricKeyType !== 'ed25519') return unreadable('key-kind', `The key is of the kind ${publicKey.asymmetricKeyType}; expected ed25519.`);
  const signature = canonical(signed.signature, 'the signature');
  if (!signature.ok) return signature;
  const detached = signatureSchema.safeParse(signature.value);
  if (!detached.success) return refused('signature-shape', 'The signature is not a whole counterfoil-signature/1.');
  const bytes = signatureBytes(detached.data.signature);
  if (!bytes) return refused('signature-text', 'The signature is not 64 bytes in base64url without padding.');
  const held = keyIdOf(publicKey);
  if (detached.data.keyId !== held) return refused('other-key', `The signature names key ${detached.data.keyId}; the key you hold is ${held}.`);
  if (!holds(signed.record, bytes, publicKey)) return refused('signature-differs', `The signature does not hold for this text under key ${held}: record or signature was changed.`);
  return readRecord(signed.record, held);
}

function readRecord(text: string, heldKeyId: string): Result<RecordDocument, Refusal> {
  const record = canonical(text, 'the record');
  if (!record.ok) return record;
  const shape = recordSchema.safeParse(record.value);
  if (!shape.success) {
    const issue = shape.error.issues[0];
    return refused('record-shape', `The record is not a whole counterfoil-record/1: /${issue?.path.join('/') ?? ''} ${issue?.message ?? ''}.`);
  }
  if (shape.data.keyId !== heldKeyId) return refused('key-named-inside', `The record names key ${shape.data.keyId} inside; it was signed by ${heldKeyId}.`);
  return ok(record.value as RecordDocument);
}
