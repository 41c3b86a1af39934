import type { Mode } from '../contract/waveform';
import { derivativesAtSamples } from '../radiation/local-calculus';
import type { Modes } from './effects';

const POINTS = 9;

/**
 * ψ₄ of a synthesised strain: its second time derivative, by local polynomials through nine samples.
 * Shape:  same axis and modes.
 * Units:  r·M·ψ₄ against t/M.
 * Error:  of the differences; the model has small steps in its second derivative where its pieces join.
 * Fails:  never for nine samples or more.
 * Source: ψ₄ = d²H/dt² in the house convention.
 */
export function curvatureOf<T extends Modes>(wave: T): T {
  const slopesOf = (mode: Mode): Mode => {
    const { slopes } = derivativesAtSamples(wave.t, [mode.re, mode.im], POINTS, true);
    return { ...mode, re: slopes[0]!, im: slopes[1]! };
  };
  return { ...wave, modes: wave.modes.map((mode) => slopesOf(slopesOf(mode))) };
}

/** ∫Σ|X|² dt by the trapezoid: enough to fix a factor. */
function squaredNorm({ t, modes }: Modes): number {
  let sum = 0;
  for (const { re, im } of modes) for (let i = 1; i < t.length; i++) sum += ((t[i]! - t[i - 1]!) * (re[i]! ** 2 + im[i]! ** 2 + re[i - 1]! ** 2 + im[i - 1]! ** 2)) / 2;
  return sum;
}

/** E_EM/M over B̂²: what 10⁻¹⁵ at 10⁸ M☉ and 10⁴ G comes to. */
export const TWIN_ENERGY = 0.56;

/**
 * Modes of φ₂ that mirror those of ψ₄: rφ₂ = κB̂·rψ₄, κ fixed by the energy that is emitted (symmetric tetrad).
 * Shape:  same axis and modes.
 * Units:  rφ₂ with B̂ in it.
 * Error:  that of the trapezoid in κ.
 * Fails:  never.
 * Source: domain reference, section 7, synthesis details; energy from Mösta et al. 2010, arXiv:0912.2330.
 */
export function mirroredField<T extends Modes>(curvature: T, fieldHat: number): T {
  const factor = fieldHat * Math.sqrt((4 * Math.PI * TWIN_ENERGY) / squaredNorm(curvature));
  const scaled = (values: Float64Array): Float64Array => values.map((x) => factor * x);
  return { ...curvature, modes: curvature.modes.map((mode) => ({ ...mode, re: scaled(mode.re), im: scaled(mode.im) })) };
}

/**
 * A stationary background under every mode: a constant of so large a share of the loudest peak.
 * Shape:  same axis and modes.
 * Units:  those of the modes.
 * Error:  none, closed form.
 * Fails:  never.
 * Source: domain reference, section 7, synthesis details (C51).
 */
export function withPlateau<T extends Modes>(wave: T, share: number): T {
  let top = 0;
  for (const { re, im } of wave.modes) for (let i = 0; i < re.length; i++) top = Math.max(top, Math.hypot(re[i]!, im[i]!));
  return { ...wave, modes: wave.modes.map((mode) => ({ ...mode, re: mode.re.map((x) => x + share * top) })) };
}
