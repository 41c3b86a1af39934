import { createWriteStream, openAsBlob } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { PassThrough, Transform, Writable, type Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { BlobReader, configure, ZipReader, type FileEntry } from '@zip.js/zip.js';
import { AppFailure } from '@/lib/services/app-error';
import { MAX_FILE_BYTES, MAX_FILES, type Incoming } from './stage-file';

configure({ useWebWorkers: false });

/** Folders among them: a directory of many lines costs memory, whatever its lines are. */
const MAX_ENTRIES = 1000;

export const isZip = (name: string): boolean => name.toLowerCase().endsWith('.zip');

const refuse = (sentence: string): never => {
  throw new AppFailure({ code: 'invalid', sentence });
};

/**
 * Hands over the files of an archive one after the other. The archive lies on disk meanwhile; what an
 * entry says of its own length is checked against what comes out, and so is the whole.
 */
export async function unpackZip(archive: Readable, take: (entry: Incoming) => Promise<void>): Promise<void> {
  const folder = await mkdtemp(path.join(tmpdir(), 'counterfoil-zip-'));
  const file = path.join(folder, 'archive.zip');
  try {
    await pipeline(archive, upTo(MAX_FILE_BYTES), createWriteStream(file, { mode: 0o600 }));
    const reader = new ZipReader(new BlobReader(await openAsBlob(file)));
    try {
      for (const entry of await entriesOf(reader)) await takeEntry(entry, take);
    } finally {
      await reader.close();
    }
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function entriesOf(reader: ZipReader<Blob>): Promise<readonly FileEntry[]> {
  const entries: FileEntry[] = [];
  let [seen, bytes] = [0, 0];
  try {
    for await (const entry of reader.getEntriesGenerator()) {
      if (++seen > MAX_ENTRIES) refuse(`The archive lists more than ${MAX_ENTRIES} files and folders. Pack the files alone.`);
      if (entry.directory) continue;
      if (entry.encrypted) refuse(`${entry.filename} in the archive is encrypted. Pack it without a password.`);
      bytes += entry.uncompressedSize;
      if (entries.push(entry as FileEntry) > MAX_FILES + 1 || bytes > 2 * MAX_FILE_BYTES) refuse(`The archive holds more than ${MAX_FILES + 1} files or ${2 * MAX_FILE_BYTES} bytes.`);
    }
  } catch (cause) {
    if (cause instanceof AppFailure) throw cause;
    refuse('The archive is not a readable .zip file.');
  }
  return withoutCommonFolder(entries);
}

/** An archive of a folder carries its name before every file; the sheet does not. */
function withoutCommonFolder(entries: readonly FileEntry[]): readonly FileEntry[] {
  const claim = entries.find((e) => e.filename === 'claim.json' || /^[^/]+\/claim\.json$/.test(e.filename));
  const prefix = claim?.filename.slice(0, -'claim.json'.length) ?? '';
  if (prefix === '') return entries;
  return entries.filter((e) => e.filename.startsWith(prefix)).map((e) => Object.assign(e, { filename: e.filename.slice(prefix.length) }));
}

async function takeEntry(entry: FileEntry, take: (entry: Incoming) => Promise<void>): Promise<void> {
  const out = new PassThrough();
  const capped = upTo(entry.uncompressedSize);
  let fault: unknown;
  const inflating = entry.getData(Writable.toWeb(capped)).catch((cause: unknown) => {
    fault = cause;
    capped.destroy(cause instanceof Error ? cause : new Error(String(cause)));
  });
  const piping = pipeline(capped, out).catch(() => undefined);
  try {
    await take({ name: entry.filename, stream: out });
  } catch (cause) {
    out.resume();
    await inflating;
    // The very error of the archive, and not one that the taker had of its own.
    throw cause === fault && !(cause instanceof AppFailure) ? damaged(entry.filename) : cause;
  } finally {
    out.resume();
    await Promise.all([inflating, piping]);
  }
}

const damaged = (name: string): AppFailure =>
  new AppFailure({ code: 'invalid', sentence: `${name} in the archive is damaged, or is not as long as the archive says. Pack it again.` });

function upTo(limit: number): Transform {
  let bytes = 0;
  return new Transform({
    transform(chunk: Buffer, _encoding, done) {
      bytes += chunk.length;
      done(bytes > limit ? new AppFailure({ code: 'limit', sentence: `The archive, or a file in it, is longer than ${limit} bytes.` }) : null, chunk);
    },
  });
}
