import { drawAt } from '@/lib/kernel/counted-draw';

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
  let counter = 0;
  const uniform = (): number => drawAt(seed, counter++);
  const normal = (): number => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}
