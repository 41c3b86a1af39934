import type { RingdownLine } from '../ringdown/line-on-samples';
import { TABULATED_SPINS, tabulatedQuasiNormal, type TabulatedMode } from './quasi-normal';

/** A hole that rings so. */
export interface Kerr {
  /** In M. */
  readonly mass: number;
  readonly spin: number;
}

/** ω_R/ω_I rises with the spin and knows nothing of the mass. */
const sharpness = (mode: TabulatedMode, spin: number): number => {
  const { real, imag } = tabulatedQuasiNormal(mode, spin);
  return real / imag;
};

const PASSES = 60;

function byBisection(mode: TabulatedMode, wanted: number): number {
  let [low, high]: [number, number] = [...TABULATED_SPINS];
  for (let pass = 0; pass < PASSES; pass++) {
    const middle = (low + high) / 2;
    if (sharpness(mode, middle) < wanted) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Secants on ln(ω_R/ω_I), which is nearly straight in ln(1 − χ); kept inside the table. */
function bySecants(mode: TabulatedMode, wanted: number): number {
  const inside = (y: number): number => Math.min(Math.max(y, Math.log(1 - TABULATED_SPINS[1])), Math.log(1 - TABULATED_SPINS[0]));
  const off = (y: number): number => Math.log(sharpness(mode, Math.min(1 - Math.exp(y), TABULATED_SPINS[1])) / wanted);
  let [before, here] = [Math.log(0.5), Math.log(0.3)];
  let [offBefore, offHere] = [off(before), off(here)];
  for (let pass = 0; pass < PASSES && offHere !== offBefore && Math.abs(here - before) > 1e-15; pass++) {
    const next = inside(here - (offHere * (here - before)) / (offHere - offBefore));
    [before, offBefore] = [here, offHere];
    [here, offHere] = [next, off(next)];
  }
  return 1 - Math.exp(here);
}

/**
 * Mass and spin of the hole whose fundamental tone this is: spin from ω_R/ω_I, mass from ω_R.
 * Shape:  one line of one tabulated mode.
 * Units:  rates in 1/M; mass in M.
 * Error:  that of the table: 5e-5 in mass; 4e-5 in spin from 0.4 to 0.95, 2e-4 below.
 * Fails:  null where the table holds no such ratio.
 * Source: Q18 inverted; domain reference, Q16 (route B there) and appendix D.
 */
export function kerrFromTone(mode: TabulatedMode, { omega, gamma }: RingdownLine, route: 'A' | 'B'): Kerr | null {
  const wanted = Math.abs(omega) / gamma;
  const [least, most] = TABULATED_SPINS.map((spin) => sharpness(mode, spin)) as [number, number];
  if (!(wanted >= least && wanted <= most)) return null;
  const spin = route === 'A' ? byBisection(mode, wanted) : bySecants(mode, wanted);
  return { spin, mass: tabulatedQuasiNormal(mode, spin).real / Math.abs(omega) };
}
