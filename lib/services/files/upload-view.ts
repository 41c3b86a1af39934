import { z } from 'zod';
import type { Reader } from '@/db/client';
import { listUploadParts, type UploadRow } from '@/db/reads/files/uploads';
import { MAX_FILE_BYTES } from './stage-file';

/** What a broken connection can cost. */
export const PART_BYTES = 8 * 1024 * 1024;

/** A long file on its way. */
export interface UploadView {
  readonly id: string;
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly partBytes: number;
  /** Of all parts from 0 on, those that have arrived. */
  readonly arrived: readonly number[];
}

/** A file as its sender announces it; what arrives is measured and hashed again. */
export const announcedFile = z.strictObject({
  name: z.string().min(1).max(300),
  bytes: z.int().min(1).max(MAX_FILE_BYTES, `at most ${MAX_FILE_BYTES} bytes`),
  sha256: z.string().regex(/^[0-9a-f]{64}$/, 'a SHA-256 in lower-case hexadecimal'),
});

export const partsOf = (bytes: number): number => Math.ceil(bytes / PART_BYTES);

/** All parts are of one size but the last. */
export const sizeOfPart = (bytes: number, number: number): number => Math.min(PART_BYTES, bytes - number * PART_BYTES);

export async function viewUpload(reader: Reader, { id, name, bytes, sha256 }: UploadRow): Promise<UploadView> {
  const parts = await listUploadParts(reader, id);
  return { id, name, bytes, sha256, partBytes: PART_BYTES, arrived: parts.map((part) => part.number) };
}
