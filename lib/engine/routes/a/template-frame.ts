import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import type { Numerics } from './numerics';
import { gridFor } from './side-spectra';
import type { SpectrumStore } from './spectrum-store';

/** The padded record is this much longer than the longest lag. */
const LAG_ROOM = 1.02;
/** The same over the longest record, where far lags may be taken for one another. */
const NEAR_ROOM = 1.25;

/** Which lags bins tell apart: all of them, or all but those at which records meet with their ends alone. */
export type Reach = 'all' | 'near';

/** Lines of a table ring longer than records last: there bins that tell few lags apart err by more than the search leaves room for. */
export const reachFor = ({ points }: NoiseCurve): Reach => (points === null ? 'near' : 'all');

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
 * Bins for every pair at every factor. In bins every template stands still: a factor moves the signal and the noise.
 * Shape:  time-domain sides; factors rising.
 * Units:  Hz.
 * Error:  none of its own; with a reach of `near` two lags may add up, which `matchBounds` counts.
 * Fails:  never.
 * Source: a product over a finite lag is told apart by bins of 1/lag.
 */
export function templateFrame(signals: readonly Side[], templates: readonly Side[], factors: readonly number[], reach: Reach, store: SpectrumStore, numerics: Numerics): TemplateFrame {
  const longest = (sides: readonly Side[]): number => Math.max(...sides.map((side) => spanS(side, store)));
  const span = longest(templates);
  const other = longest(signals) / factors[0]!;
  const all = LAG_ROOM * (other + span);
  const df = fitted(reach === 'all' ? all : Math.min(all, NEAR_ROOM * Math.max(other, span)), templates[0]!, store, numerics);
  let stride = 1;
  while (2 * stride * df * span * LAG_ROOM <= 1) stride *= 2;
  return { dfHz: (factor) => df / factor, stride };
}
