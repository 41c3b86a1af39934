import type { Mode } from '../contract/waveform';
import { quadratureWeights } from './local-calculus';
import { ratesInBlocks } from './flux-blocks';
import { weightedSum, type ModeProduct } from './mode-products';
import type { Components } from './momentum-products';
import type { SampledRadiation } from './news-on-samples';
import type { EllShare } from './radiation-recipe';

export type Vector = readonly [x: number, y: number, z: number];

/** H where the quantity needs it, else Ḣ: the left factor of a product. */
const leftOf = ({ strain, news }: SampledRadiation): readonly Mode[] => strain ?? news;

/**
 * Route A: ∫ of a vector of rates from startM to the last sample.
 * Shape:  three numbers.
 * Units:  startM in M; those of the products times M.
 * Error:  quadrature of the stated order in the sample step.
 * Fails:  never; a start after the record gives zero.
 * Source: Q13, Q14.
 */
export function vectorOnSamples(components: Components, radiation: SampledRadiation, startM: number, order: 6 | 8): Vector {
  const { axis, isEven } = radiation;
  const weights = quadratureWeights(axis, startM, order, isEven);
  const [x, y, z] = ratesOf(components, radiation);
  return [weightedSum(weights, x!), weightedSum(weights, y!), weightedSum(weights, z!)];
}

/** The rates themselves, for the eye. */
export const ratesOf = (components: Components, radiation: SampledRadiation): readonly Float64Array[] =>
  ratesInBlocks(components, leftOf(radiation), radiation.news, radiation.axis.length);

/**
 * What the highest ℓ of each product adds, as the length of a vector.
 * Shape:  one entry for each ℓ of the modes, ascending.
 * Units:  those of the integral.
 * Error:  that of vectorOnSamples.
 * Fails:  never.
 * Source: domain reference E09.
 */
export function vectorShares(components: Components, radiation: SampledRadiation, startM: number): EllShare[] {
  const { news } = radiation;
  const ells = [...new Set(news.map(({ l }) => l))].sort((a, b) => a - b);
  return ells.map((l) => {
    const ofEll = (products: readonly ModeProduct[]): ModeProduct[] => products.filter(({ a, b }) => Math.max(news[a]!.l, news[b]!.l) === l);
    const [x, y, z] = components;
    return { l, size: Math.hypot(...vectorOnSamples([ofEll(x), ofEll(y), ofEll(z)], radiation, startM, 8)) };
  });
}
