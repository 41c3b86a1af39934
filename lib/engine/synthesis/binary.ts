/**
 * The synthesis room: closed-form inspiral–merger–ringdown mode sets for demonstrations and tests
 * (domain reference, appendix B). They are stylised: energies lie within about 6 % of published
 * fits, peak luminosities 5–14 % above them, recoils well below. They must never serve as reference
 * waveforms, and the text writer says so in every file. Everything is a function of its arguments.
 */
export interface BinaryParameters {
  /** m1/m2, at least 1. */
  readonly massRatio: number;
  readonly chi1z: number;
  readonly chi2z: number;
}

/** Masses in units of the total mass, and what the series need of them. */
export interface Binary extends BinaryParameters {
  readonly m1: number;
  readonly m2: number;
  readonly eta: number;
  readonly delta: number;
}

export function binaryOf(parameters: BinaryParameters): Binary {
  const { massRatio: q } = parameters;
  const m1 = q / (1 + q);
  const m2 = 1 / (1 + q);
  return { ...parameters, m1, m2, eta: m1 * m2, delta: m1 - m2 };
}
