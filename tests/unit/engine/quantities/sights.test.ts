import { describe, expect, it } from 'vitest';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { detectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute, Side } from '@/lib/engine/contract/route';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { kitOf } from '@/lib/engine/budget/error-bar';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { modeContentRecipe } from '@/lib/engine/quantities/detector/mode-content-recipe';
import type { Evaluated, Recipe } from '@/lib/engine/quantities/detector/recipe';
import { degeneracyRecipe } from '@/lib/engine/quantities/detector/degeneracy-recipe';
import { sightProblem } from '@/lib/engine/quantities/detector/sight-problem';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { binary, columns, curve, inMasses, measured, valueOf } from '../../../support/detector-claims';

/** Gaussian packets of one frequency a mode: two frequencies far apart share no spectrum. */
const axis = Float64Array.from({ length: 1200 }, (_, i) => i * 0.5);
function packet(l: number, m: number, omega: number, size: number, by = 0): Mode[] {
  const at = (t: number): number => size * Math.exp(-(((t - 300 - by) / 60) ** 2));
  const re = axis.map((t) => at(t) * Math.cos(omega * (t - by)));
  const im = axis.map((t) => -at(t) * Math.sin(omega * (t - by)));
  const sign = l % 2 === 0 ? 1 : -1;
  return [
    { l, m, re, im },
    { l, m: -m, re: re.map((x) => sign * x), im: im.map((x) => -sign * x) },
  ];
}
const two = inMasses('two tones', axis, [...packet(2, 2, 0.2, 1), ...packet(3, 3, 0.6, 0.4)], { uniformStep: 0.5 });
const band = { totalMassMsun: 100, fLowHz: 20, fHighHz: 1000 } as const;

/** One point by both routes, without its budget. */
function byBoth(recipe: Recipe, declared: DeclaredSettings, a: Waveform, b?: Waveform): { A: Evaluated; B: Evaluated } {
  const c = conditionWaveform(a, 'all');
  const request = { declared: { ...band, ...declared }, at: {}, a: c, b: b === undefined ? null : conditionWaveform(b, 'all'), noise: curve('G2'), traits: recipe.traits(declared) };
  const at = (kit: Parameters<Recipe['evaluate']>[0]) => recipe.evaluate(kit, request);
  return { A: at(kitOf(houseNumerics, new SpectrumStore())), B: at({ route: routeB, scan: routeB }) };
}

const size = (l: number, iota: number): number => {
  const [p, q] = [spinWeightedHarmonic(l, l, iota, 0), spinWeightedHarmonic(l, -l, iota, 0)];
  return p.re ** 2 + p.im ** 2 + q.re ** 2 + q.im ** 2;
};
/** ρ²₃₃/ρ²₂₂ of two disjoint tones, up to what the harmonics make of it. */
const ratio = (() => {
  const rho = (modes: readonly [number, number][]): number => valueOf({ quantity: 'snr', a: two, settings: { ...band, distanceMpc: 100, modes, inclinationRad: 1, response: 'complex' } });
  return (rho([[3, 3], [3, -3]]) ** 2 / size(3, 1)) / (rho([[2, 2], [2, -2]]) ** 2 / size(2, 1));
})();
const matchAt = (iota: number): number => Math.sqrt(size(2, iota) / (size(2, iota) + ratio * size(3, iota)));

/** Hundreds of searches each: longer than most tests on a busy machine. */
const patient = { timeout: 120_000 };

describe('the match with the quadrupole alone', patient, () => {
  it('is the quadrupole’s share of the amplitude where the other modes share no frequency with it (closed form)', () => {
    for (const iota of [0.4, Math.PI / 2]) {
      const { A, B } = byBoth(modeContentRecipe, { inclinationRad: iota }, two);
      expect(A.value).toAgreeWith(matchAt(iota), 1e-8);
      expect(B.value).toAgreeWith(A.value, 1e-9);
      expect(A.components).toHaveProperty('azimuthRad');
    }
  });

  it('names the share of every mode at azimuth 0, with a value, a budget and no average', () => {
    const { points, assumed, budget } = measured({ quantity: 'mode-content', a: two, settings: { ...band, inclinationRad: 1.2 } });
    const { components, value, expandedUncertainty } = points[0]!;
    expect(components!['rho2:2,2']! + components!['rho2:2,-2']!).toAgreeWith(value! ** 2, 1e-6);
    expect(Object.keys(components!)).toEqual(expect.arrayContaining(['azimuthRad', 'rho2:3,3', 'rho2:3,-3']));
    expect(expandedUncertainty!).toBeLessThan(1e-6);
    expect(assumed).toEqual(expect.arrayContaining(['maximise', 'response', 'statistic']));
    expect(assumed).not.toContain('average');
    expect(budget.find(({ id }) => id === 'E01')?.u).toBeGreaterThan(0);
  });

  it('averages over cos ι where no inclination is claimed, and with loudness as weight (closed form)', () => {
    const n = 20_000;
    const rows = Array.from({ length: n }, (_, i) => Math.acos(-1 + (2 * (i + 0.5)) / n));
    const cubes = rows.map((iota) => (size(2, iota) + ratio * size(3, iota)) ** 1.5);
    const mean = rows.reduce((sum, iota) => sum + matchAt(iota), 0) / n;
    const weighted = Math.cbrt(rows.reduce((sum, iota, i) => sum + cubes[i]! * matchAt(iota) ** 3, 0) / cubes.reduce((p, q) => p + q, 0));
    const plain = byBoth(modeContentRecipe, { statistic: 'mean' }, two);
    expect(plain.A.value).toAgreeWith(mean, 1e-6);
    expect(plain.B.value).toAgreeWith(mean, 1e-6);
    expect(byBoth(modeContentRecipe, { statistic: 'weighted' }, two).A.value).toAgreeWith(weighted, 1e-6);
  });

  it('stops for columns, for a file without the quadrupole, and for a table over masses that would cost too much', () => {
    const codes = (a: Waveform, settings: DeclaredSettings) => measured({ quantity: 'mode-content', a, settings }).findings.map(({ code, level }) => [code, level]);
    const seconds = axis.map((t) => t * 1e-3);
    expect(codes(columns('columns', seconds, two.content.kind === 'modes' ? two.content.modes[0]!.re : axis, null), { fLowHz: 20 })).toContainEqual(['engine/no-modes', 'stops-lodging']);
    expect(codes(two, { ...band, inclinationRad: 1, modes: [[3, 3], [3, -3]] })).toContainEqual(['engine/no-signal', 'stops-lodging']);
    const wide = measured({ quantity: 'mode-content', a: two, settings: { ...band, maximise: ['time', 'templateMass'], templateMassRange: [0.01, 100] } });
    expect(wide.points[0]!.value).toBeNull();
    expect(wide.findings.find(({ code }) => code === 'engine/search-too-wide')?.text).toMatch(/4 × 2 products of modes at 467 masses .* at most 20000000 are tabulated/);
  });
});

