import type { Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import type { Numerics } from './numerics';
import { gridFor } from './side-spectra';
import type { SpectrumStore } from './spectrum-store';

/**
 * Bins for many pairs at many masses. A factor on the template's mass stretches one side against the other, so the spectra of
 * one of them can stand on bins that never change: whichever is more numerous is held, the other is transformed once a factor.
 */
export interface TemplateFrame {
  readonly held: 'signals' | 'templates';
  /** Spacing of the bins at a factor on the templates' mass. */
  readonly dfHz: (factor: number) => number;
}

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

/**
 * Chooses what is held and how fine the bins are, so that no lag of any pair at any factor is taken for another.
 * Shape:  time-domain sides; factors rising.
 * Units:  Hz.
 * Error:  none of its own.
 * Fails:  never.
 * Source: a product over a finite lag is told apart by bins of 1/lag.
 */
export function templateFrame(signals: readonly Side[], templates: readonly Side[], factors: readonly number[], store: SpectrumStore, numerics: Numerics): TemplateFrame {
  const longest = (sides: readonly Side[]): number => Math.max(...sides.map((side) => spanS(side, store)));
  const [a, b] = [longest(signals), longest(templates)];
  const [least, most] = [factors[0]!, factors[factors.length - 1]!];
  if (signals.length > templates.length) {
    const df = fitted(LAG_ROOM * (a + b * most), signals[0]!, store, numerics);
    return { held: 'signals', dfHz: () => df };
  }
  const df = fitted(LAG_ROOM * (a / least + b), templates[0]!, store, numerics);
  return { held: 'templates', dfHz: (factor) => df / factor };
}
