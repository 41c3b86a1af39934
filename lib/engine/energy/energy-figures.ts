import type { Figure } from '../contract/measurement';
import { ENERGY_FACTOR } from './energy-on-samples';
import type { Fluxes } from './flux-on-samples';

/** More points than a screen is wide are not seen. */
const MOST_POINTS = 1200;

/** Flux and running energy against time, from the start of the integral. */
export function energyFigure(fluxes: Fluxes, startM: number, name: string): Figure {
  const { axis, perMode } = fluxes;
  const first = Math.max(0, axis.findIndex((t) => t >= startM));
  const stride = Math.max(1, Math.ceil((axis.length - first) / MOST_POINTS));
  const times: number[] = [];
  const flux: number[] = [];
  const running: number[] = [];
  let energy = 0;
  let before = 0;
  for (let i = first; i < axis.length; i++) {
    let here = 0;
    for (const { power } of perMode) here += ENERGY_FACTOR * power[i]!;
    if (i > first) energy += ((axis[i]! - axis[i - 1]!) * (here + before)) / 2;
    before = here;
    if ((i - first) % stride !== 0 && i !== axis.length - 1) continue;
    times.push(axis[i]!);
    flux.push(here);
    running.push(energy);
  }
  return {
    kind: 'flux',
    title: `Energy flux of ${name} and the energy radiated since the start`,
    x: { label: 'Time', unit: 'M', scale: 'linear', values: times },
    series: [
      { label: 'Flux', unit: 'c⁵/G', role: 'recomputed', axis: 'left', scale: 'linear', values: flux },
      { label: 'Radiated since the start', unit: 'M', role: 'recomputed', axis: 'right', scale: 'linear', values: running },
    ],
  };
}
