import { describe, expect, it } from 'vitest';
import { unitOf, type Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { atInfinity } from '@/lib/engine/extrapolation/perturbative';
import { runsApart } from '@/lib/engine/extrapolation/runs';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { radiusExtrapolation } from '@/lib/engine/quantities/radius-extrapolation';
import { evenTimes, modeFrom, modeSet } from '@/tests/golden/energy-signals';
import { atRadius, measureSeries, mixedError, runOf } from '@/tests/golden/run-signals';

const clean = (n: number, more: Partial<Waveform> = {}): Waveform => runOf({ phaseRad: 0.3 * (80 / n) ** 4, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n, ...more });
const three = [80, 96, 112].map((n) => clean(n));
const codes = (quantity: Quantity, series: readonly Waveform[], settings: DeclaredSettings = {}): string[] => measureSeries(quantity, series, settings).findings.map(({ code, level }) => `${code} ${level}`);
const value = (quantity: Quantity, series: readonly Waveform[], settings: DeclaredSettings = {}): number | null => measureSeries(quantity, series, settings).points[0]!.value;

describe('which runs are compared', () => {
  const mixed = [...three.map((run) => ({ ...run, extractionRadiusM: 200 })), ...[60, 100, 150].map((r) => clean(112, { name: `r${r}`, extractionRadiusM: r }))];
  const names = (apart: 'resolution' | 'radius') => runsApart(apart, mixed).runs.map(({ waveform }) => waveform.name);
  it('of a series with resolutions and radii, those that differ in one respect', () => {
    expect(names('resolution')).toEqual(['n80', 'n96', 'n112']);
    expect(names('radius')).toEqual(['r60', 'r100', 'r150', 'n112']);
    expect(codes(convergenceOrder, mixed)).toEqual(['engine/runs-left-out note']);
  });
  it('the finest three of more, whatever their order in the sheet', () => {
    const order = value(convergenceOrder, [three[2]!, runOf(mixedError(1 / 64), { name: 'n64', resolution: 1 / 64 }), three[0]!, three[1]!]);
    expect(order).toAgreeWith(4, 1e-8);
  });
  it('isotropic radii in order of the areal ones', () => {
    const { runs } = runsApart('radius', [atRadius(100, 100), atRadius(99.5, 100.5, { radiusType: 'isotropic' })]);
    expect(runs.map(({ place }) => place)).toEqual([100, expect.closeTo(100.5025, 4)]);
  });
});

describe('what stops an order', () => {
  it.each<[string, readonly Waveform[], DeclaredSettings]>([
    ['two resolutions', three.slice(1), {}],
    ['equal spacings', [three[0]!, three[1]!, clean(96, { name: 'again' })], {}],
    ['a run that states no spacing', [three[0]!, three[1]!, runOf({ phaseRad: 0, amplitude: 0 }, { name: 'unknown' })], {}],
    ['runs that are the same but for their spacing', [80, 96, 112].map((n) => runOf({ phaseRad: 0, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n })), {}],
    ['differences that grow', [80, 96, 112].map((n, i) => runOf({ phaseRad: [0, 0.1, 0.4][i]!, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n })), {}],
    ['numbers that differ by less than their printed digits', [80, 96, 112].map((n) => runOf({ phaseRad: 0, amplitude: 1e-6 * (80 / n) ** 4 }, { name: `n${n}`, resolution: 1 / n, significantDigits: 6 })), { observable: 'radiated-energy' }],
    ['numbers that go to and fro', [80, 96, 112].map((n, i) => runOf({ phaseRad: [0, 0.2, 0.1][i]!, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n })), { observable: 'phase-at-peak' }],
  ])('%s', (_, series, settings) => {
    expect(value(convergenceOrder, series, settings)).toBeNull();
    expect(codes(convergenceOrder, series, settings)).toContain('engine/no-order stops-lodging');
  });
  it('is said in numbers', () => {
    const [finding] = measureSeries(convergenceOrder, [80, 96, 112].map((n, i) => runOf({ phaseRad: [0, 0.2, 0.1][i]!, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n })), { observable: 'phase-at-peak' }).findings;
    expect(finding!.text).toMatch(/^The values [\d., ]+ of phase-at-peak of n80, n96 and n112 differ in one direction, then in the other\.$/);
  });
  it('and a window outside the records', () => expect(codes(convergenceOrder, three, { window: [100, 900] })).toContain('engine/no-signal stops-lodging'));
});

describe('what an order and a limit ask about', () => {
  it('differences of which no single order speaks', () => {
    const wander = (n: number, i: number): Waveform => {
      const run = clean(n);
      if (run.content.kind !== 'modes') return run;
      const turn = (t: number): number => [0, 0.05, 0.06][i]! * Math.sin(t / 40);
      const modes = run.content.modes.map((mode) => ({ ...mode, re: mode.re.map((x, k) => x * Math.cos(turn(run.axis[k]!)) + Math.sign(mode.m) * mode.im[k]! * Math.sin(turn(run.axis[k]!))), im: mode.im.map((y, k) => y * Math.cos(turn(run.axis[k]!)) - Math.sign(mode.m) * mode.re[k]! * Math.sin(turn(run.axis[k]!))) }));
      return { ...run, content: { kind: 'modes', modes } };
    };
    const { findings, points } = measureSeries(convergenceOrder, [80, 96, 112].map(wander));
    expect(findings.map(({ code }) => code)).toContain('engine/no-single-order');
    expect(points[0]!.components!.pointwiseRange).toBeGreaterThan(1);
  });
  it('two resolutions under a declared order', () => {
    const two = measureSeries(extrapolatedValue, three.slice(1), { observable: 'phase-at-peak', formalOrder: 4 });
    expect(two.findings.map(({ code, level }) => `${code} ${level}`)).toEqual(['engine/few-resolutions worth-a-look']);
    const { components, value: limit } = two.points[0]!;
    expect(components!.errorEstimate).toAgreeWith(3 * Math.abs(limit! - components!.finest!), 1e-12);
    expect(extrapolatedValue.required({ of: { series: three.slice(1) }, noise: null }, {}, null)).toEqual(['formalOrder']);
    expect(extrapolatedValue.required({ of: { series: three }, noise: null }, {}, null)).toEqual([]);
  });
  it('nothing of two runs that do not differ, whose limit is their own number', () => {
    const same = [96, 112].map((n) => runOf({ phaseRad: 0, amplitude: 0 }, { name: `n${n}`, resolution: 1 / n }));
    const [point] = measureSeries(extrapolatedValue, same, { observable: 'amplitude-at-peak', formalOrder: 4 }).points;
    expect(point!.value).toAgreeWith(0.3270350226016691, 1e-9);
    expect(point!.expandedUncertainty).toBeGreaterThan(0);
  });
  it('radii: four of them, over a factor two, and never fewer than the degree and two', () => {
    const at = (radii: readonly number[]) => radii.map((r) => atRadius(r, r));
    const amplitude = { observable: 'amplitude-at-peak' } as const;
    expect(codes(radiusExtrapolation, at([60, 80, 110, 130]), amplitude)).toEqual([]);
    expect(codes(radiusExtrapolation, at([60, 80, 100, 110]), amplitude)).toEqual(['engine/few-radii worth-a-look']);
    expect(codes(radiusExtrapolation, at([60, 80, 130]), { ...amplitude, extrapolationOrder: 1 })).toEqual(['engine/few-radii worth-a-look']);
    expect(codes(radiusExtrapolation, at([60, 80, 130]))).toEqual(['engine/few-radii stops-lodging']);
    expect(codes(radiusExtrapolation, three)).toEqual(['engine/few-radii stops-lodging']);
  });
  it('what every run shows is said once', () => {
    const { findings } = measureSeries(radiusExtrapolation, [60, 80, 110, 130].map((r) => atRadius(r, r)));
    expect(findings.map(({ code }) => code)).toEqual(['engine/modes-missing']);
    expect(findings[0]).toMatchObject({ where: 'r130', text: expect.stringMatching(/The same is found in r60, r80 and r110\.$/) as string });
  });
  it('coordinate times with a start in them', () => {
    const series = [60, 80, 110, 130].map((r) => atRadius(r, r, { timeLabel: 'coordinate' }));
    expect(codes(radiusExtrapolation, series, { observable: 'phase-at-peak', startM: 20 })).toContain('engine/time-label worth-a-look');
    expect(codes(radiusExtrapolation, series, { observable: 'amplitude-at-peak' })).not.toContain('engine/time-label worth-a-look');
  });
});

describe('unit and tolerance', () => {
  it.each<[DeclaredSettings, string, number]>([
    [{}, '', 0.01 * 3],
    [{ observable: 'recoil' }, 'km/s', 5],
    [{ observable: 'peak-luminosity' }, 'c⁵/G', 0.03 * 3],
    [{ observable: 'phase-at-peak' }, 'rad', 0.02],
    [{ observable: 'amplitude-at-peak' }, '', 1e-3 * 3],
    [{ observable: 'cycles' }, '', 0.05],
  ])('of a limit follow the observable: %j', (settings, unit, tolerance) => {
    for (const quantity of [extrapolatedValue, radiusExtrapolation]) {
      expect(unitOf(quantity, settings)).toBe(unit);
      expect(quantity.naturalTolerance(3, settings)).toAgreeWith(tolerance, 1e-15);
    }
  });
  it('of an order are none and a half', () => {
    expect(unitOf(convergenceOrder, { observable: 'recoil' })).toBe('');
    expect(convergenceOrder.naturalTolerance(4)).toBe(0.5);
  });
});

describe('the budget', () => {
  it('knows of truncation what a fourth run shows, and of radius what other radii show', () => {
    const line = (quantity: Quantity, series: readonly Waveform[], id: string, settings: DeclaredSettings = {}) => measureSeries(quantity, series, settings).budget.find((entry) => entry.id === id)!;
    expect(line(convergenceOrder, three, 'E05').u).toBeNull();
    expect(line(convergenceOrder, [clean(64), ...three], 'E05').u).toAgreeWith(0, 1e-7);
    const settings = { observable: 'amplitude-at-peak', formalOrder: 4 } as const;
    const at200 = [80, 96, 112].map((n) => runOf({ phaseRad: 0, amplitude: 1e-3 * (80 / n) ** 4 - 1.5 / 200 }, { name: `n${n}`, resolution: 1 / n, extractionRadiusM: 200 }));
    const atOthers = [60, 100, 150].map((r) => runOf({ phaseRad: 0, amplitude: 1e-3 * (80 / 112) ** 4 - 1.5 / r }, { name: `r${r}`, resolution: 1 / 112, extractionRadiusM: r }));
    expect(line(extrapolatedValue, at200, 'E06', settings).u).toBeNull();
    expect(line(extrapolatedValue, [...at200, ...atOthers], 'E06', settings).u).toAgreeWith((0.327035 * 1.5) / 200 / Math.sqrt(3), { relative: 0.01 });
  });
  it('lets what one knob does to all runs alike cancel in an order', () => {
    const { budget, points } = measureSeries(convergenceOrder, three, { observable: 'phase-at-peak' });
    expect(budget.find(({ id }) => id === 'E01')!.u).toBeLessThan(1e-5);
    expect(Math.abs(points[0]!.routes.A! - points[0]!.routes.B!)).toBeLessThan(1e-4);
  });
});

describe('perturbation theory from one radius', () => {
  // X = f′ of a pulse f, so that ∫X dt = f: (1 − 2/r)[f′ − (ℓ−1)(ℓ+2)/(2r) f].
  it('takes off the integral of each mode by its ℓ', () => {
    const axis = evenTimes(-200, 200, 0.25);
    const pulse = (t: number): readonly [number, number] => [Math.exp(-t * t / 400) * Math.cos(0.5 * t), -Math.exp(-t * t / 400) * Math.sin(0.5 * t)];
    const slope = (t: number): readonly [number, number] => {
      const [re, im] = pulse(t);
      return [(-t / 200) * re + 0.5 * im, (-t / 200) * im - 0.5 * re];
    };
    const given = modeSet(axis, [modeFrom(axis, 2, 2, slope), modeFrom(axis, 3, 3, slope)], 'news');
    const found = atInfinity(given, 100, { integrationFloor: 0.02 })!;
    if (found.content.kind !== 'modes') throw new Error('no modes');
    const i = found.axis.findIndex((t) => t >= 3);
    const t = found.axis[i]!;
    for (const [k, share] of [[0, 4 / 200], [1, 10 / 200]] as const) {
      expect(found.content.modes[k]!.re[i]).toAgreeWith(0.98 * (slope(t)[0] - share * pulse(t)[0]), 1e-6);
      expect(found.content.modes[k]!.im[i]).toAgreeWith(0.98 * (slope(t)[1] - share * pulse(t)[1]), 1e-6);
    }
  });
});

describe('figures', () => {
  it('scale the finer difference onto the coarser one', () => {
    const { figures } = measureSeries(convergenceOrder, three, {}, { withFigures: true, claimed: [4] });
    const [coarse, fine, claimed] = figures[0]!.series;
    const middle = Math.floor(coarse!.values.length / 2);
    expect(fine!.values[middle]).toAgreeWith(coarse!.values[middle]!, { relative: 1e-6 });
    expect(claimed!.role).toBe('claimed');
    expect(figures.every(({ x, series }) => series.every(({ values }) => values.length === x.values.length))).toBe(true);
  });
  it('carry the runs to the limit at the left edge', () => {
    const { figures, points } = measureSeries(radiusExtrapolation, [60, 80, 110, 130].map((r) => atRadius(r, r)), { observable: 'amplitude-at-peak' }, { withFigures: true });
    const law = figures[0]!.series.find(({ role }) => role === 'recomputed')!;
    expect(figures[0]!.x.values[0]).toBe(0);
    expect(law.values[0]).toAgreeWith(points[0]!.value!, 1e-12);
  });
});
