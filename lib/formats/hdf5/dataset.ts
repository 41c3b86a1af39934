import type { Metadata } from 'h5wasm';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { columnsFor, shapeText, sizeProblem, type ArrayFacts, type Reading } from '../arrays/array-source';
import { digitsOf, type ElementType } from '../arrays/element-type';
import { Scatter } from '../arrays/scatter';
import { blocksOf } from './blocks';
import type { OneFile } from './one-file';
import type { Selection } from './selection';
import { elementTypeOf } from './stored-type';

/** A dataset that may be read: numbers, in this file, through filters that are known. */
export interface Readable {
  readonly path: string;
  readonly where: string;
  readonly meta: Metadata;
  readonly type: ElementType;
  readonly shape: readonly number[];
  readonly indices: readonly (number | null)[];
}

const numbers = 'real, complex or whole numbers of up to eight bytes a part';
/** deflate, shuffle, fletcher32, n-bit and scale-offset: what the library itself can undo. */
const knownFilters = new Set([1, 2, 3, 5, 6]);
const largestChunkBytes = 2 ** 28;

export function readableDataset({ h5, id }: OneFile, where: string, { path, indices, field }: Selection): Result<Readable, Problem[]> {
  const refuse = (code: string, saw: string, expected: string, hint?: string): Result<never, Problem[]> => err([{ code, where, saw, expected, ...(hint ? { hint } : {}) }]);
  const meta = h5.get_dataset_metadata(id, path);
  if (meta.virtual_sources) return refuse('formats/hdf5-outside', 'a virtual dataset, which takes its numbers from elsewhere', 'numbers stored in the file itself', 'Copy the dataset into one file, for example with h5repack, and attach that.');
  const type = elementTypeOf(meta, field);
  if (typeof type === 'string') return refuse('formats/array-type', type, numbers, field === null && meta.compound_type ? 'Pick a field, such as [re].' : undefined);
  if (meta.shape === null) return refuse('formats/array-shape', 'a dataset without numbers', 'samples');
  const shape = meta.shape;
  const picked = indices ?? shape.map(() => null);
  const fits = picked.length === shape.length && picked.every((index, d) => index === null || index < shape[d]!);
  if (!fits) return refuse('formats/array-shape', shapeText(shape), 'a selection with an index or ":" for each dimension, counted from 0');
  const filter = h5.get_dataset_filters(id, path).find((one) => !knownFilters.has(one.id));
  if (filter) return refuse('formats/hdf5-filter', `numbers packed by a filter that is not read here (${/^[\w -]{1,30}$/.test(filter.name) ? filter.name : 'without a name'}, id ${filter.id})`, 'gzip, shuffle, fletcher32, n-bit, scale-offset, or none', 'Write the dataset again with gzip.');
  const chunkBytes = (meta.chunks ?? []).reduce((n, c) => n * c, meta.size);
  if (chunkBytes > largestChunkBytes) return refuse('formats/hdf5-chunk', `chunks of ${chunkBytes} bytes`, `at most ${largestChunkBytes}`, 'Write the dataset again in smaller chunks.');
  return ok({ path, where, meta, type, shape, indices: picked });
}

/** The shape that is left when picked dimensions are gone. */
export const factsOf = ({ shape, indices, type }: Readable): ArrayFacts => ({ shape: shape.filter((_, d) => indices[d] === null), complex: type.secondAt !== null, digits: digitsOf(type.base) });

/** In slices that follow the chunks, so that each is unpacked once and little of the file is in memory. */
export function readColumns({ h5, id }: OneFile, dataset: Readable, reading: Reading): Result<Float64Array[], Problem[]> {
  const facts = factsOf(dataset);
  const tooLarge = sizeProblem(dataset.where, facts.shape, reading.samples);
  if (tooLarge) return err([tooLarge]);
  const { out, strides, toImaginary, columns } = columnsFor(facts, reading);
  const left = dataset.indices.flatMap((index, d) => (index === null ? [d] : []));
  const strideOf = dataset.shape.map((_, d) => strides[left.indexOf(d)] ?? 0);
  const begin = dataset.indices.map((index) => index ?? 0);
  const counts = dataset.shape.map((n, d) => (dataset.indices[d] === null ? n : 1));
  const { size } = dataset.meta;
  const { blocks, largest } = blocksOf(counts, dataset.meta.chunks, size);
  const at = h5._malloc(largest * size);
  if (at === 0) return err([noMemory(dataset.where)]);
  try {
    for (const { offset, count } of blocks()) {
      const n = count.reduce((product, c) => product * c, 1);
      h5.get_dataset_data(id, dataset.path, count.map(BigInt), offset.map((o, d) => BigInt(o + begin[d]!)), count.map(() => 1n), BigInt(at));
      const base = offset.reduce((sum, o, d) => sum + o * strideOf[d]!, 0);
      new Scatter({ shape: count, strides: strideOf, fortran: false, base, toImaginary }, dataset.type, out).push(h5.HEAPU8.subarray(at, at + n * size));
    }
  } finally {
    h5._free(at);
  }
  return ok(columns);
}

export const noMemory = (where: string): Problem => ({ code: 'formats/hdf5-memory', where, saw: 'a file that needs more memory than reading one may take', expected: 'datasets in moderate chunks', hint: 'Write the dataset again with gzip in chunks of some thousand samples.' });
