import type { Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import { zoomTransform } from '@/lib/engine/fourier/zoom-transform';
import { responseSeries, type Packing, type ResponseSeries } from './packed-side';

/** A signal's spectrum on bins of any spacing: every mass of the template asks for another. */
export interface SignalSource {
  /** Bins from `first` on, interleaved re and im; as many as the content reaches, at most up to `last`. Times count from the middle of the record. */
  readonly bins: (dF: number, first: number, last: number) => Float64Array;
  /** When the record begins and ends, in units of its axis. */
  readonly from: number;
  readonly to: number;
}

/** Bins this much finer than the record's length resolves turn by 0.2 rad at most: eight of them interpolate to 2e-9. */
const FINER = 16;
/** Longer transforms than this are not made for it. */
const MOST_FINE = 1 << 20;
const TAPS = 8;
/** Nodes −3 … 4: one over the product of their distances. */
const scales: readonly number[] = Array.from({ length: TAPS }, (_, j) => {
  let product = 1;
  for (let i = 0; i < TAPS; i++) if (i !== j) product *= j - i;
  return 1 / product;
});

interface Fine {
  readonly spacing: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

function fineOf({ values, dt }: ResponseSeries): Fine {
  const size = powerOfTwoFrom(FINER * values.length);
  const [data, out] = [new Float64Array(2 * size), new Float64Array(2 * size)];
  const middle = values.length >> 1;
  for (let j = 0; j < values.length; j++) data[2 * (j >= middle ? j - middle : j - middle + size)] = values[j]!;
  transformOfSize(size).forward(out, data);
  const n = (size >> 1) + TAPS;
  const [re, im] = [new Float64Array(n), new Float64Array(n)];
  for (let k = 0; k < n; k++) [re[k], im[k]] = [out[2 * k]!, out[2 * k + 1]!];
  return { spacing: 1 / (size * dt), re, im };
}

/** Lagrange's polynomial through eight bins from `from` on, at x from the fourth of them, written out: every bin of every mass asks for it. */
function readFine({ spacing, re, im }: Fine, dF: number, first: number, count: number): Float64Array {
  const out = new Float64Array(2 * count);
  const ratio = dF / spacing;
  const last = re.length - TAPS;
  const [s0, s1, s2, s3, s4, s5, s6, s7] = scales as unknown as readonly [number, number, number, number, number, number, number, number];
  for (let k = 0; k < count; k++) {
    const place = (first + k) * ratio;
    const from = Math.max(0, Math.min(last, Math.floor(place) - 3));
    const d = place - from - 3;
    const [a, b, c, e, f, g, h] = [d + 3, d + 2, d + 1, d - 1, d - 2, d - 3, d - 4];
    const ab = a * b;
    const cd = c * d;
    const ef = e * f;
    const gh = g * h;
    const low = ab * cd;
    const high = ef * gh;
    const w0 = s0 * b * cd * high;
    const w1 = s1 * a * cd * high;
    const w2 = s2 * ab * d * high;
    const w3 = s3 * ab * c * high;
    const w4 = s4 * low * f * gh;
    const w5 = s5 * low * e * gh;
    const w6 = s6 * low * ef * h;
    const w7 = s7 * low * ef * g;
    out[2 * k] = w0 * re[from]! + w1 * re[from + 1]! + w2 * re[from + 2]! + w3 * re[from + 3]! + w4 * re[from + 4]! + w5 * re[from + 5]! + w6 * re[from + 6]! + w7 * re[from + 7]!;
    out[2 * k + 1] = w0 * im[from]! + w1 * im[from + 1]! + w2 * im[from + 2]! + w3 * im[from + 3]! + w4 * im[from + 4]! + w5 * im[from + 5]! + w6 * im[from + 6]! + w7 * im[from + 7]!;
  }
  return out;
}

/**
 * Prepares a signal for a scan.
 * Shape:  time domain, one real response.
 * Units:  those of the series, less dt; dF in cycles per unit of the axis.
 * Error:  2e-9 of what the record's ends hold; exact bins (the zoom transform) beyond 2^16 samples.
 * Fails:  never.
 * Source: Lagrange interpolation of an oversampled spectrum.
 */
export function signalSource(side: Side, dF: number, packing: Omit<Packing, 'band'>): SignalSource {
  const series = responseSeries(side, dF, packing);
  const { values, dt, order, top } = series;
  const fine = FINER * values.length <= MOST_FINE ? fineOf(series) : null;
  const samples = fine === null ? new Float64Array(2 * values.length) : null;
  if (samples !== null) for (let j = 0; j < values.length; j++) samples[2 * j] = values[j]!;
  const middle = values.length >> 1;
  return {
    from: -middle * dt,
    to: (values.length - 1 - middle) * dt,
    bins: (spacing, first, last) => {
      const count = Math.max(0, Math.min(last, Math.floor(top / spacing)) - first + 1);
      if (count === 0) return new Float64Array(0);
      const found = fine === null ? zoomTransform({ samples: samples!, firstIndex: -(values.length >> 1), theta: spacing * dt, firstBin: first, bins: count }) : readFine(fine, spacing, first, count);
      if (order > 0) for (let i = 0; i < 2 * count; i++) found[i]! *= (first + (i >> 1)) ** -order;
      return found;
    },
  };
}
