import { describe, expect, it } from 'vitest';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { detectorPoint } from '@/lib/engine/conditioning/detector-settings';
import { joinInTaper } from '@/lib/engine/findings/join-findings';
import { hybridRecipe } from '@/lib/engine/quantities/detector/hybrid-recipe';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { inspiralAmplitude } from '@/lib/engine/inspiral/post-newtonian-amplitude';
import { quantities } from '@/lib/engine/quantities/registry';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { binary, curve, measured, valueOf } from '../../../support/detector-claims';

const a = { ...binary('A', { modes: ['22'], stepM: 1 }), binary: { massRatio: 1, chi1z: 0, chi2z: 0 } };
const base = { totalMassMsun: 20, distanceMpc: 400, fLowHz: 20, fHighHz: 1000, joinHz: 100 } as const;
const hybrid = (settings: DeclaredSettings = {}) => measured({ quantity: 'hybrid-snr', a, settings: { ...base, ...settings } });

describe('the post-Newtonian amplitude', () => {
  const binaryIn = { massMsun: 20, distanceMpc: 400, massRatio: 1 };

  it('has the loudness of a power law in flat noise, by both routes (closed form)', () => {
    const flat = { ...curve('G2'), psd: () => 1e-46 };
    const band = { noise: flat, fLowHz: 20, fHighHz: 200 };
    const amplitude = inspiralAmplitude({ ...binaryIn, order: 0 });
    const one = amplitude(1) ** 2;
    const exact = (4 * one * (20 ** (-4 / 3) - 200 ** (-4 / 3))) / (4 / 3) / 1e-46;
    expect(routeA.powerOf(amplitude, band)).toAgreeWith(exact, { relative: 1e-12 });
    expect(routeB.powerOf(amplitude, band)).toAgreeWith(exact, { relative: 1e-12 });
  });

  it('agrees between the routes on the design curve, and is less with the first correction', () => {
    const band = { noise: curve('G2'), fLowHz: 20, fHighHz: 300 };
    const [restricted, corrected] = [0, 1].map((order) => inspiralAmplitude({ ...binaryIn, order }));
    expect(routeA.powerOf(corrected!, band)).toAgreeWith(routeB.powerOf(corrected!, band), { relative: 1e-12 });
    expect(routeA.powerOf(corrected!, band)).toBeLessThan(routeA.powerOf(restricted!, band));
  });

  it('does not ask which body is the heavier', () => {
    const [p, q] = [3, 1 / 3].map((massRatio) => inspiralAmplitude({ ...binaryIn, massRatio, order: 1 })(50));
    expect(p!).toAgreeWith(q!, { relative: 1e-14 });
  });
});

describe('a hybrid', { timeout: 120_000 }, () => {
  it('adds the squares of its two parts, and is all numerical or all closed form where the join leaves the band', () => {
    const { value, components, routes } = hybrid().points[0]!;
    expect(value).toAgreeWith(Math.hypot(components!['rhoBelow']!, components!['rhoAbove']!), 1e-10);
    expect(routes.B).toAgreeWith(value!, { relative: 1e-9 });
    const rest = { totalMassMsun: 20, distanceMpc: 400, fHighHz: 1000 };
    expect(components!['rhoAbove']).toAgreeWith(valueOf({ quantity: 'snr', a, settings: { ...rest, fLowHz: 100 } }), { relative: 1e-9 });
    const moved = measured({ quantity: 'hybrid-snr', a, settings: { ...base, detectors: 4 }, over: { setting: 'joinHz', values: [10, 100, 2000] } }).points;
    expect(moved[0]!.components!['rhoBelow']).toBe(0);
    expect(moved[1]!.value).toAgreeWith(2 * value!, { relative: 1e-9 });
    expect(moved[2]!.components!['rhoAbove']).toBe(0);
  });

  it('tells what the join and the order weigh, beside U and not in it', () => {
    const { budget, points } = hybrid();
    const line = budget.find(({ id }) => id === 'E11');
    expect(line?.group).toBe('coverage');
    expect(line?.u ?? 0).toBeGreaterThan(1000 * points[0]!.expandedUncertainty!);
  });

  it('says when the numerical part has not come in yet, and nothing of a band that it does not have to fill', () => {
    const condition = conditionWaveform(a, 'all');
    const at = (joinHz: number) => joinInTaper(condition, detectorPoint({ declared: { ...base, joinHz }, at: {}, a: condition, b: null, noise: curve('G2'), traits: hybridRecipe.traits({}) }));
    expect(at(40)).toMatchObject({ code: 'engine/join-in-taper', level: 'worth-a-look' });
    expect(at(40)?.text).toMatch(/from 40 Hz on, but A has come in fully only at 6\d/);
    expect(at(100)).toBeNull();
    expect(hybrid().findings.map(({ code }) => code)).not.toContain('engine/signal-starts-in-band');
  });

  it.each<[string, DeclaredSettings]>([
    ['another inclination', { inclinationRad: 0.3 }],
    ['another response', { response: 'cross' }],
    ['an average', { average: 'sky' }],
  ])('stops for %s', (_, settings) => {
    expect(hybrid(settings).findings.map(({ code, level }) => `${code} ${level}`)).toContain('engine/hybrid-face-on stops-lodging');
  });

  it('takes spins without effect, and assumes nothing of what it fixes itself', () => {
    const { settings } = quantities.get('hybrid-snr')!;
    expect(settings).toEqual(expect.arrayContaining(['chi1z', 'chi2z']));
    const [plain, spinning] = [hybrid(), hybrid({ chi1z: 0.5, chi2z: -0.5 })];
    expect(spinning.points[0]!.value).toBe(plain.points[0]!.value);
    for (const { assumed } of [plain, spinning]) for (const name of ['chi1z', 'chi2z', 'inclinationRad', 'azimuthRad', 'response']) expect(assumed).not.toContain(name);
    expect(plain.assumed).toEqual(expect.arrayContaining(['modes', 'detectors', 'amplitudeOrder']));
    expect(hybrid({ response: 'plus' }).settings).toContainEqual({ name: 'response', value: 'plus', standing: 'declared' });
  });

  it('needs a join and a mass ratio', () => {
    const required = (binaryFacts: object) => quantities.get('hybrid-snr')!.required({ of: { a: { ...a, binary: binaryFacts } }, noise: null }, { totalMassMsun: 20, distanceMpc: 400 }, null);
    expect(required({})).toEqual(['joinHz', 'massRatio']);
    expect(required({ massRatio: 2 })).toEqual(['joinHz']);
  });
});
