import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { RecordDocument } from '@/lib/badges/record';
import type { Refusal } from '@/lib/badges/verify-record';
import { ok, type Result } from '@/lib/kernel/result';

export interface FileComparison {
  readonly name: string;
  readonly outcome: 'same' | 'changed' | 'missing';
  readonly sentence: string;
}

/** Hashes again every file of the record that lies in the folder, under the name the record gives it. */
export async function compareFiles(files: RecordDocument['files'], folder: string): Promise<Result<FileComparison[], Refusal>> {
  const isFolder = await stat(folder).then((s) => s.isDirectory(), () => false);
  if (!isFolder) return { ok: false, error: { kind: 'unreadable', code: 'verify/no-folder', sentence: `${folder} is no folder.` } };
  const compared: FileComparison[] = [];
  for (const file of files) compared.push(await compareFile(file, folder));
  return ok(compared);
}

async function compareFile(file: RecordDocument['files'][number], folder: string): Promise<FileComparison> {
  const { name } = file;
  const missing = (why: string): FileComparison => ({ name, outcome: 'missing', sentence: `the file ${name}: ${why}` });
  const place = path.resolve(folder, name);
  // A record decides which file it means, not which part of the reader's disk is read.
  if (!place.startsWith(path.resolve(folder) + path.sep)) return missing('its name points outside the folder');
  const found = await stat(place).catch(() => undefined);
  if (!found?.isFile()) return missing(`not found in ${folder}`);
  const hash = createHash('sha256');
  await pipeline(createReadStream(place), hash);
  const sha256 = hash.digest('hex');
  if (found.size === file.bytes && sha256 === file.sha256) return { name, outcome: 'same', sentence: `${name}: the same ${file.bytes} bytes, SHA-256 ${sha256}.` };
  return { name, outcome: 'changed', sentence: `${name} is not the file of the record: ${found.size} bytes with SHA-256 ${sha256}; expected ${file.bytes} bytes with ${file.sha256}.` };
}
