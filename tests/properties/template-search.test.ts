import { describe, expect, it } from 'vitest';
import type { Side, TemplateRequest } from '@/lib/engine/contract/route';
import { hillsOf, pairRequest } from '@/lib/engine/routes/a/best-templates';
import { JointSearch } from '@/lib/engine/routes/a/joint-search';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { seededRandom } from '../support/seeded-random';
import { drawnBy, requestOf, rescale, threeModes } from '../support/template-banks';

const drawn = drawnBy(seededRandom(11));

/** Every template at every factor, the best three of each refined: no glance, no hill left out. */
function byFullSearch(a: Side, request: TemplateRequest): { index: number; match: number; massFactor: number } {
  const store = new SpectrumStore();
  const all = request.templates.map((_, index) => {
    const { alignment, placement } = new JointSearch(pairRequest(request, a, index), { mass: true, inclination: false, azimuth: false }, store, houseNumerics).run();
    return { index, match: alignment.value, massFactor: placement.massFactor };
  });
  return all.reduce((best, next) => (next.match > best.match ? next : best));
}

describe('the search over many templates', () => {
  it.each([
    [60, 25, [0.92, 1.1]],
    [150, 15, [0.9, 1.12]],
  ] as const)('finds at %d M☉ what the search without shortcuts finds', (massMsun, fLowHz, range) => {
    const templates = Array.from({ length: 3 }, () => drawn(massMsun));
    const a = drawn(massMsun);
    const request = requestOf(templates, fLowHz, range);
    const [found] = createRouteA().bestTemplates([a], request);
    const full = byFullSearch(a, request);
    expect(found!.index).toBe(full.index);
    expect(found!.outcome.match).toAgreeWith(full.match, 1e-9);
    expect(found!.outcome.massFactor).toAgreeWith(full.massFactor, 2e-5);
  }, 120_000);

  it('is the same whichever side is held, and by the other route', () => {
    const [a, other] = [drawn(100), drawn(100)];
    const request = requestOf([drawn(100)], 20, [0.9, 1.1]);
    const [alone] = createRouteA().bestTemplates([a], request);
    const [among] = createRouteA().bestTemplates([a, other], request);
    expect(among!.outcome.match).toAgreeWith(alone!.outcome.match, 1e-10);
    const [byB] = routeB.bestTemplates([a], request);
    expect(byB!.outcome.match).toAgreeWith(alone!.outcome.match, 2.5e-8);
  });

  it('finds a stretched copy of the signal, and says when it lies on a bound', () => {
    const a = drawn(100);
    const copy = rescale(a, 1 / 1.137);
    const request = requestOf([drawn(100), copy], 20, [0.9, 1.2]);
    const [inside] = createRouteA().bestTemplates([a], request);
    expect(inside).toMatchObject({ index: 1, outcome: { onBound: false } });
    expect(inside!.outcome.match).toAgreeWith(1, 1e-9);
    expect(inside!.outcome.massFactor).toAgreeWith(1.137, 1e-5);
    const [outside] = createRouteA().bestTemplates([a], { ...request, templates: [copy], templateMassRange: [0.9, 1.12] });
    expect(outside!.outcome).toMatchObject({ onBound: true, massFactor: 1.12 });
  });

  it('climbs to the top beside which a rough value points', () => {
    const factors = [0.9, 0.92, 0.94, 0.96, 0.98];
    const sharp = [0.9, 0.95, 0.99, 1, 0.97];
    // The rough value at the top is low by one and a half per cent, the one beside it by next to nothing.
    const scan = { rough: Float32Array.of(0.88, 0.93, 0.9899, 0.985, 0.95), sharp: (_t: number, factor: number) => sharp[factors.indexOf(factor)]! };
    expect(hillsOf(scan, 1, factors).map(({ factor }) => factor)).toEqual([3]);
  });

  it('lets a hill with an edge between two masses rise as far as it does', () => {
    // Published by nobody: an independent numpy script, chirp-z transforms of two invented chirps at each mass and Simpson's rule in frequency.
    const mass = [0.968, 0.977, 0.986, 0.9905, 0.995, 0.99695, 0.9995, 1.004, 1.0135, 1.023, 1.041, 1.06];
    const match = [0.86116, 0.906057, 0.945608, 0.963955, 0.97423, 0.975258, 0.973689, 0.965919, 0.951, 0.922493, 0.816477, 0.71927];
    const edged = (factor: number): number => {
      const i = Math.max(1, mass.findIndex((m) => m >= factor));
      return match[i - 1]! + ((match[i]! - match[i - 1]!) * (factor - mass[i - 1]!)) / (mass[i]! - mass[i - 1]!);
    };
    const smooth = (factor: number): number => 0.9736 - 12 * (factor - 1.04) ** 2;
    const factors = [0.968, 0.986, 1.004, 1.023, 1.041, 1.06];
    const sharp = (t: number, factor: number): number => (t === 0 ? edged(factor) : smooth(factor));
    const rough = Float32Array.from([0, 1].flatMap((t) => factors.map((factor) => sharp(t, factor))));
    const hill = hillsOf({ rough, sharp }, 2, factors).find(({ template }) => template === 0);
    expect(hill?.ceiling).toBeGreaterThan(Math.max(...match));
  });

  it('finds a stretched copy wherever the grid of masses begins', () => {
    const [a, copy] = [threeModes(1), threeModes(1.1)];
    for (const low of [0.66, 0.676, 0.688, 0.752]) {
      const [found] = createRouteA().bestTemplates([a], requestOf([copy], 20, [low, 1.4]));
      expect(found!.outcome.match, `from ${low}`).toAgreeWith(1, 1e-7);
      expect(found!.outcome.massFactor, `from ${low}`).toAgreeWith(1 / 1.1, 2e-5);
    }
  }, 60_000);
});
