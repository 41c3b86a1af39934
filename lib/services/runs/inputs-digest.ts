import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

export const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');

/** SHA-256 of the canonical form (RFC 8785). */
export function digestOf(value: unknown): string {
  const canonical = canonicalize(value);
  if (canonical === undefined) throw new Error('only JSON values have a canonical form');
  return sha256(canonical);
}

/**
 * Names what a run computes from: the sheet without its prose, and each file by its hash. A change of
 * title or statement does not make a check stale; a change of anything that a number rests on does.
 */
export function inputsDigest(sheet: Readonly<Record<string, unknown>>, files: readonly { readonly name: string; readonly sha256: string }[]): string {
  const { title: _title, statement: _statement, ...computed } = sheet;
  return digestOf({ sheet: computed, files: Object.fromEntries(files.map((f) => [f.name, f.sha256])) });
}
