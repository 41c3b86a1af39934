import type { Finding } from '../contract/finding';
import type { BinaryFacts } from '../contract/waveform';

/** V24: so many standard uncertainties of what is radiated. */
const MANY = 5;
/** Truncation and extraction cannot be seen in one file: no energy of a simulation is known better than this. */
const LEAST_U = 2e-4;

const digits = (x: number): string => x.toFixed(4);

/** How far a balance may be off before it is worth a look, for a standard uncertainty of the computation. */
export const balanceMargin = (u: number): number => MANY * Math.max(u, LEAST_U);

/**
 * V24: initial energy less radiated energy less remnant mass, as far as the sheet states them.
 * Shape:  a list of one finding, or empty.
 * Units:  M.
 * Error:  thresholds only.
 * Fails:  never; silent where either is not stated.
 * Source: domain reference 4.3, V24; settings.md section 8.
 */
export function energyBalance({ admEnergy, remnantMass }: BinaryFacts, radiated: number, u: number, where: string): Finding[] {
  if (admEnergy === undefined || remnantMass === undefined) return [];
  const left = admEnergy - radiated - remnantMass;
  if (!(Math.abs(left) > balanceMargin(u))) return [];
  return [{
    code: 'engine/energy-balance', level: 'worth-a-look', where,
    text: `Initial minus radiated minus remnant leaves ${digits(left)} M unaccounted in ${where}: ${digits(admEnergy)} − ${digits(radiated)} − ${digits(remnantMass)}.`,
    fix: left > 0 ? 'Check whether the record begins with the initial data and holds every mode, and whether both masses are in units of M.' : 'Check whether both masses are in units of M, and whether energy was counted that was radiated before the initial data.',
  }];
}

/**
 * A stated initial energy belongs to the initial data: a record that begins later leaves energy out of the balance.
 * Shape:  a list of one finding, or empty.
 * Units:  M.
 * Error:  thresholds only; the orbit's energy is post-Newtonian.
 * Fails:  never.
 * Source: settings.md section 5 (`balance-adm`).
 */
export function lateRecord(admEnergy: number, atStart: number, startM: number, where: string): Finding[] {
  const missing = admEnergy - atStart;
  if (!(missing > balanceMargin(0))) return [];
  return [{
    code: 'engine/energy-balance', level: 'worth-a-look', where,
    text: `The initial energy of ${where} is stated as ${digits(admEnergy)} M, but at t = ${Number(startM.toPrecision(6))} M its orbit holds ${digits(atStart)} M by the post-Newtonian series. About ${digits(missing)} M left before that and is not in the balance.`,
    fix: 'Supply the record from its initial data on, or declare method: balance-pn.',
  }];
}
