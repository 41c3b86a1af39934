import { C_KM_PER_S } from './constants';

/** Flat expansion: h0 in km/s/Mpc, omegaM the matter share; the rest is a cosmological constant. */
export interface Cosmology {
  readonly h0: number;
  readonly omegaM: number;
}

/** House default; source: Planck 2018, arXiv:1807.06209 (from memory). */
export const houseCosmology: Cosmology = { h0: 67.4, omegaM: 0.315 };

/** Eight-point Gauss–Legendre rule on [−1, 1]; source: standard table, from memory, checked by degree in the tests. */
const nodes = [0.18343464249564980494, 0.52553240991632898582, 0.79666647741362673959, 0.96028985649753623168] as const;
const shares = [0.36268378337836198297, 0.31370664587788728734, 0.22238103445337447054, 0.10122853629037625915] as const;

function gaussPanel(f: (x: number) => number, from: number, to: number): number {
  const middle = (from + to) / 2;
  const half = (to - from) / 2;
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) sum += shares[i]! * (f(middle - half * nodes[i]!) + f(middle + half * nodes[i]!));
  return half * sum;
}

/** ∫₀^z f(z') dz' on panels of equal ln(1+z'). */
function overRedshift(f: (z: number) => number, z: number): number {
  const panels = Math.max(4, Math.ceil(12 * Math.log1p(z)));
  const edge = (i: number): number => Math.expm1((Math.log1p(z) * i) / panels);
  let sum = 0;
  for (let i = 0; i < panels; i++) sum += gaussPanel(f, edge(i), edge(i + 1));
  return sum;
}

const expansion = (z: number, { omegaM }: Cosmology): number => Math.sqrt(omegaM * (1 + z) ** 3 + 1 - omegaM);

/** Comoving distance in Mpc. */
export const comovingDistanceMpc = (z: number, cosmology: Cosmology): number =>
  (C_KM_PER_S / cosmology.h0) * overRedshift((x) => 1 / expansion(x, cosmology), z);

/**
 * Luminosity distance of a flat universe.
 * Shape:  scalar in, scalar out.
 * Units:  Mpc; H₀ in km/s/Mpc; c exact.
 * Error:  relative below 1e-13 for z ≤ 100 (Gauss–Legendre panels in ln(1+z)).
 * Fails:  never for z ≥ 0.
 * Source: D_L = (1+z)(c/H₀)∫₀^z dz'/√(Ω_m(1+z')³ + 1 − Ω_m); closed form for Ω_m = 1 in the tests.
 */
export const luminosityDistanceMpc = (z: number, cosmology: Cosmology): number => (1 + z) * comovingDistanceMpc(z, cosmology);

/**
 * The redshift at a luminosity distance; bisection, because it is asked once a claim.
 * Shape:  scalar in, scalar out.
 * Units:  Mpc in, dimensionless out.
 * Error:  relative 1e-15 in 1 + z, beside that of `luminosityDistanceMpc`.
 * Fails:  never; beyond z = 10⁶ the answer stays there.
 * Source: inverse of `luminosityDistanceMpc`, which grows with z.
 */
export function redshiftAt(distanceMpc: number, cosmology: Cosmology): number {
  let low = 0;
  let high = 1;
  while (luminosityDistanceMpc(high, cosmology) < distanceMpc && high < 1e6) high *= 2;
  for (let i = 0; i < 200 && high - low > 1e-15 * high; i++) {
    const middle = (low + high) / 2;
    if (luminosityDistanceMpc(middle, cosmology) < distanceMpc) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Comoving volume out to z, each shell divided by 1 + z: what a constant rate per comoving volume and own time shows.
 * Shape:  scalar in, scalar out.
 * Units:  Mpc³.
 * Error:  as `luminosityDistanceMpc`, about 1e-12.
 * Fails:  never for z ≥ 0.
 * Source: dV_c/dz = 4π D_c² (c/H₀)/E(z) for a flat universe.
 */
export const timeDilatedVolumeMpc3 = (z: number, cosmology: Cosmology): number =>
  overRedshift(
    (x) => (4 * Math.PI * comovingDistanceMpc(x, cosmology) ** 2 * (C_KM_PER_S / cosmology.h0)) / expansion(x, cosmology) / (1 + x),
    z,
  );
