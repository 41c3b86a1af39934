import { describe, expect, it } from 'vitest';
import type { Side, TemplateRequest } from '@/lib/engine/contract/route';
import { bestPlaces } from '@/lib/engine/routes/a/best-templates';
import { massGrid } from '@/lib/engine/routes/a/joint-search';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { matchBounds } from '@/lib/engine/routes/a/pair-bound';
import { promising } from '@/lib/engine/routes/a/promising-masses';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { sharpBank, templateBank } from '@/lib/engine/routes/a/template-bank';
import { reachFor } from '@/lib/engine/routes/a/template-frame';
import { scanTemplates, slicer, sourceOf } from '@/lib/engine/routes/a/template-scan';
import { curve } from '../support/detector-claims';
import { seededRandom } from '../support/seeded-random';
import { burstAt, drawnBy, requestOf, rescale, tableCurve, threeModes } from '../support/template-banks';

type RealRequest = TemplateRequest & { readonly response: 'plus' };

function bench(a: Side, request: RealRequest) {
  const factors = massGrid(request.templateMassRange);
  const shared = { signals: [a], factors, request, store: new SpectrumStore(), numerics: houseNumerics };
  const bank = templateBank(shared, reachFor(request.band.noise));
  const sharpest = sharpBank(shared, bank);
  const source = sourceOf(sharpest, a, shared);
  const sliceAt = slicer(bank, a, source);
  return {
    factors,
    bank,
    boundsAt: (t: number, factor: number) => matchBounds(sliceAt(factor), bank.template(t)),
    /** On the bins that the bounds are of, and on those that the best match is sought on. */
    matchAt: scanTemplates(bank, bank, a, source, factors).sharp,
    sharpAt: scanTemplates(bank, sharpest, a, source, factors).sharp,
  };
}

const noises = [['a formula', curve('G2')], ['a table with lines', tableCurve()]] as const;

describe('the bounds of the search over many templates', () => {
  it.each(noises)('hold the match of any pair at any mass, with %s', (_, noise) => {
    const random = seededRandom(5);
    const drawn = drawnBy(random);
    const templates = [drawn(100), drawn(80), threeModes(1), threeModes(1.1)];
    const { boundsAt, matchAt, sharpAt } = bench(drawn(100), requestOf(templates, 20, [0.7, 1.4], noise));
    for (let i = 0; i < 120; i++) {
      const [t, factor] = [i % templates.length, 0.7 * 2 ** random()];
      const { least, most } = boundsAt(t, factor);
      const match = matchAt(t, factor);
      expect(least).toBeLessThanOrEqual(match);
      expect(most).toBeGreaterThanOrEqual(match);
      expect(match - least).toBeLessThan(5e-3);
      expect(Math.abs(match - sharpAt(t, factor))).toBeLessThan(5e-5);
    }
  });

  it.each(noises)('let no template move farther with its mass than its path, with %s', (_, noise) => {
    const random = seededRandom(6);
    const drawn = drawnBy(random);
    const templates = [drawn(100), drawn(60), threeModes(1)];
    const { factors, bank, matchAt } = bench(threeModes(1), requestOf(templates, 20, [0.8, 1.3], noise));
    const angleAt = (t: number, factor: number): number => Math.acos(Math.min(1, matchAt(t, factor)));
    for (let i = 0; i < 60; i++) {
      const t = i % templates.length;
      const g = Math.floor(random() * (factors.length - 1));
      const to = Math.min(factors.length - 1, g + 1 + Math.floor(4 * random()));
      const between = factors[g]! * (factors[to]! / factors[g]!) ** random();
      const length = bank.paths[t]![to]! - bank.paths[t]![g]!;
      expect(angleAt(t, between)).toBeGreaterThanOrEqual((angleAt(t, factors[g]!) + angleAt(t, factors[to]!) - length) / 2 - 1e-4);
      expect(Math.abs(angleAt(t, factors[g]!) - angleAt(t, factors[to]!))).toBeLessThanOrEqual(length + 1e-4);
    }
  });

  it.each([
    [100, 20, [0.7, 1.5], curve('G2')],
    [60, 25, [0.92, 1.1], curve('G2')],
    [150, 20, [0.8, 1.25], curve('A2')],
    [100, 20, [0.8, 1.3], tableCurve()],
  ] as const)('leave out nothing that a look everywhere finds, at %d M☉', (massMsun, fLowHz, range, noise) => {
    const drawn = drawnBy(seededRandom(massMsun));
    const templates = [...Array.from({ length: 8 }, () => drawn(massMsun)), threeModes(1), threeModes(1.1)];
    const request = requestOf(templates, fLowHz, range, noise);
    const context = () => ({ store: new SpectrumStore(), numerics: houseNumerics });
    const signals = [drawn(massMsun), threeModes(1.05), rescale(templates[3]!, 1.037)];
    expect(bestPlaces(signals, request, context())).toStrictEqual(bestPlaces(signals, request, context(), true));
  });

  it('spare most of the looks, and find the first of equal templates', () => {
    const drawn = drawnBy(seededRandom(9));
    const twin = drawn(100);
    const templates = [drawn(100), twin, twin, ...Array.from({ length: 5 }, () => drawn(100))];
    const a = rescale(twin, 1.013);
    const request = requestOf(templates, 20, [0.7, 1.5]);
    const { factors, bank, boundsAt } = bench(a, request);
    let looks = 0;
    promising(bank.paths, (t, g) => {
      looks++;
      return boundsAt(t, factors[g]!);
    });
    expect(looks).toBeLessThan(0.4 * templates.length * factors.length);
    expect(bestPlaces([a], request, { store: new SpectrumStore(), numerics: houseNumerics })[0]!.index).toBe(1);
  });

  it.each([[200, 1800], [1800, 200], [1000, 1000]])('find what meets at any lag, a burst at %d and one at %d', (here, there) => {
    const [found] = bestPlaces([burstAt(here)], requestOf([burstAt(there)], 20, [0.9, 1.1]), { store: new SpectrumStore(), numerics: houseNumerics });
    expect(found!.massFactor).toAgreeWith(1, 2e-5);
    const { boundsAt } = bench(burstAt(here), requestOf([burstAt(there)], 20, [0.9, 1.1]));
    expect(boundsAt(0, 1).most).toBeGreaterThan(0.99);
    // What two lags add up to is no lower bound, and sends the search to bins that tell them apart.
    expect(boundsAt(0, 0.98)).toMatchObject(here === there ? { least: expect.closeTo(0.98, 1) } : { byFarLags: true });
  });

  it('look everywhere where bounds are not finite', () => {
    const paths = [Float64Array.of(0, Math.PI, 2 * Math.PI), Float64Array.of(0, 0.01, 0.02)];
    const seen: string[] = [];
    promising(paths, (t, g) => {
      seen.push(`${t} ${g}`);
      return t === 0 ? { least: 0, most: Number.NaN } : { least: 0.2, most: 0.2 };
    });
    expect(seen.filter((key) => key.startsWith('0')).sort()).toEqual(['0 0', '0 1', '0 2']);
  });
});