const full = binary('full', { massRatio: 2, stepM: 1, mOmega0: 0.03 });

function best(route: DetectorRoute, declared: DeclaredSettings, inclinationRad: number, azimuthRad: number, tabled: number | null) {
  const a = conditionWaveform(full, 'all');
  const point = detectorPoint({ declared: { ...band, ...declared }, at: {}, a, b: null, noise: curve('G2'), traits: degeneracyRecipe.traits({}) });
  const b: Side = { ...point.a, waveform: { ...point.a.waveform, content: { kind: 'modes', modes: point.a.waveform.content.kind === 'modes' ? point.a.waveform.content.modes.filter(({ l, m }) => l === 2 && Math.abs(m) === 2) : [] } } };
  const { matcher, request } = sightProblem({ route }, point, b, tabled);
  const sight = { inclinationRad, azimuthRad };
  const whole = route.match({ ...request, a: { ...request.a, ...sight }, b: { ...request.b, ...sight } });
  return { table: matcher.best(sight), whole, again: matcher.held(sight, matcher.best(sight)) };
}

describe('products of modes taken once', patient, () => {
  it.each([routeA, routeB])('give the match that a whole search along the line of sight finds (route $name)', (route) => {
    for (const tabled of [null, 1.1]) {
      const { table, whole, again } = best(route, {}, 1.1, 0.7, tabled);
      expect(table.match).toAgreeWith(whole.match, 1e-8);
      expect(again.match).toAgreeWith(table.match, 1e-9);
    }
  });

  it.each([routeA, routeB])('hold for fewer freedoms too (route $name)', (route) => {
    for (const maximise of [['time'], ['time', 'phase'], ['time', 'polarisation'], []] as const) {
      const { table, whole } = best(route, { maximise }, 0.9, 2.1, 0.9);
      expect(table.match, maximise.join()).toAgreeWith(whole.match, 1e-7);
    }
  });
});

describe('the least match over all sights', patient, () => {
  it('of a waveform with itself, later and turned about its axis, is one', () => {
    const turn = 0.6;
    const modes = (two.content.kind === 'modes' ? [...packet(2, 2, 0.2, 1, 20), ...packet(3, 3, 0.6, 0.4, 20)] : []).map((mode): Mode => {
      const [c, s] = [Math.cos(mode.m * turn), Math.sin(mode.m * turn)];
      return { ...mode, re: mode.re.map((x, i) => c * x - s * mode.im[i]!), im: mode.im.map((x, i) => s * mode.re[i]! + c * x) };
    });
    const b = inMasses('turned', axis, modes, { uniformStep: 0.5, binary: { massRatio: 3, chi1z: 0.4, chi2z: -0.4 } });
    const { A, B } = byBoth(degeneracyRecipe, { taper: 'none' }, two, b);
    expect(A.value).toAgreeWith(1, 1e-9);
    expect(B.value).toAgreeWith(1, 1e-9);
    expect(A.components).toMatchObject({ chiEffA: null });
    expect(A.components!['chiEffB']).toAgreeWith(0.2, 1e-12);
  });

  it('lies edge-on where the loud modes of two binaries differ in what edge-on shows most', () => {
    const quadrupole = inMasses('quadrupole', axis, packet(2, 2, 0.2, 1), { uniformStep: 0.5 });
    const { A, B } = byBoth(degeneracyRecipe, {}, two, quadrupole);
    const grid = Array.from({ length: 9001 }, (_, i) => matchAt((Math.PI / 2) * (i / 9000)));
    expect(A.value).toAgreeWith(Math.min(...grid), 1e-8);
    expect(B.value).toAgreeWith(A.value, 1e-8);
    expect(matchAt(A.components!['inclinationRad']!)).toAgreeWith(A.value, 1e-8);
    expect(A.components!['rhoInd']).toAgreeWith(1 / Math.sqrt(2 * (1 - A.value)), 1e-12);
  });
});
