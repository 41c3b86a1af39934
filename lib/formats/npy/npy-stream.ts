import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { columnsFor, sizeProblem, type ArrayFacts, type Reading } from '../arrays/array-source';
import { digitsOf } from '../arrays/element-type';
import { Scatter } from '../arrays/scatter';
import { join } from '../text/scan-bytes';
import { unreadable } from '../open-file';
import { parseHeader, type NpyHeader } from './header';

const stagingBytes = 2 ** 20;

export const factsOf = ({ shape, type }: NpyHeader): ArrayFacts => ({ shape, complex: type.secondAt !== null, digits: digitsOf(type.base) });

/** An array's header and what follows it, read on from there or left. */
interface Begun {
  readonly header: NpyHeader;
  readonly rest: Uint8Array;
  readonly chunks: AsyncIterator<Uint8Array>;
}

async function begin(where: string, source: AsyncIterable<Uint8Array>): Promise<Result<Begun, Problem[]>> {
  const chunks = source[Symbol.asyncIterator]();
  let bytes: Uint8Array = new Uint8Array(0);
  for (;;) {
    const next = await chunks.next();
    if (next.done) return err([{ code: 'formats/npy-header', where, saw: `a file that ends after ${bytes.length} bytes, inside its header`, expected: 'a whole .npy file', hint: 'Send the file again; it was cut short.' }]);
    bytes = bytes.length === 0 ? next.value : join(bytes, next.value);
    const header = parseHeader(bytes);
    if (header === null) continue;
    if ('dataAt' in header) return ok({ header, rest: bytes.subarray(header.dataAt), chunks });
    await chunks.return?.();
    return err([{ where, ...header }]);
  }
}

/** The header alone. */
export async function readNpyFacts(where: string, source: AsyncIterable<Uint8Array>): Promise<Result<ArrayFacts, Problem[]>> {
  const begun = await refusals(where, () => begin(where, source));
  if (!begun.ok) return begun;
  await begun.value.chunks.return?.();
  return ok(factsOf(begun.value.header));
}

/** The numbers, streamed: memory holds them once, and no more than the header announced. */
export function readNpy(where: string, source: AsyncIterable<Uint8Array>, readingOf: (facts: ArrayFacts) => Result<Reading, Problem[]>): Promise<Result<{ readonly facts: ArrayFacts; readonly columns: Float64Array[] }, Problem[]>> {
  return refusals(where, async () => {
    const begun = await begin(where, source);
    if (!begun.ok) return begun;
    const { header, rest, chunks } = begun.value;
    const facts = factsOf(header);
    const reading = readingOf(facts);
    const tooLarge = reading.ok ? sizeProblem(where, header.shape, reading.value.samples) : null;
    if (!reading.ok || tooLarge) {
      await chunks.return?.();
      return reading.ok ? err([tooLarge!]) : reading;
    }
    return collectNumbers(where, header, reading.value, rest, chunks);
  });
}

async function collectNumbers(where: string, header: NpyHeader, reading: Reading, rest: Uint8Array, chunks: AsyncIterator<Uint8Array>): Promise<Result<{ facts: ArrayFacts; columns: Float64Array[] }, Problem[]>> {
  const facts = factsOf(header);
  const { out, strides, toImaginary, columns } = columnsFor(facts, reading);
  const scatter = new Scatter({ shape: header.shape, strides, fortran: header.fortran, base: 0, toImaginary }, header.type, out);
  const stage = new Stage(header.type.size, (bytes) => scatter.push(bytes));
  stage.push(rest);
  let bytes = rest.length;
  for (let next = await chunks.next(); !next.done; next = await chunks.next()) {
    stage.push(next.value);
    bytes += next.value.length;
  }
  stage.end();
  const expected = scatter.total * header.type.size;
  if (bytes === expected) return ok({ facts, columns });
  return err([{ code: 'formats/npy-length', where, saw: `${bytes} bytes of numbers`, expected: `${expected}, as the header says`, hint: bytes < expected ? 'Send the file again; it was cut short.' : 'Save the array again.' }]);
}

/** Whole elements on an eight-byte boundary, whatever the pieces in which they come; pieces that stand on one are not copied. */
class Stage {
  private readonly bytes: Uint8Array;
  private held = 0;

  constructor(
    private readonly size: number,
    private readonly take: (bytes: Uint8Array) => void,
  ) {
    this.bytes = new Uint8Array(stagingBytes - (stagingBytes % size));
  }

  push(chunk: Uint8Array): void {
    let from = 0;
    if (this.held === 0 && chunk.byteOffset % 8 === 0) {
      from = chunk.length - (chunk.length % this.size);
      if (from > 0) this.take(chunk.subarray(0, from));
    }
    while (from < chunk.length) {
      const part = chunk.subarray(from, from + this.bytes.length - this.held);
      this.bytes.set(part, this.held);
      this.held += part.length;
      from += part.length;
      if (this.held === this.bytes.length) this.end();
    }
  }

  end(): void {
    if (this.held > 0) this.take(this.bytes.subarray(0, this.held - (this.held % this.size)));
    this.held = 0;
  }
}

async function refusals<T>(where: string, read: () => Promise<Result<T, Problem[]>>): Promise<Result<T, Problem[]>> {
  try {
    return await read();
  } catch (thrown) {
    return err([unreadable(where, thrown)]);
  }
}

