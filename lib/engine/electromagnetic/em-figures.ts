import type { Figure } from '../contract/measurement';
import { LUMINOSITY_ERG_PER_S } from '../units/constants';
import { energyFlux, fluxFigure, runningIntegral } from '../radiation/flux-figure';
import type { SampledRadiation } from '../radiation/news-on-samples';
import { peakOnSamples } from '../radiation/flux-peak';
import type { EmPoint } from './em-point';

/** More points than a screen is wide are not seen. */
const MOST_POINTS = 1200;

/** L of a point in c⁵/G at every sample. */
export const luminosityOf = ({ source, scale }: EmPoint): Float64Array => energyFlux(source.radiation).map((flux) => scale.factor * source.overFlux * flux);

/** Largest L in erg/s, from the start on; null where the number is per field. */
export const peakErgPerS = ({ source, scale }: EmPoint): number | null =>
  scale.perField ? null : scale.factor * source.overFlux * peakOnSamples(source.radiation, source.startM, 8).flux * LUMINOSITY_ERG_PER_S;

/** Luminosity and what was emitted since the start, against time. */
export function emEnergyFigure(point: EmPoint): Figure {
  const { radiation, startM, waveform } = point.source;
  const values = luminosityOf(point);
  const running = runningIntegral(radiation.axis, startM, values);
  const per = point.scale.perField;
  return fluxFigure(`Electromagnetic luminosity of ${waveform.name} and what was emitted since the start`, radiation.axis, startM, { label: 'Emitted luminosity', unit: per ? 'c⁵/G over B̂²' : 'c⁵/G', values }, { label: 'Emitted since the start', unit: per ? 'M B̂²' : 'M', values: running });
}

/** Value of a curve on another axis, linearly, for the eye; null outside. */
function readAt(axis: Float64Array, values: Float64Array, t: number): number | null {
  const after = axis.findIndex((x) => x >= t);
  if (after < 0 || (after === 0 && axis[0] !== t)) return null;
  if (axis[after] === t) return values[after]!;
  const share = (t - axis[after - 1]!) / (axis[after]! - axis[after - 1]!);
  return values[after - 1]! + share * (values[after]! - values[after - 1]!);
}

const positive = (value: number | null): number | null => (value !== null && value > 0 ? value : null);

/**
 * Both fluxes, each over its own peak, on the times that the files share.
 * Shape:  thinned to a screen's width, on the samples of φ₂.
 * Units:  M; shares of each peak.
 * Error:  for eyes alone: linear between samples.
 * Fails:  never.
 * Source: ours.
 */
export function bothFluxesFigure(em: EmPoint, gw: SampledRadiation, names: readonly [em: string, gw: string]): Figure {
  const { axis } = em.source.radiation;
  const [light, waves] = [luminosityOf(em), energyFlux(gw)];
  const [topEm, topGw] = [light.reduce((a, b) => Math.max(a, b), 0), waves.reduce((a, b) => Math.max(a, b), 0)];
  const stride = Math.max(1, Math.ceil(axis.length / MOST_POINTS));
  const picked = Array.from(axis.keys()).filter((i) => i % stride === 0 && axis[i]! >= em.source.startM);
  const drawn = { quantity: 'power', unit: 'of its peak', axis: 'left', scale: 'log' } as const;
  return {
    kind: 'waveforms',
    title: `Electromagnetic waves of ${names[0]} and gravitational ones of ${names[1]}, each over its peak`,
    x: { label: 'Time', unit: 'M', scale: 'linear', values: picked.map((i) => axis[i]!) },
    series: [
      { ...drawn, label: 'Gravitational', role: 'claimed', values: picked.map((i) => positive(readAt(gw.axis, waves, axis[i]!))).map((v) => (v === null ? null : v / topGw)) },
      { ...drawn, label: 'Electromagnetic', role: 'recomputed', values: picked.map((i) => positive(light[i]!)).map((v) => (v === null ? null : v / topEm)) },
    ],
  };
}
