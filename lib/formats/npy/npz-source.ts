import { Reader, ZipReader, type FileEntry } from '@zip.js/zip.js';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { archiveLimits, archiveProblems, entryBytes, isFile, listEntries, tooMany, type ArchiveLimits } from '../archive';
import type { ArraySource } from '../arrays/array-source';
import { unreadable } from '../open-file';
import { quote } from '../text/diagnose-line';
import { columnsOf } from './npy-source';
import { readNpy, readNpyFacts } from './npy-stream';

/** An array of zeros packs as far as the method can; what it may grow to is bounded by its own header too. */
export const npzLimits: ArchiveLimits = { ...archiveLimits, ratio: 1100 };

export interface NpzSource extends ArraySource {
  readonly names: readonly string[];
  readonly close: () => Promise<void>;
}

/** The directory stands at the end, so the file is held, packed as it came; arrays are unpacked one at a time. */
export async function openNpz(file: string, source: AsyncIterable<Uint8Array>, limits: ArchiveLimits = npzLimits): Promise<Result<NpzSource, Problem[]>> {
  const chunks: Uint8Array[] = [];
  try {
    for await (const chunk of source) chunks.push(chunk);
  } catch (thrown) {
    return err([unreadable(file, thrown)]);
  }
  return openNpzReader(file, new ChunkReader(chunks), limits);
}

/** The same over any reader that can jump. */
export async function openNpzReader(file: string, reader: Reader<unknown>, limits: ArchiveLimits = npzLimits): Promise<Result<NpzSource, Problem[]>> {
  const zip = new ZipReader(reader, { useWebWorkers: false, checkOverlappingEntry: true });
  try {
    const entries = await listEntries(zip, limits);
    const problems = entries === null ? [tooMany(file, limits)] : archiveProblems(entries, file, limits);
    if (entries === null || problems.length > 0) return err(problems);
    return ok(sourceOf(file, zip, entries.filter(isFile)));
  } catch {
    return err([{ code: 'formats/archive-damaged', where: file, saw: 'a file that cannot be read as a zip archive', expected: 'an .npz, as numpy.savez writes it', hint: 'Save it again, or send it again if it was cut short.' }]);
  }
}

function sourceOf(file: string, zip: ZipReader<unknown>, entries: readonly FileEntry[]): NpzSource {
  const byName = new Map(entries.flatMap((entry) => (entry.filename.endsWith('.npy') ? [[entry.filename.slice(0, -4), entry] as const] : [])));
  const bytesOf = (name: string): Result<AsyncIterable<Uint8Array>, Problem[]> => {
    const entry = byName.get(name);
    return entry ? ok(entryBytes(entry)) : err([missing(file, name, [...byName.keys()])]);
  };
  return {
    file,
    names: [...byName.keys()],
    facts: async (name) => {
      const bytes = bytesOf(name);
      return bytes.ok ? readNpyFacts(`${file}:${name}`, bytes.value) : bytes;
    },
    read: async (name, reading) => {
      const bytes = bytesOf(name);
      return bytes.ok ? columnsOf(await readNpy(`${file}:${name}`, bytes.value, () => ok(reading))) : bytes;
    },
    listedModes: async () => null,
    close: () => zip.close(),
  };
}

/** Names come from a stranger's file: quoted, and few. */
export const missing = (file: string, name: string, have: readonly string[]): Problem => ({
  code: 'formats/no-dataset', where: file, saw: `no array ${quote(name)}`,
  expected: have.length === 0 ? 'a file with arrays in it' : `one of ${have.slice(0, 12).map(quote).join(', ')}${have.length > 12 ? `, … (${have.length} in all)` : ''}`,
  hint: 'Correct its name under "datasets" in the sheet.',
});

/** Random access to pieces as they came, so that they are not copied into one. */
class ChunkReader extends Reader<readonly Uint8Array[]> {
  private readonly starts: number[] = [];
  override readonly size: number;

  constructor(private readonly chunks: readonly Uint8Array[]) {
    super(chunks);
    let size = 0;
    for (const chunk of chunks) {
      this.starts.push(size);
      size += chunk.length;
    }
    this.size = size;
  }

  override async readUint8Array(index: number, length: number): Promise<Uint8Array<ArrayBuffer>> {
    if (index < 0) throw new RangeError('before the file begins');
    const buffer = new Uint8Array(Math.max(0, Math.min(length, this.size - index)));
    let filled = 0;
    for (let c = this.chunkAt(index); filled < buffer.length; c++) {
      const part = this.chunks[c]!.subarray(index + filled - this.starts[c]!).subarray(0, buffer.length - filled);
      buffer.set(part, filled);
      filled += part.length;
    }
    return buffer;
  }

  private chunkAt(index: number): number {
    let low = 0;
    let high = this.starts.length;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (this.starts[middle]! <= index) low = middle;
      else high = middle;
    }
    return low;
  }
}
