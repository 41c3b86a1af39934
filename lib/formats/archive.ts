import { ZipReader, type Entry, type FileEntry, type Reader } from '@zip.js/zip.js';
import type { Problem } from '@/lib/kernel/problem';
import { pathFault } from '@/lib/kernel/relative-path';
import { err, ok, type Result } from '@/lib/kernel/result';
import { FileRefused, type OpenFile } from './open-file';

/** A claim folder as one `.zip`: its sheet, and its files by the names the sheet uses. */
export interface ClaimArchive {
  readonly sheetJson: Uint8Array;
  readonly names: readonly string[];
  readonly openFile: OpenFile;
  readonly close: () => Promise<void>;
}

export interface ArchiveLimits {
  readonly entries: number;
  readonly fileBytes: number;
  readonly totalBytes: number;
  /** Text of numbers packs three to six times; a thousand times is a bomb. */
  readonly ratio: number;
}

export const archiveLimits: ArchiveLimits = { entries: 2000, fileBytes: 512 * 2 ** 20, totalBytes: 2 ** 30, ratio: 200 };

const sheetName = 'claim.json';
const sheetBytes = 4 * 2 ** 20;
const mib = (bytes: number): string => `${Math.round(bytes / 2 ** 20)} MiB`;

/** The whole directory of the archive is judged before a byte is unpacked, and each entry again while it is. */
export async function openArchive(reader: Reader<unknown>, name: string, limits: ArchiveLimits = archiveLimits): Promise<Result<ClaimArchive, Problem[]>> {
  const zip = new ZipReader(reader, { useWebWorkers: false, checkOverlappingEntry: true });
  try {
    const entries = await listEntries(zip, limits);
    const problems = entries === null ? [tooMany(name, limits)] : archiveProblems(entries, name, limits);
    if (entries === null || problems.length > 0) return err(problems);
    return await withSheet(zip, entries.filter(isFile), name);
  } catch {
    return err([{ code: 'formats/archive-damaged', where: name, saw: 'an archive that cannot be read', expected: 'a .zip with claim.json and its files' }]);
  }
}

export async function listEntries(zip: ZipReader<unknown>, limits: ArchiveLimits): Promise<Entry[] | null> {
  const entries: Entry[] = [];
  for await (const entry of zip.getEntriesGenerator({ filenameValidation: 'tolerant' })) {
    entries.push(entry);
    if (entries.length > limits.entries) return null;
  }
  return entries;
}

export const isFile = (entry: Entry): entry is FileEntry => !entry.directory;
export const tooMany = (name: string, limits: ArchiveLimits): Problem => ({ code: 'formats/archive-too-large', where: name, saw: `more than ${limits.entries} entries`, expected: `at most ${limits.entries}` });

export function archiveProblems(entries: readonly Entry[], name: string, limits: ArchiveLimits): Problem[] {
  const problems = entries.flatMap((entry) => entryProblems(entry, name, limits));
  const files = entries.filter(isFile);
  const total = files.reduce((sum, entry) => sum + entry.uncompressedSize, 0);
  if (total > limits.totalBytes) problems.push({ code: 'formats/archive-too-large', where: name, saw: `${mib(total)} when unpacked`, expected: `at most ${mib(limits.totalBytes)}` });
  const seen = new Set<string>();
  for (const { filename } of files) {
    const key = filename.normalize('NFC').toLowerCase();
    if (seen.has(key)) problems.push({ code: 'formats/archive-path', where: name, saw: `${JSON.stringify(filename)} twice, or twice but for letter case`, expected: 'each name once' });
    seen.add(key);
  }
  return problems;
}

function entryProblems(entry: Entry, name: string, limits: ArchiveLimits): Problem[] {
  const path = entry.directory ? entry.filename.replace(/\/$/, '') : entry.filename;
  const problem = (code: string, saw: string, expected: string): Problem[] => [{ code, where: name, saw, expected }];
  const fault = pathFault(path);
  if (fault) return problem('formats/archive-path', fault, 'relative names inside the archive');
  if (isLink(entry)) return problem('formats/archive-path', `${JSON.stringify(path)}, a link`, 'files and folders only');
  if (entry.encrypted) return problem('formats/archive-encrypted', `${JSON.stringify(path)}, which is encrypted`, 'an archive without a password');
  if (entry.uncompressedSize > limits.fileBytes) return problem('formats/archive-too-large', `${JSON.stringify(path)} of ${mib(entry.uncompressedSize)} when unpacked`, `at most ${mib(limits.fileBytes)} a file`);
  const small = entry.uncompressedSize < 2 ** 20;
  if (!small && entry.uncompressedSize > limits.ratio * Math.max(1, entry.compressedSize)) return problem('formats/archive-bomb', `${JSON.stringify(path)}, which grows ${Math.round(entry.uncompressedSize / Math.max(1, entry.compressedSize))}-fold when unpacked`, `at most ${limits.ratio}-fold`);
  return [];
}

