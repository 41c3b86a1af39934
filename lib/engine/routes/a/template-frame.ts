import type { Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import type { Numerics } from './numerics';
import { gridFor } from './side-spectra';
import type { SpectrumStore } from './spectrum-store';

/** The padded record is this much longer than the longest lag. */
const LAG_ROOM = 1.02;

const spanS = (side: Side, store: SpectrumStore): number => store.time(side.waveform).span * side.secondsPerUnit;

/** Samples used as they stand transform fastest when their padded length is a power of two. */
function fitted(period: number, side: Side, store: SpectrumStore, numerics: Numerics): number {
  const grid = gridFor(side, store, numerics, side.secondsPerUnit / period);
  if (grid.stride === null) return 1 / period;
  const step = grid.dt * side.secondsPerUnit;
  return 1 / (step * powerOfTwoFrom(Math.ceil(period / step - 1e-9)));
}

export interface TemplateFrame {
  /** Width of a bin at a factor on the templates' mass. */
  readonly dfHz: (factor: number) => number;
  /** A power of two; every so-manieth bin alone still tells apart the record of any template. */
  readonly stride: number;
}

/**
 * Bins so fine that no lag of any pair at any factor is taken for another. In bins every template stands still: a factor moves
 * the signal and the noise.
 * Shape:  time-domain sides; factors rising.
 * Units:  Hz.
 * Error:  none of its own.
 * Fails:  never.
 * Source: a product over a finite lag is told apart by bins of 1/lag.
 */
export function templateFrame(signals: readonly Side[], templates: readonly Side[], factors: readonly number[], store: SpectrumStore, numerics: Numerics): TemplateFrame {
  const longest = (sides: readonly Side[]): number => Math.max(...sides.map((side) => spanS(side, store)));
  const span = longest(templates);
  const df = fitted(LAG_ROOM * (longest(signals) / factors[0]! + span), templates[0]!, store, numerics);
  let stride = 1;
  while (2 * stride * df * span * LAG_ROOM <= 1) stride *= 2;
  return { dfHz: (factor) => df / factor, stride };
}
