/** How one number is stored. Complex elements hold two of them, `secondAt` bytes apart. */
export interface ElementType {
  readonly base: NumberBase;
  readonly littleEndian: boolean;
  /** Bytes from one element to the next, which may hold more than is asked for. */
  readonly size: number;
  /** Bytes into the element. */
  readonly firstAt: number;
  /** Of the imaginary part; null for a real element. */
  readonly secondAt: number | null;
}

export type NumberBase = 'f2' | 'f4' | 'f8' | 'i1' | 'i2' | 'i4' | 'i8' | 'u1' | 'u2' | 'u4' | 'u8';

export const bytesOf = (base: NumberBase): number => Number(base[1]);

/** Significant decimal digits that storage keeps: half precision rounds like a third digit, single like a seventh; the rest is exact. */
export const digitsOf = (base: NumberBase): number | null => (base === 'f2' ? 3 : base === 'f4' ? 7 : null);

/** A real type, or the complex one that is two of it side by side. */
export function elementOf(base: NumberBase, littleEndian: boolean, complex: boolean): ElementType {
  const bytes = bytesOf(base);
  return { base, littleEndian, size: complex ? 2 * bytes : bytes, firstAt: 0, secondAt: complex ? bytes : null };
}

type Read = (view: DataView, at: number) => number;

/** Half precision (IEEE 754 binary16): every one of its values is a double. */
function halfOf(bits: number): number {
  const [sign, exponent, fraction] = [bits >> 15 === 0 ? 1 : -1, (bits >> 10) & 31, bits & 1023];
  if (exponent === 31) return fraction === 0 ? sign * Infinity : Number.NaN;
  return exponent === 0 ? sign * fraction * 2 ** -24 : sign * (1 + fraction / 1024) * 2 ** (exponent - 15);
}

/** Exact but for 64-bit integers beyond 2^53, which no time or strain reaches. */
export function readerOf({ base, littleEndian: le }: ElementType): Read {
  switch (base) {
    case 'f8': return (v, at) => v.getFloat64(at, le);
    case 'f2': return (v, at) => halfOf(v.getUint16(at, le));
    case 'f4': return (v, at) => v.getFloat32(at, le);
    case 'i8': return (v, at) => Number(v.getBigInt64(at, le));
    case 'u8': return (v, at) => Number(v.getBigUint64(at, le));
    case 'i4': return (v, at) => v.getInt32(at, le);
    case 'u4': return (v, at) => v.getUint32(at, le);
    case 'i2': return (v, at) => v.getInt16(at, le);
    case 'u2': return (v, at) => v.getUint16(at, le);
    case 'i1': return (v, at) => v.getInt8(at);
    case 'u1': return (v, at) => v.getUint8(at);
  }
}
