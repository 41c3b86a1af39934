/** Numbers that look drawn and are the same on every machine: a run is to give the same bytes twice. */
export interface Draws {
  /** In (0, 1). */
  readonly uniform: () => number;
  readonly normal: () => number;
}

/**
 * A 32-bit counter through two multiplicative mixings.
 * Shape:  one stream a seed.
 * Units:  none.
 * Error:  period 2³²; good to the third digit of a quantile, which is what 10⁴ draws can tell.
 * Fails:  never.
 * Source: common practice (a Weyl sequence with an avalanche); normals by Box and Muller.
 */
export function seededDraws(seed: number): Draws {
  let state = seed >>> 0;
  const uniform = (): number => {
    state = (state + 0x9e3779b9) >>> 0;
    let x = state;
    x = Math.imul(x ^ (x >>> 16), 0x21f0aaad);
    x = Math.imul(x ^ (x >>> 15), 0x735a2d97);
    return (((x ^ (x >>> 15)) >>> 0) + 0.5) / 2 ** 32;
  };
  const normal = (): number => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}