/** Unix mode in the upper half of the external attributes: 0xA000 is a symbolic link, 0x8000 a file, 0x4000 a folder. */
function isLink(entry: Entry): boolean {
  const kind = ((entry.externalFileAttributes ?? 0) >>> 16) & 0xf000;
  return kind !== 0 && kind !== 0x8000 && kind !== 0x4000;
}

async function withSheet(zip: ZipReader<unknown>, files: readonly FileEntry[], name: string): Promise<Result<ClaimArchive, Problem[]>> {
  const prefix = sheetPrefix(files.map((file) => file.filename));
  const byName = new Map(files.flatMap((file) => (prefix !== null && file.filename.startsWith(prefix) ? [[file.filename.slice(prefix.length), file] as const] : [])));
  const sheet = byName.get(sheetName);
  if (!sheet) return err([{ code: 'formats/no-sheet', where: name, saw: `no ${sheetName} at the top of the archive`, expected: `${sheetName} beside its files` }]);
  if (sheet.uncompressedSize > sheetBytes) return err([{ code: 'formats/archive-too-large', where: `${name}/${sheetName}`, saw: mib(sheet.uncompressedSize), expected: `at most ${mib(sheetBytes)}` }]);
  const openFile: OpenFile = (file) => entryBytes(byName.get(file));
  return ok({ sheetJson: await gather(entryBytes(sheet)), names: [...byName.keys()], openFile, close: () => zip.close() });
}

/** The sheet stands at the top, or in the one folder that was packed as a whole. */
function sheetPrefix(names: readonly string[]): string | null {
  if (names.includes(sheetName)) return '';
  const inFolder = names.filter((name) => name.split('/').length === 2 && name.endsWith(`/${sheetName}`) && !name.startsWith('__MACOSX/'));
  return inFolder.length === 1 ? (inFolder[0] ?? '').slice(0, -sheetName.length) : null;
}

export async function* entryBytes(entry: FileEntry | undefined): AsyncGenerator<Uint8Array> {
  if (!entry) throw new FileRefused('no file of this name in the archive', 'the file beside claim.json', 'Add the file, or correct its name in the sheet.');
  const pipe = new TransformStream<Uint8Array, Uint8Array>();
  const stop = new AbortController();
  const written = entry.getData(pipe.writable, { signal: stop.signal, checkSignature: true }).then(() => null, (thrown: unknown) => thrown);
  const reader = pipe.readable.getReader();
  // An entry that fails before its first byte leaves the pipe open: the waiting read is ended here.
  void written.then((thrown) => (thrown === null ? undefined : reader.cancel().catch(() => undefined)));
  let bytes = 0;
  try {
    for (let part = await reader.read(); !part.done; part = await reader.read()) {
      bytes += part.value.length;
      if (bytes > entry.uncompressedSize) throw new FileRefused('more bytes than the archive declares for this file', `${entry.uncompressedSize} bytes`);
      yield part.value;
    }
    if ((await written) !== null) throw damagedEntry();
  } catch (thrown) {
    throw thrown instanceof FileRefused ? thrown : damagedEntry();
  } finally {
    stop.abort();
    await reader.cancel().catch(() => undefined);
  }
}

const damagedEntry = () => new FileRefused('a damaged file in the archive', 'a file whose checksum is right', 'Pack the archive again.');

async function gather(parts: AsyncIterable<Uint8Array>): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  for await (const part of parts) chunks.push(part);
  const whole = new Uint8Array(chunks.reduce((sum, chunk) => sum + chunk.length, 0));
  let at = 0;
  for (const chunk of chunks) {
    whole.set(chunk, at);
    at += chunk.length;
  }
  return whole;
}
