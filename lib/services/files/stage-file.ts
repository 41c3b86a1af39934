import { randomUUID } from 'node:crypto';
import { Transform, type Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { database } from '@/db/client';
import { findStorageKey, isStored } from '@/db/reads/files/stored-file';
import type { UploadedFile } from '@/db/writes/files/store-file';
import { pathFault } from '@/lib/claims/file-path';
import { ok } from '@/lib/kernel/result';
import { fail, type Outcome } from '@/lib/services/app-error';
import { fileStore } from './file-store';

export const MAX_FILE_BYTES = 512 * 1024 * 1024;
export const MAX_FILES = 64;

export interface Incoming {
  /** The path by which the sheet calls it. */
  readonly name: string;
  readonly stream: Readable;
}

class TooLarge extends Error {}

/** Counts while bytes pass and stops a stream that is too long, so that no declared size has to be believed. */
function capped(): Transform {
  let bytes = 0;
  return new Transform({
    transform(chunk: Buffer, _encoding, done) {
      bytes += chunk.length;
      if (bytes > MAX_FILE_BYTES) done(new TooLarge());
      else done(null, chunk);
    },
  });
}

/** Brings bytes into the store, hashing on the way; nothing points at them until a transaction does. */
export async function stageFile({ name, stream }: Incoming): Promise<Outcome<UploadedFile>> {
  const fault = pathFault(name);
  if (fault !== null) {
    stream.resume();
    return fail('invalid', `The file has ${fault} for a name; expected a relative path such as data/a.txt. Rename it.`);
  }
  const storageKey = `uploads/${randomUUID()}`;
  try {
    const cap = capped();
    // Not pipe(): a sender may be gone before we listen, and a stream that broke before says so only here.
    const passing = pipeline(stream, cap).catch((error: unknown) => void cap.destroy(error instanceof Error ? error : new Error(String(error))));
    const stored = await fileStore().put(storageKey, cap);
    await passing;
    return ok(await sharing({ name, storageKey, ...stored }));
  } catch (error) {
    stream.resume();
    if (error instanceof TooLarge) return fail('limit', `${name} is longer than ${MAX_FILE_BYTES} bytes. Thin it to at most two million samples a mode.`);
    throw error;
  }
}

/** The same bytes are kept once, whoever brought them first. */
async function sharing(file: UploadedFile): Promise<UploadedFile> {
  const there = await findStorageKey(database(), file.sha256);
  if (there === undefined) return file;
  await fileStore().remove(file.storageKey);
  return { ...file, storageKey: there };
}

/** Lets go of bytes that no row came to point at, because nothing was recorded or an equal file was there first. */
export async function discardStaged(files: readonly UploadedFile[]): Promise<void> {
  for (const file of files) if (!(await isStored(database(), file))) await fileStore().remove(file.storageKey);
}
