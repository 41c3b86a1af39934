import { readBins, realTransform } from '@/lib/engine/fourier/real-transform';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import { zoomTransform } from '@/lib/engine/fourier/zoom-transform';

/** The spectrum of a real series on bins of one width, read where asked. */
export interface SeriesBins {
  /** No bin above it can be read. */
  readonly last: number;
  /** n bins from `first` on, `step` apart. */
  readonly read: (first: number, step: number, n: number, re: Float64Array, im: Float64Array) => void;
}

interface Clock {
  readonly dt: number;
  /** The sample at time 0. */
  readonly origin: number;
}

const LEAST_SIZE = 4;

/** Size of the transform whose bins are exactly dF wide, or 0. */
function sizeFor(n: number, theta: number): number {
  const size = powerOfTwoFrom(Math.max(LEAST_SIZE, Math.round(1 / theta)));
  return Math.abs(size * theta - 1) < 1e-12 && size >= n ? size : 0;
}

function zoomedBins(series: Float64Array, origin: number, theta: number, first: number, bins: number): SeriesBins {
  const samples = new Float64Array(2 * series.length);
  for (let j = 0; j < series.length; j++) samples[2 * j] = series[j]!;
  const found = zoomTransform({ samples, firstIndex: -origin, theta, firstBin: first, bins });
  const read: SeriesBins['read'] = (from, step, n, re, im) => {
    for (let i = 0, at = 2 * (from - first); i < n; i++, at += 2 * step) {
      re[i] = found[at]!;
      im[i] = found[at + 1]!;
    }
  };
  return { last: first + bins - 1, read };
}

/**
 * The spectrum of one real series.
 * Shape:  bins from `first` > 0 on, `bins` of them, are asked for; readable until the next series of the same length is transformed.
 * Units:  sums, not integrals; dF in cycles per unit of dt.
 * Error:  rounding.
 * Fails:  never; bins that no power of two fits go through the zoom transform.
 * Source: definition.
 */
export function seriesBins(series: Float64Array, { dt, origin }: Clock, dF: number, first: number, bins: number): SeriesBins {
  const size = sizeFor(series.length, dF * dt);
  if (size === 0) return zoomedBins(series, origin, dF * dt, first, bins);
  const transform = realTransform(series, origin, size);
  return { last: Math.min(first + bins, size / 2) - 1, read: (from, step, n, re, im) => { readBins(transform, from, step, n, re, im); } };
}
