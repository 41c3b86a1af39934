import type { Figure } from '../contract/measurement';
import { ENERGY_FACTOR } from './energy-on-samples';
import { powerInBlocks } from './flux-blocks';
import type { SampledRadiation } from './news-on-samples';

/** More points than a screen is wide are not seen. */
const MOST_POINTS = 1200;

/** A curve against the samples, to be drawn from the start of the integral. */
interface Curve {
  readonly label: string;
  readonly unit: string;
  readonly values: Float64Array;
}

const firstAfter = (axis: Float64Array, startM: number): number => Math.max(0, axis.findIndex((t) => t >= startM));

/**
 * The integral of a rate up to each sample, for the eye.
 * Shape:  one number a sample; zero up to the start.
 * Units:  those of the rate times M.
 * Error:  trapezoid.
 * Fails:  never.
 * Source: definition.
 */
export function runningIntegral(axis: Float64Array, startM: number, rate: Float64Array): Float64Array {
  const running = new Float64Array(axis.length);
  for (let i = firstAfter(axis, startM) + 1; i < axis.length; i++) running[i] = running[i - 1]! + ((axis[i]! - axis[i - 1]!) * (rate[i]! + rate[i - 1]!)) / 2;
  return running;
}

/**
 * A flux and what it adds up to, against time.
 * Shape:  thinned to a screen's width.
 * Units:  those of the curves; time in M.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: ours.
 */
export function fluxFigure(title: string, axis: Float64Array, startM: number, flux: Curve, running: Curve): Figure {
  const first = firstAfter(axis, startM);
  const stride = Math.max(1, Math.ceil((axis.length - first) / MOST_POINTS));
  const thinned = (values: Float64Array): number[] => Array.from(values.subarray(first)).filter((_, i, all) => i % stride === 0 || i === all.length - 1);
  const drawn = { role: 'recomputed', scale: 'linear' } as const;
  return {
    kind: 'flux',
    title,
    x: { label: 'Time', unit: 'M', scale: 'linear', values: thinned(axis) },
    series: [
      { ...drawn, label: flux.label, unit: flux.unit, axis: 'left', values: thinned(flux.values) },
      { ...drawn, label: running.label, unit: running.unit, axis: 'right', values: thinned(running.values) },
    ],
  };
}

/**
 * Flux of energy at every sample.
 * Shape:  one number a sample.
 * Units:  c⁵/G.
 * Error:  that of Ḣ.
 * Fails:  never.
 * Source: Q12.
 */
export function energyFlux({ axis, news }: SampledRadiation): Float64Array {
  return powerInBlocks(news, ENERGY_FACTOR, axis.length);
}

/** Flux and running energy against time, from the start of the integral. */
export function energyFigure(radiation: SampledRadiation, startM: number, name: string): Figure {
  const { axis } = radiation;
  const values = energyFlux(radiation);
  const running = { label: 'Radiated since the start', unit: 'M', values: runningIntegral(axis, startM, values) };
  return fluxFigure(`Energy flux of ${name} and the energy radiated since the start`, axis, startM, { label: 'Flux', unit: 'c⁵/G', values }, running);
}
