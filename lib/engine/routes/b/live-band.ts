import type { UniformPair } from './block-fourier';
import { pairTransform } from './block-fourier';

/** Share of the noise-weighted power that may be left above the live band. */
const NEGLIGIBLE = 1e-13;
const SIXTEENTH = [1, -16, 120, -560, 1820, -4368, 8008, -11440, 12870, -11440, 8008, -4368, 1820, -560, 120, -16, 1];
const STRIDES = [1, 2, 3, 4, 6, 8, 12, 16, 24, 32, 48, 64, 96, 128];

function differencePower(values: Float64Array, stride: number): number {
  const n = values.length;
  let power = 0;
  for (let i = -8 * stride; i < n + 8 * stride; i++) {
    let sum = 0;
    for (let k = 0; k <= 16; k++) {
      const j = i + (k - 8) * stride;
      if (j >= 0 && j < n) sum += SIXTEENTH[k]! * values[j]!;
    }
    power += sum * sum;
  }
  return power;
}

const ladder = (low: number, high: number, n: number): Float64Array =>
  Float64Array.from({ length: n }, (_, i) => low * (high / low) ** (i / (n - 1)));

/** A rough ∫|z̃|²/(f^2p S) from 256 plain sums: only its order of magnitude is used. */
function roughPower(pair: UniformPair, psd: (f: number) => number, order: number, low: number, high: number): number {
  const f = ladder(low, high, 256);
  const { xRe, xIm, yRe, yIm } = pairTransform(pair, f);
  let sum = 0;
  for (let i = 1; i < f.length; i++) {
    const power = xRe[i]! ** 2 + xIm[i]! ** 2 + yRe[i]! ** 2 + yIm[i]! ** 2;
    sum += ((f[i]! - f[i - 1]!) * power) / ((2 * Math.PI * f[i]!) ** (2 * order) * psd(f[i]!));
  }
  return sum;
}

/**
 * Where a record's content (its line of sight, or all its modes together) ends, so that no sum is spent on empty frequencies. Above f the power is
 * bounded by that of the series' 16th difference (Parseval, zero outside the record): no narrow line
 * can hide from it, as it could from a probe.
 * Shape:  pairs share one step; returns a frequency in (low, high].
 * Units:  those of 1/step; psd in the same frequency unit.
 * Error:  at most 1e-13 of the weighted power lies above.
 * Fails:  never; content that does not end keeps the whole band.
 * Source: our derivation.
 */
export function liveHigh(pairs: readonly UniformPair[], psd: (f: number) => number, order: number, low: number, high: number): number {
  const total = pairs.reduce((sum, pair) => sum + roughPower(pair, psd, order, low, high), 0);
  const step = pairs[0]?.step ?? 1;
  let above = 0;
  let live = high;
  for (const stride of STRIDES) {
    const from = 1 / (3 * stride * step);
    if (from <= low) break;
    if (from >= high) continue;
    const quietest = Math.min(...ladder(from, Math.min(2 * from, high), 48).map(psd));
    for (const pair of pairs) {
      const power = ((differencePower(pair.x, stride) + differencePower(pair.y, stride)) * step) / 3 ** 16;
      above += power / ((2 * Math.PI * from) ** (2 * order) * quietest);
    }
    if (!(above <= NEGLIGIBLE * total)) break;
    live = from;
  }
  return live;
}
