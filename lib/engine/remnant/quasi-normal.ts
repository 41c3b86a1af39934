/** Modes of the table, as (ℓ, m) run together. */
export const tabulatedModes = ['22', '21', '33', '32', '44'] as const;
export type TabulatedMode = (typeof tabulatedModes)[number];

/** The table ends at 0 and 0.95; so far beyond it the interpolation is still good to 2e-4. */
export const TABULATED_SPINS = [-0.2, 0.97] as const;

const spins = [0, 0.1, 0.3, 0.5, 0.6, 0.7, 0.8, 0.9, 0.95] as const;

/** Mω_R and Mω_I of the n = 0 modes at each spin, M the remnant's mass. */
const table: Record<TabulatedMode, { readonly real: readonly number[]; readonly imag: readonly number[] }> = {
  22: {
    real: [0.37367, 0.38702, 0.41953, 0.46412, 0.49404, 0.5326, 0.58602, 0.67161, 0.74632],
    imag: [0.08896, 0.08871, 0.08773, 0.08564, 0.08377, 0.08079, 0.07563, 0.06487, 0.05315],
  },
  21: {
    real: [0.37367, 0.38043, 0.39733, 0.42063, 0.43597, 0.45512, 0.48023, 0.51629, 0.54269],
    imag: [0.08896, 0.0888, 0.088, 0.08617, 0.08456, 0.08209, 0.07795, 0.0698, 0.06137],
  },
  33: {
    real: [0.59944, 0.6208, 0.67209, 0.74092, 0.78622, 0.84369, 0.92188, 1.04464, 1.14998],
    imag: [0.0927, 0.09243, 0.09127, 0.08868, 0.08638, 0.08286, 0.077, 0.06546, 0.05339],
  },
  32: {
    real: [0.59944, 0.6137, 0.64796, 0.69344, 0.7228, 0.75917, 0.80678, 0.87618, 0.92937],
    imag: [0.0927, 0.0925, 0.09152, 0.08928, 0.08728, 0.08419, 0.07905, 0.0689, 0.05827],
  },
  44: {
    real: [0.80918, 0.83866, 0.90924, 1.0034, 1.06498, 1.14265, 1.24755, 1.41042, 1.54862],
    imag: [0.09416, 0.09395, 0.09286, 0.09027, 0.08791, 0.08424, 0.07813, 0.06616, 0.05376],
  },
};

/** Frequencies bend sharply towards spin 1; in the cube root of 1 − χ six points follow them to the table's own rounding. */
const abscissa = (spin: number): number => Math.cbrt(1 - spin);
const abscissae = spins.map(abscissa);
const POINTS = 6;

function interpolated(spin: number, values: readonly number[]): number {
  const x = abscissa(spin);
  const above = spins.findIndex((known) => known > spin);
  const first = Math.min(Math.max((above < 0 ? spins.length : above) - POINTS / 2, 0), spins.length - POINTS);
  let sum = 0;
  for (let i = first; i < first + POINTS; i++) {
    let weight = values[i]!;
    for (let j = first; j < first + POINTS; j++) if (j !== i) weight *= (x - abscissae[j]!) / (abscissae[i]! - abscissae[j]!);
    sum += weight;
  }
  return sum;
}

export interface QuasiNormal {
  readonly real: number;
  readonly imag: number;
}

/**
 * Kerr quasi-normal frequency of the fundamental tone, interpolated in a table.
 * Shape:  one mode, one spin; returns two scalars.
 * Units:  Mω, M the mass of the hole; imag > 0 is the decay rate.
 * Error:  1.5e-5 for spins from 0 to 0.95, of which the table's five decimals are 5e-6; 2e-4 beyond, from −0.2 to 0.97.
 * Fails:  spins outside TABULATED_SPINS throw: the table does not reach there.
 * Source: domain reference, appendix D, computed by continued fractions (Leaver 1985); χ = 0 is the textbook value.
 */
export function tabulatedQuasiNormal(mode: TabulatedMode, spin: number): QuasiNormal {
  if (!(spin >= TABULATED_SPINS[0] && spin <= TABULATED_SPINS[1])) throw new RangeError(`no quasi-normal frequency tabulated at spin ${spin}`);
  return { real: interpolated(spin, table[mode].real), imag: interpolated(spin, table[mode].imag) };
}

/** ω_R = f1 + f2(1−χ)^f3 and quality Q = q1 + q2(1−χ)^q3. */
const fits: Partial<Record<TabulatedMode, readonly [f1: number, f2: number, f3: number, q1: number, q2: number, q3: number]>> = {
  22: [1.5251, -1.1568, 0.1292, 0.7, 1.4187, -0.499],
  21: [0.6, -0.2339, 0.4175, -0.3, 2.3561, -0.2277],
  33: [1.8956, -1.3043, 0.1818, 0.9, 2.343, -0.481],
  44: [2.3, -1.5056, 0.2244, 1.1929, 3.1191, -0.4825],
};

/**
 * The same by published fits, with the table for (3,2), which has none here.
 * Shape:  one mode, one spin; returns two scalars.
 * Units:  as `tabulatedQuasiNormal`.
 * Error:  within 2.3 % of the table.
 * Fails:  as `tabulatedQuasiNormal` for (3,2).
 * Source: Berti, Cardoso & Will 2006, gr-qc/0512160; (2,2) read in public source text, the others from memory.
 */
export function fittedQuasiNormal(mode: TabulatedMode, spin: number): QuasiNormal {
  const fit = fits[mode];
  if (!fit) return tabulatedQuasiNormal(mode, spin);
  const [f1, f2, f3, q1, q2, q3] = fit;
  const real = f1 + f2 * (1 - spin) ** f3;
  return { real, imag: real / (2 * (q1 + q2 * (1 - spin) ** q3)) };
}
