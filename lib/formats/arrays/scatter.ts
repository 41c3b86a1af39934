import { readerOf, type ElementType } from './element-type';

/**
 * Puts the elements of an array, as they come from a file, where its series want them. `strides` says
 * how far apart in `out` neighbours along each dimension lie; the walk is in the file's own order.
 */
export interface Walk {
  readonly shape: readonly number[];
  readonly strides: readonly number[];
  readonly fortran: boolean;
  readonly base: number;
  /** From a real part to its imaginary part in `out`. */
  readonly toImaginary: number;
}

/** Rows up to this length are taken many at a time. */
const SHORT_ROW = 64;

export class Scatter {
  private readonly shape: readonly number[];
  private readonly strides: readonly number[];
  private readonly index: number[];
  private at: number;
  readonly total: number;
  done = 0;

  constructor(
    private readonly walk: Walk,
    private readonly type: ElementType,
    private readonly out: Float64Array,
  ) {
    // Slowest first, as C writes them; Fortran's order is the same turned round.
    this.shape = walk.fortran ? [...walk.shape].reverse() : walk.shape;
    this.strides = walk.fortran ? [...walk.strides].reverse() : walk.strides;
    this.index = this.shape.map(() => 0);
    this.at = walk.base;
    this.total = this.shape.reduce((n, d) => n * d, 1);
  }

  /** Whole elements only. */
  push(bytes: Uint8Array): void {
    const count = Math.min(this.total - this.done, Math.floor(bytes.length / this.type.size));
    const numbers = this.doublesIn(bytes);
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    let from = 0;
    while (from < count) {
      const rows = numbers ? this.wholeRows(count - from) : 0;
      if (numbers && rows > 0) {
        this.copyRows(numbers, from, rows);
        from += rows * this.shape[this.last]!;
        this.advanceRows(rows);
        continue;
      }
      const run = this.run(count - from);
      if (numbers) this.copyDoubles(numbers, from, run);
      else this.copy(view, from, run);
      from += run;
      this.advance(run);
    }
    this.done += count;
  }

  private get last(): number {
    return this.shape.length - 1;
  }

  private run(most: number): number {
    return this.last < 0 ? 1 : Math.min(most, this.shape[this.last]! - this.index[this.last]!);
  }

  private get stride(): number {
    return this.last < 0 ? 0 : this.strides[this.last]!;
  }

  private copy(view: DataView, from: number, run: number): void {
    const { type, out, walk, stride } = this;
    const read = readerOf(type);
    let to = this.at;
    let at = from * type.size;
    for (let i = 0; i < run; i++, to += stride, at += type.size) {
      out[to] = read(view, at + type.firstAt);
      if (type.secondAt !== null) out[to + walk.toImaginary] = read(view, at + type.secondAt);
    }
  }

  /** The usual case: doubles of this machine's order on their boundaries need no call for each number. */
  private doublesIn(bytes: Uint8Array): Float64Array | null {
    const { base, littleEndian, size, firstAt, secondAt } = this.type;
    if (base !== 'f8' || !littleEndian || !hostIsLittle || (size | firstAt | (secondAt ?? 0) | bytes.byteOffset) % 8 !== 0) return null;
    return new Float64Array(bytes.buffer, bytes.byteOffset, bytes.byteLength >> 3);
  }

  private copyDoubles(numbers: Float64Array, from: number, run: number): void {
    const { out, stride } = this;
    const { size, firstAt, secondAt } = this.type;
    const step = size >> 3;
    let at = (from * size + firstAt) >> 3;
    let to = this.at;
    if (secondAt === null) for (let i = 0; i < run; i++, at += step, to += stride) out[to] = numbers[at]!;
    else {
      const second = (secondAt - firstAt) >> 3;
      const imaginary = this.walk.toImaginary;
      for (let i = 0; i < run; i++, at += step, to += stride) {
        out[to] = numbers[at]!;
        out[to + imaginary] = numbers[at + second]!;
      }
    }
  }

  /** Rows of the last dimension that can be taken at once, from where the walk stands. */
  private wholeRows(most: number): number {
    const { last } = this;
    if (last < 1 || this.index[last] !== 0 || this.shape[last]! > SHORT_ROW) return 0;
    return Math.min(Math.floor(most / this.shape[last]!), this.shape[last - 1]! - this.index[last - 1]!);
  }

  /** Short rows are many: one column at a time over a stretch of them, so that each is written in order. */
  private copyRows(numbers: Float64Array, from: number, rows: number): void {
    const { size, firstAt, secondAt } = this.type;
    const [step, columns] = [size >> 3, this.shape[this.last]!];
    const first = (from * size + firstAt) >> 3;
    const begin = this.at;
    for (let column = 0; column < columns; column++) {
      const to = begin + column * this.stride;
      this.copyColumn(numbers, first + column * step, columns * step, to, rows);
      if (secondAt !== null) this.copyColumn(numbers, first + column * step + ((secondAt - firstAt) >> 3), columns * step, to + this.walk.toImaginary, rows);
    }
  }

  private copyColumn(numbers: Float64Array, first: number, step: number, begin: number, rows: number): void {
    const { out } = this;
    const stride = this.strides[this.last - 1]!;
    for (let row = 0, at = first, to = begin; row < rows; row++, at += step, to += stride) out[to] = numbers[at]!;
  }

  private advanceRows(rows: number): void {
    const { last } = this;
    this.index[last - 1]! += rows - 1;
    this.at += (rows - 1) * this.strides[last - 1]!;
    this.advance(this.shape[last]!);
  }

  private advance(run: number): void {
    let d = this.last;
    if (d < 0) return;
    this.index[d]! += run;
    this.at += run * this.strides[d]!;
    while (d > 0 && this.index[d] === this.shape[d]) {
      this.at += this.strides[d - 1]! - this.index[d]! * this.strides[d]!;
      this.index[d] = 0;
      this.index[--d]! += 1;
    }
  }
}

const hostIsLittle = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;
