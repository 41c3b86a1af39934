import type { BinWeights } from './bin-weights';
import type { SignalSource } from './signal-source';

/** A signal times the weights of one mass of the template, ready to meet every template. */
export interface MassSlice {
  /** 1/S on the bins, whole band. */
  readonly weights: { readonly first: number; readonly values: Float64Array };
  /** The weighed signal where it has power. */
  readonly first: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** Σ V|a|². */
  readonly norm: number;
  /** Bins that hold nearly all of it, and Σ |V| |a|² of the others. */
  readonly coreFrom: number;
  readonly coreTo: number;
  readonly outside: number;
  /** The middle of its power, and Σ V (k − middle)² |a|² over the core. */
  readonly middle: number;
  readonly spread: number;
  /** When the record begins and ends, as shares of the period that the bins tell apart. */
  readonly from: number;
  readonly to: number;
}

/** Of a signal's weighted power, what may be left out at each end of its bins: it changes no match by more than the root. */
const LEFT_OUT = 1e-9;
/** The same for the core, whose rest is bounded and counted. */
const CORE_LEFT_OUT = 3e-5;

/** Runs of bins without so much of the whole at either end. */
function trimmed(powers: Float64Array, share: number, total: number): readonly [from: number, to: number] {
  let from = 0;
  for (let left = 0; from < powers.length && (left += Math.abs(powers[from]!)) < share * total; ) from++;
  let to = powers.length;
  for (let left = 0; to > from && (left += Math.abs(powers[to - 1]!)) < share * total; ) to--;
  return [from, to];
}

/**
 * Puts a signal on the bins of one mass.
 * Shape:  weights of the bins; `dF` their width in the signal's own unit.
 * Units:  those of the source, times 1/S.
 * Error:  1e-9 of the weighted power is left out at either end.
 * Fails:  never; a signal without power gives empty bins.
 * Source: engine design: a mass only stretches the frequencies.
 */
export function massSlice(source: SignalSource, dF: number, { first, values }: Pick<BinWeights, 'first' | 'values'>): MassSlice {
  const bins = source.bins(dF, first, first + values.length - 1);
  const n = bins.length / 2;
  const powers = new Float64Array(n);
  let norm = 0;
  for (let k = 0; k < n; k++) norm += powers[k] = values[k]! * (bins[2 * k]! * bins[2 * k]! + bins[2 * k + 1]! * bins[2 * k + 1]!);
  const [from, to] = trimmed(powers, LEFT_OUT, norm);
  const [coreFrom, coreTo] = trimmed(powers, CORE_LEFT_OUT, norm);
  const [re, im] = [new Float64Array(to - from), new Float64Array(to - from)];
  for (let i = 0; i < re.length; i++) {
    const v = values[from + i]!;
    re[i] = v * bins[2 * (from + i)]!;
    im[i] = v * bins[2 * (from + i) + 1]!;
  }
  let inside = 0;
  let moment = 0;
  let square = 0;
  for (let k = coreFrom; k < coreTo; k++) {
    inside += powers[k]!;
    moment += k * powers[k]!;
  }
  // End weights change their sign, so that what lies outside is summed by size.
  let outside = 0;
  for (let k = 0; k < n; k++) if (k < coreFrom || k >= coreTo) outside += Math.abs(powers[k]!);
  const mean = inside > 0 ? Math.round(moment / inside) : 0;
  for (let k = coreFrom; k < coreTo; k++) square += (k - mean) * (k - mean) * powers[k]!;
  return { weights: { first, values }, first: first + from, re, im, norm, coreFrom: first + coreFrom, coreTo: first + coreTo, outside, middle: first + mean, spread: square, from: source.from * dF, to: source.to * dF };
}
