import { describe, expect, it } from 'vitest';
import type { Mode } from '@/lib/engine/contract/waveform';
import { powerInBlocks, ratesInBlocks } from '@/lib/engine/radiation/flux-blocks';
import { derivativesAtSamples } from '@/lib/engine/radiation/local-calculus';
import type { ModeProduct } from '@/lib/engine/radiation/mode-products';
import { angularMomentumProducts, momentumProducts } from '@/lib/engine/radiation/momentum-products';
import { seededRandom } from '../../../support/seeded-random';

const samples = 1300;
const random = seededRandom(3);
const series = (): Float64Array => Float64Array.from({ length: samples }, () => random() - 0.5);
const names = [2, 3, 4].flatMap((l) => Array.from({ length: 2 * l + 1 }, (_, i) => ({ l, m: i - l })));
const modes = names.map((name): Mode => ({ ...name, re: series(), im: series() }));
const others = names.map((name): Mode => ({ ...name, re: series(), im: series() }));

/** ℜ Σ (re + i·im) X_a Y_b*, a product at a time. */
function plainly(products: readonly ModeProduct[], left: readonly Mode[], right: readonly Mode[], i: number): { value: number; size: number } {
  let [value, size] = [0, 0];
  for (const { a, b, re, im } of products) {
    const [x, y, u, v] = [left[a]!.re[i]!, left[a]!.im[i]!, right[b]!.re[i]!, right[b]!.im[i]!];
    value += re * (x * u + y * v) - im * (y * u - x * v);
    size += (Math.abs(re) + Math.abs(im)) * Math.hypot(x, y) * Math.hypot(u, v);
  }
  return { value, size };
}

describe('fluxes in blocks', () => {
  const many: ModeProduct[] = Array.from({ length: 60 }, (_, i) => ({ a: i % 3, b: (7 * i) % (i % 2 === 0 ? modes.length : 4), re: random() - 0.5, im: random() - 0.5 }));
  it.each([
    ['angular momentum', angularMomentumProducts(names), others],
    ['linear momentum', momentumProducts(names), others],
    ['linear momentum of one set, where a pair is met both ways', momentumProducts(names), modes],
    ['any products', [many, [], many.slice(0, 5)], others],
    ['any products of one set', [many, [], many.slice(0, 5)], modes],
  ] as const)('equal a plain loop over products: %s', (_, components, right) => {
    const rates = ratesInBlocks(components, modes, right, samples);
    components.forEach((products, place) => {
      for (let i = 0; i < samples; i++) {
        const { value, size } = plainly(products, modes, right, i);
        expect(Math.abs(rates[place]![i]! - value)).toBeLessThanOrEqual(1e-14 * size);
      }
    });
    expect(ratesInBlocks(components, modes, right, samples)).toStrictEqual(rates);
  });

  it('add the powers of modes', () => {
    const power = powerInBlocks(modes, 0.3, samples);
    for (const i of [0, 511, 512, samples - 1]) expect(power[i]).toAgreeWith(0.3 * modes.reduce((sum, { re, im }) => sum + re[i]! ** 2 + im[i]! ** 2, 0), 1e-14);
  });
});

describe('derivatives on equal steps', () => {
  it.each([3, 9, 13, 14, 18, samples - 1, samples])('are those of each sample by itself, for %d samples kept', (kept) => {
    const axis = Float64Array.from({ length: kept }, (_, i) => 0.25 * i);
    const given = [modes[0]!.re.subarray(0, kept), modes[1]!.im.subarray(0, kept)];
    const [even, uneven] = [derivativesAtSamples(axis, given, 13, true), derivativesAtSamples(axis, given, 13, false)];
    even.slopes.forEach((slope, s) => slope.forEach((x, i) => { expect(Math.abs(x - uneven.slopes[s]![i]!)).toBeLessThanOrEqual(1e-13); }));
    even.noiseGain.forEach((x, i) => { expect(x).toAgreeWith(uneven.noiseGain[i]!, 1e-12); });
  });
});
