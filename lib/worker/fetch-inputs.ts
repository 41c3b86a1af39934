import { createWriteStream } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { RunInput } from '@/db/schema/runs';
import { pathFault } from '@/lib/kernel/relative-path';
import { hashingStream } from '@/lib/storage/hashing-stream';
import type { ObjectStore } from '@/lib/storage/object-store';

/** The store gave other bytes than were uploaded. No number may come of them. */
export class BytesDiffer extends Error {
  constructor(name: string, saw: string, expected: string) {
    super(`${name}: the store gave bytes with SHA-256 ${saw}; ${expected} were uploaded`);
  }
}

/** Copies a run's inputs into a folder of its own, hashing each on the way. */
export async function fetchInputs(store: ObjectStore, inputs: readonly RunInput[], folder: string): Promise<readonly { readonly name: string; readonly path: string }[]> {
  const files: { name: string; path: string }[] = [];
  for (const [i, input] of inputs.entries()) files.push({ name: input.name, path: await fetchOne(store, input, path.join(folder, String(i))) });
  return files;
}

async function fetchOne(store: ObjectStore, input: RunInput, folder: string): Promise<string> {
  const fault = pathFault(input.name);
  if (fault !== null) throw new Error(`an input has ${fault} for a name`);
  // The ending is kept, since it says the format; the rest of the name is not trusted with the disk.
  const target = path.join(folder, `input${path.extname(input.name)}`);
  await mkdir(folder, { recursive: true });
  const hashed = hashingStream();
  await pipeline(await store.get(input.storageKey), hashed, createWriteStream(target, { flags: 'wx', mode: 0o600 }));
  const { sha256, bytes } = hashed.digest();
  if (sha256 !== input.sha256 || bytes !== input.bytes) throw new BytesDiffer(input.name, sha256, input.sha256);
  return target;
}
