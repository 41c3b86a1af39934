import { Reader } from '@zip.js/zip.js';
import { formatProblem, type Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { ArrayFacts } from '../arrays/array-source';
import { Listing, type ArrayStructure, type StructureEntry } from '../arrays/structure';
import { readNpyFacts } from './npy-stream';
import { openNpzReader } from './npz-source';

/** Bytes of a file by position. */
export interface Jumping {
  readonly size: number;
  readonly read: (into: Uint8Array, at: number) => number;
}

/** The one array of an `.npy`, from its header alone. */
export async function npyStructure(file: string, bytes: Jumping): Promise<Result<ArrayStructure, Problem[]>> {
  const facts = await readNpyFacts(file, front(bytes));
  return facts.ok ? ok({ format: 'npy', entries: [entryOf('', facts)], cut: false }) : err(facts.error);
}

/** The arrays of an `.npz`, from the directory and their headers. */
export async function npzStructure(file: string, bytes: Jumping): Promise<Result<ArrayStructure, Problem[]>> {
  const npz = await openNpzReader(file, new JumpingReader(bytes));
  if (!npz.ok) return npz;
  try {
    const listing = new Listing();
    for (const name of npz.value.names) {
      if (listing.full) {
        listing.cut = true;
        break;
      }
      if (listing.takes(name)) listing.add(entryOf(name, await npz.value.facts(name)));
    }
    return ok({ format: 'npz', entries: listing.entries, cut: listing.cut });
  } finally {
    await npz.value.close();
  }
}

function entryOf(path: string, facts: Result<ArrayFacts, Problem[]>): StructureEntry {
  const nothing = { path, kind: 'dataset' as const, attributes: [] };
  if (!facts.ok) return { ...nothing, shape: null, complex: false, type: '', refusal: facts.error.map((problem) => formatProblem({ ...problem, where: '' })).join(' ') };
  const { shape, complex, digits } = facts.value;
  return { ...nothing, shape, complex, type: `${complex ? 'complex' : 'real'} numbers${digits === null ? '' : ' of single precision'}`, refusal: null };
}

const chunkBytes = 2 ** 16;

async function* front({ size, read }: Jumping): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < size; at += chunkBytes) {
    const chunk = new Uint8Array(Math.min(chunkBytes, size - at));
    yield chunk.subarray(0, read(chunk, at));
  }
}

class JumpingReader extends Reader<Jumping> {
  override readonly size: number;

  constructor(private readonly bytes: Jumping) {
    super(bytes);
    this.size = bytes.size;
  }

  override async readUint8Array(index: number, length: number): Promise<Uint8Array<ArrayBuffer>> {
    if (index < 0) throw new RangeError('before the file begins');
    const buffer = new Uint8Array(Math.max(0, Math.min(length, this.size - index)));
    return buffer.subarray(0, buffer.length === 0 ? 0 : this.bytes.read(buffer, index));
  }
}
