import type { Figure } from '../contract/measurement';
import { ENERGY_FACTOR, energyOnSamples } from './energy-on-samples';
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

/** More lines than this are not told apart. */
const MOST_MODES = 5;

/**
 * What each mode carries away at every time, the loudest first.
 * Shape:  at most five modes; none where there is only one.
 * Units:  M and c⁵/G.
 * Error:  for eyes alone.
 * Fails:  never; a rate of nothing has no place on the axis and is null.
 * Source: Q12.
 */
export function modesFigure(radiation: SampledRadiation, startM: number, name: string): Figure[] {
  const { axis, news } = radiation;
  const ranked = energyOnSamples(radiation, startM).map((mode, i) => ({ ...mode, i })).filter(({ energy }) => energy > 0).sort((p, q) => q.energy - p.energy).slice(0, MOST_MODES);
  if (ranked.length < 2) return [];
  const first = firstAfter(axis, startM);
  const stride = Math.max(1, Math.ceil((axis.length - first) / MOST_POINTS));
  const picked = Array.from({ length: axis.length - first }, (_, k) => first + k).filter((i, k) => k % stride === 0 || i === axis.length - 1);
  const rate = (k: number, i: number): number | null => {
    const power = ENERGY_FACTOR * (news[k]!.re[i]! ** 2 + news[k]!.im[i]! ** 2);
    return power > 0 && Number.isFinite(power) ? power : null;
  };
  return [
    {
      kind: 'flux',
      title: `Energy flux of ${name}, mode by mode`,
      x: { label: 'Time', unit: 'M', scale: 'linear', values: picked.map((i) => axis[i]!) },
      series: ranked.map(({ l, m, i: k }) => ({ label: `(${l},${m < 0 ? `−${-m}` : m}): flux`, unit: 'c⁵/G', role: 'recomputed', axis: 'left', scale: 'log', values: picked.map((i) => rate(k, i)) })),
    },
  ];
}
