import type { Waveform } from '@/lib/engine/contract/waveform';
import { C_M_PER_S, MPC_M, MSUN_S } from '@/lib/engine/units/constants';
import { frequencySide } from './signals';

/** Post-Newtonian binaries in the stationary-phase approximation, at 1 Mpc, optimally placed. */
export const lastStableOrbitHz = (totalMsun: number): number => 1 / (6 ** 1.5 * Math.PI * totalMsun * MSUN_S);
export const chirpMassS = (m1: number, m2: number): number => ((m1 * m2) ** 0.6 / (m1 + m2) ** 0.2) * MSUN_S;

const stationaryAmplitude = (mcS: number): number => (Math.sqrt(5 / 24) * Math.PI ** (-2 / 3) * mcS ** (5 / 6) * C_M_PER_S) / MPC_M;

export function chirp(mcS: number, ownMassMsun: number, fromHz: number, toHz: number, n: number, phase: (f: number) => number): Waveform {
  const a = stationaryAmplitude(mcS);
  const { waveform } = frequencySide(fromHz, toHz, n, (f) => {
    const size = a * f ** (-7 / 6);
    return { plus: size * Math.cos(phase(f)), plusIm: size * Math.sin(phase(f)), cross: 0, crossIm: 0 };
  });
  const content = waveform.content.kind === 'line-of-sight' ? { ...waveform.content, cross: null, crossIm: null } : waveform.content;
  return { ...waveform, content, ownTotalMassMsun: ownMassMsun, ownDistanceMpc: 1 };
}

/** |h̃| of 1.4 + 1.4 M☉ at 1 Mpc and a frequency. */
export const neutronStarsAt = (f: number): number => stationaryAmplitude(chirpMassS(1.4, 1.4)) * f ** (-7 / 6);
export const neutronStars = (fLowHz: number): Waveform => chirp(chirpMassS(1.4, 1.4), 2.8, fLowHz / 1.5, 2400, 3000, () => 0);
/** Horizon over range, averaged over sky and orientation (B4). */
export const horizonOverRange = 2.2648;
