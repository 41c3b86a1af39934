import { createHash } from 'node:crypto';
import { HEAD_BYTES, isWatermarked } from '@/lib/badges/demonstration';
import { ok, type Result } from '@/lib/kernel/result';
import { ObjectMissing, type ObjectStore } from '@/lib/storage/object-store';
import type { SigningRefusal } from './requirements';

export interface StoredInput {
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly storageKey: string;
}
export interface Rehashed {
  readonly files: readonly { readonly name: string; readonly bytes: number; readonly sha256: string }[];
  readonly isDemonstration: boolean;
}

/** Reads every stored byte again. A file that changed or is gone is a refusal; a store that is away is an error, and tried later. */
export async function rehash(store: ObjectStore, inputs: readonly StoredInput[]): Promise<Result<Rehashed, SigningRefusal>> {
  const files: Rehashed['files'][number][] = [];
  let isDemonstration = false;
  for (const input of inputs) {
    const seen = await hashOne(store, input.storageKey);
    if (!seen) return refused('file-missing', `${input.name} is not in the store any more.`);
    if (seen.sha256 !== input.sha256 || seen.bytes !== input.bytes)
      return refused('file-changed', `${input.name} in the store has ${seen.bytes} bytes and SHA-256 ${seen.sha256}; lodged were ${input.bytes} bytes and ${input.sha256}.`);
    files.push({ name: input.name, bytes: seen.bytes, sha256: seen.sha256 });
    isDemonstration ||= isWatermarked(seen.head);
  }
  return ok({ files, isDemonstration });
}

const refused = (code: string, reason: string): { ok: false; error: SigningRefusal } => ({ ok: false, error: { code: `signer/${code}`, reason } });

async function hashOne(store: ObjectStore, key: string): Promise<{ sha256: string; bytes: number; head: Buffer } | undefined> {
  try {
    const hash = createHash('sha256');
    let bytes = 0;
    let head: Buffer = Buffer.alloc(0);
    for await (const chunk of (await store.get(key)) as AsyncIterable<Buffer>) {
      hash.update(chunk);
      bytes += chunk.length;
      if (head.length < HEAD_BYTES) head = Buffer.concat([head, chunk.subarray(0, HEAD_BYTES - head.length)]);
    }
    return { sha256: hash.digest('hex'), bytes, head };
  } catch (error) {
    if (error instanceof ObjectMissing) return undefined;
    throw error;
  }
}
