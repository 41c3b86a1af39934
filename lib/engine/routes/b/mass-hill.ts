import { goldenMaximum } from './climb-hill';

/** Equally spaced values through which a polynomial is laid, and fewer to see what it leaves open. */
export const WIDE = 7;
const NARROW = 5;
const PLACED = 1e-8;

export interface HillTop {
  /** In steps from the first value. */
  readonly at: number;
  readonly value: number;
  /** How far the polynomials of seven and of five points differ there. */
  readonly doubt: number;
}

/** Newton's forward differences of equally spaced values, read at x steps from the first. */
function newtonAt(values: readonly number[], x: number): number {
  let [row, sum, term] = [values, values[0]!, 1];
  for (let k = 1; k < values.length; k++) {
    row = row.slice(1).map((v, i) => v - row[i]!);
    term *= (x - k + 1) / k;
    sum += term * row[0]!;
  }
  return sum;
}

/**
 * The highest place of equally spaced values within a step of one of them.
 * Shape:  seven values; `centre` counts from the first, and the place lies between `centre` ± 1 and inside the seven.
 * Units:  those of the values.
 * Error:  `doubt` where the values are smooth; the place to 1e-8 of a step.
 * Fails:  never.
 * Source: Newton's forward formula (from memory); golden section.
 */
export function hillTop(values: readonly number[], centre: number): HillTop {
  const [from, to] = [Math.max(0, centre - 1), Math.min(WIDE - 1, centre + 1)];
  const { x, value } = goldenMaximum((y) => newtonAt(values, y), from, to, PLACED);
  const first = Math.min(WIDE - NARROW, Math.max(0, centre - (NARROW - 1) / 2));
  const fewer = newtonAt(values.slice(first, first + NARROW), x[0]! - first);
  return { at: x[0]!, value, doubt: Math.abs(value - fewer) };
}
