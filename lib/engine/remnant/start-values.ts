import type { BinaryFacts } from '../contract/waveform';
import { relativeSlip } from '../radiation/input-rounding';
import type { RadiationRecord } from '../radiation/radiation-record';
import { startFrequency } from '../radiation/start-frequency';
import { binaryOf, type BinaryParameters } from '../synthesis/binary';
import { polynomial } from './polynomial';

/** What was there at the start: mass in M, angular momentum along z in M². */
export interface StartValues {
  readonly mass: number;
  readonly momentum: number;
}

/** Powers of x in E_b and J that are kept. */
export type Order = 1 | 2;

/**
 * Mass and angular momentum of a circular orbit.
 * Shape:  one binary at x = (MΩ)^{2/3}.
 * Units:  M and M².
 * Error:  post-Newtonian truncation; spin–orbit terms are left out, as the definition does.
 * Fails:  never.
 * Source: domain reference, Q12 and Q16 [from memory there].
 */
export function postNewtonianStart(binary: BinaryParameters, x: number, order: Order = 2): StartValues {
  const { eta, m1, m2, chi1z, chi2z } = binaryOf(binary);
  const inEnergy = [1, -(9 + eta) / 12, -(81 - 57 * eta + eta * eta) / 24].slice(0, order + 1);
  const inMomentum = [1, 3 / 2 + eta / 6, 27 / 8 - (19 * eta) / 8 + (eta * eta) / 24].slice(0, order + 1);
  const own = m1 * m1 * chi1z + m2 * m2 * chi2z;
  return { mass: 1 - ((eta * x) / 2) * polynomial(x, inEnergy), momentum: (eta / Math.sqrt(x)) * polynomial(x, inMomentum) + own };
}

/**
 * x = (Mω₂₂/2)^{2/3} at startM.
 * Shape:  one number.
 * Units:  startM in M.
 * Error:  as startFrequency.
 * Fails:  null where no frequency can be read.
 * Source: settings.md section 5 (`balance-pn`).
 */
export function startX(record: RadiationRecord, startM: number, route: 'A' | 'B'): number | null {
  const omega = startFrequency(record, startM, route);
  return omega === null ? null : Math.cbrt(omega / 2) ** 2;
}

/** Start values as the sheet states them; null where it does not. */
export const statedStart = ({ admEnergy, admAngularMomentum }: BinaryFacts): StartValues | null =>
  admEnergy === undefined ? null : { mass: admEnergy, momentum: admAngularMomentum ?? Number.NaN };

/**
 * What the printed digits do to x: the slope at the edge of a parabola fitted to n phases over T scatters by σ√(192/n)/T.
 * Shape:  a relative standard uncertainty.
 * Units:  relative.
 * Error:  an estimate, for phases spread evenly over two cycles.
 * Fails:  never; zero for binary doubles.
 * Source: least squares of a parabola, variance at its edge (common practice).
 */
export function roundingOfX(record: RadiationRecord, startM: number, omega: number, digits: number | null): number {
  if (digits === null) return 0;
  const { axis } = record;
  const twoCycles = (4 * Math.PI) / omega;
  const n = axis.filter((t) => t >= startM && t <= startM + twoCycles).length;
  const slope = (relativeSlip(digits) * Math.sqrt(192 / Math.max(n, 3))) / twoCycles;
  return ((2 / 3) * slope) / omega;
}
