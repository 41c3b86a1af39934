/**
 * The hall reads bytes into series. This file turns the digits of a printed decimal into the
 * nearest double, without making a string of it: a table of half a million numbers is mostly
 * decimals that `Number()` would need a string for, at several times the cost.
 *
 * Short mantissas with small exponents are exact in one division. The rest is computed in
 * double-double arithmetic and accepted only when both ends of its error interval round to
 * the same double; otherwise the caller falls back on `Number()`. So every result is the
 * correctly rounded one, whichever way it came.
 */
const lowest = -300;
const highest = 300;

interface Powers {
  readonly high: Float64Array;
  readonly low: Float64Array;
}

/** 10^e as an unevaluated sum of two doubles, from exact integers. */
function powerPair(e: number): readonly [number, number] {
  const high = Number(`1e${e}`);
  if (e >= 0) return [high, Number(10n ** BigInt(e) - BigInt(high))];
  const { mantissa, exponent } = parts(high);
  const ten = 10n ** BigInt(-e);
  const numerator = (1n << BigInt(-exponent)) - mantissa * ten;
  const scaled = (numerator << 1100n) / (ten << BigInt(-exponent));
  return [high, scaleDown(scaled)];
}

/** x = mantissa · 2^exponent with an integer mantissa. */
function parts(x: number): { mantissa: bigint; exponent: number } {
  const bits = new DataView(new ArrayBuffer(8));
  bits.setFloat64(0, x);
  const raw = bits.getBigUint64(0);
  const biased = Number((raw >> 52n) & 0x7ffn);
  return { mantissa: (raw & 0xfffffffffffffn) | (1n << 52n), exponent: biased - 1075 };
}

/** scaled · 2^-1100, in two steps so that neither factor underflows. */
function scaleDown(scaled: bigint): number {
  const drop = BigInt(Math.max(0, scaled.toString(2).length - 64));
  return Number(scaled >> drop) * 2 ** (Number(drop) - 550) * 2 ** -550;
}

function makePowers(): Powers {
  const high = new Float64Array(highest - lowest + 1);
  const low = new Float64Array(highest - lowest + 1);
  for (let e = lowest; e <= highest; e++) {
    const [h, l] = powerPair(e);
    high[e - lowest] = h;
    low[e - lowest] = l;
  }
  return { high, low };
}

const powers = makePowers();
const splitter = 134217729;
/** Relative error of the double-double result, with room: the true bound is a few 2^-104. */
const slack = 2 ** -97;

/** 10^e for 0 ≤ e ≤ 22, exact doubles. */
export const exactTen = Float64Array.from({ length: 23 }, (_, e) => Number(`1e${e}`));

/**
 * The double nearest to (head·10^tailDigits + tail)·10^exponent, or NaN when that is not certain.
 * Shape:  scalars; head and tail are integers below 10^15, tailDigits ≤ 15.
 * Units:  none.
 * Error:  none: certain or refused.
 * Fails:  NaN when the result is too near a rounding boundary, or the exponent too large to be safe.
 * Source: Ziv's rounding test on a product of two double-doubles (Dekker's splitting), from memory.
 */
export function nearestDouble(head: number, tail: number, tailDigits: number, exponent: number): number {
  if (exponent < -280 || exponent > 260) return Number.NaN;
  let a = head;
  let aLow = 0;
  if (tailDigits > 0) {
    const ten = exactTen[tailDigits]!;
    const product = head * ten;
    const error = productError(head, ten, product);
    a = product + tail;
    aLow = error + (tail - (a - product));
  }
  const high = powers.high[exponent - lowest]!;
  const product = a * high;
  const correction = productError(a, high, product) + (a * powers.low[exponent - lowest]! + aLow * high);
  const doubt = product * slack;
  const below = product + (correction - doubt);
  return below === product + (correction + doubt) ? below : Number.NaN;
}

/** a·b − product, exactly (no overflow at the sizes used here). */
function productError(a: number, b: number, product: number): number {
  const ca = splitter * a;
  const aHigh = ca - (ca - a);
  const aLow = a - aHigh;
  const cb = splitter * b;
  const bHigh = cb - (cb - b);
  const bLow = b - bHigh;
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}
