/**
 * Published one-sided noise power densities S(f) as they stand in their sources, f in Hz, S in 1/Hz.
 * Kept apart from the catalogue so that a coefficient can be compared with its source in one look.
 */

/** Domain reference, appendix E, curve G2. */
export function secondGenerationDesign(fHz: number): number {
  const x = fHz / 245.4;
  const q = Math.sqrt(Math.sqrt(x));
  const x34 = q * q * q;
  return 1e-48 * (0.0152 / (x * x * x * x) + 0.2935 * x * x * q + 2.7951 * x34 * x34 - 6.508 * x34 + 17.7622);
}

/** Appendix E, curve G1. */
export function firstGenerationRequirement(fHz: number): number {
  const seismic = 1.57271 ** 2 * fHz ** -28;
  const thermal = 3.80591e-19 ** 2 * fHz ** -4;
  const shot = 1.12277e-23 ** 2 * (1 + (fHz / 89.3676) ** 2);
  return seismic + thermal + shot;
}

/** Appendix E, curve G1b. */
export function firstGenerationSecondSite(fHz: number): number {
  const x = fHz / 500;
  return 1.02e-45 * ((7.87 * x) ** -4.8 + 6 / (17 * x) + 1 + x * x);
}

/** Curve A1 of the catalogue, where sources and ranges stand; A2, A3 and A4 follow. */
export function firstGenerationFit(fHz: number): number {
  const x = fHz / 150;
  return 9e-46 * ((4.49 * x) ** -56 + 0.16 * x ** -4.52 + 0.52 + 0.32 * x * x);
}

export function secondGenerationFit(fHz: number): number {
  const x = fHz / 215;
  const x2 = x * x;
  return 1e-49 * (x ** -4.14 - 5 / x2 + (111 * (1 - x2 + (x2 * x2) / 2)) / (1 + x2 / 2));
}

/** Given as an amplitude in ln f, hence the square. */
export function secondGenerationThirdSite(fHz: number): number {
  const x = Math.log(fHz / 300);
  const term = (a: number, b: number, c: number, d: number) => a * Math.exp(b + c * x + d * x * x);
  const asd =
    1.259e-24 *
    (term(0.07, -0.142, -1.437, 0.407) +
      term(3.1, -0.466, -1.043, -0.548) +
      term(0.4, -0.304, 2.896, -0.293) +
      term(0.09, 1.466, 3.722, -0.984));
  return asd * asd;
}

export function thirdGenerationFit(fHz: number): number {
  const x = fHz / 100;
  return 1e-50 * (2.39e-27 * x ** -15.64 + 0.349 * x ** -2.145 + 1.76 * x ** -0.12 + 0.409 * x ** 1.1) ** 2;
}

const armM = 2.5e9;
const opticalMetrology = (fHz: number) => 1.5e-11 ** 2 * (1 + (2e-3 / fHz) ** 4);
const acceleration = (fHz: number) => 3e-15 ** 2 * (1 + (0.4e-3 / fHz) ** 2) * (1 + (fHz / 8e-3) ** 4);

/** Appendix E, curve SB, with its printed f_* = 19.09 mHz (four digits of c/2πL: 0.05 % of S at 0.1 Hz). */
export function spaceBased(fHz: number): number {
  return spaceShape(fHz, 2 * (1 + Math.cos(fHz / 19.09e-3) ** 2), 19.09e-3);
}

/** With f_* = c/2πL in full. */
export function spaceBasedSimple(fHz: number): number {
  return spaceShape(fHz, 4, 299792458 / (2 * Math.PI * armM));
}

function spaceShape(fHz: number, testMassFactor: number, transferHz: number): number {
  const displacement = opticalMetrology(fHz) + (testMassFactor * acceleration(fHz)) / (2 * Math.PI * fHz) ** 4;
  return (10 / (3 * armM * armM)) * displacement * (1 + 0.6 * (fHz / transferHz) ** 2);
}
