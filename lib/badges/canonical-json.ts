import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

/** RFC 8785: one value, one text. Throws on what JSON cannot say (NaN, infinities, lone surrogates). */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new Error('only a JSON value has a canonical form');
  return text;
}

export const sha256Hex = (bytes: Uint8Array | string): string => createHash('sha256').update(bytes).digest('hex');

/** SHA-256 of the canonical form, so that a document keeps its digest however a database or a tool spaces it. */
export const digestOf = (value: unknown): string => sha256Hex(canonicalJson(value));
