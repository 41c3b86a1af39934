import { exactTen, nearestDouble } from './decimal';

const zero = 48;
const maxExactDigits = 30;

/**
 * Reads one decimal from bytes: `[+-] digits [. digits] [e|E|d|D [+-] digits]`, nothing else.
 * Results are left in fields so that the hot loop allocates nothing.
 */
export class NumberReader {
  /** The value read; Infinity when the digits overflow a double. */
  readonly value = new Float64Array(1);
  /** Significant digits as printed, without leading zeros. */
  significant = 0;

  /** Position after the number, or -1 when the bytes at `start` are not one. */
  read(bytes: Uint8Array, start: number, end: number): number {
    let i = start;
    const sign = bytes[i]!;
    if (sign === 45 || sign === 43) i++;
    const first = i;
    let lead = 0;
    let rest = 0;
    let tail = 0;
    let n = 0;
    let point = -1;
    for (; i < end; i++) {
      const d = bytes[i]! - zero;
      if (d >= 0 && d <= 9) {
        if (n === 0 && d === 0) continue;
        if (n < 9) lead = (lead * 10 + d) | 0;
        else if (n < 15) rest = (rest * 10 + d) | 0;
        else if (n < maxExactDigits) tail = tail * 10 + d;
        n++;
      } else if (d === -2 && point < 0) point = i;
      else break;
    }
    const digits = i - first - (point < 0 ? 0 : 1);
    if (digits === 0) return -1;
    let exponent = point < 0 ? 0 : point + 1 - i;
    const mark = i < end ? bytes[i]! | 32 : 0;
    if (mark === 101 || mark === 100) {
      i = this.readExponent(bytes, i + 1, end);
      if (i < 0) return -1;
      exponent += this.exponent;
    }
    this.significant = n;
    const magnitude = n <= maxExactDigits ? compose(lead, rest, tail, n, exponent) : Number.NaN;
    const value = Number.isNaN(magnitude) ? slowly(bytes, first, i) : magnitude;
    this.value[0] = sign === 45 ? -value : value;
    return i;
  }

  private exponent = 0;

  private readExponent(bytes: Uint8Array, start: number, end: number): number {
    let i = start;
    const sign = i < end ? bytes[i]! : 0;
    if (sign === 45 || sign === 43) i++;
    const first = i;
    let e = 0;
    for (; i < end; i++) {
      const d = bytes[i]! - zero;
      if (d < 0 || d > 9) break;
      if (e < 100000) e = e * 10 + d;
    }
    if (i === first) return -1;
    this.exponent = sign === 45 ? -e : e;
    return i;
  }
}

function compose(lead: number, rest: number, tail: number, n: number, exponent: number): number {
  if (n === 0) return 0;
  let head = lead;
  let tailDigits = 0;
  let e = exponent;
  if (n > 9) {
    head = lead * exactTen[Math.min(n, 15) - 9]! + rest;
    if (n > 15) {
      tailDigits = n - 15;
      if (tail === 0) {
        e += tailDigits;
        tailDigits = 0;
      }
    }
  }
  if (tailDigits === 0) {
    if (e === 0) return head;
    if (e > 0 && e <= 22) return head * exactTen[e]!;
    if (e < 0 && e >= -22) return head / exactTen[-e]!;
  }
  return nearestDouble(head, tail, tailDigits, e);
}

/** The rare way: more than thirty digits, the ends of the range, or a result too near a boundary. */
function slowly(bytes: Uint8Array, first: number, end: number): number {
  let text = '';
  for (let i = first; i < end; i++) {
    const c = bytes[i]!;
    text += (c | 32) === 100 ? 'e' : String.fromCharCode(c);
  }
  return Number(text);
}
