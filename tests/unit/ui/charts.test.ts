import { describe, expect, it } from 'vitest';
import type { Figure } from '@/lib/engine/contract/measurement';
import { axisScale } from '@/app/_ui/charts/axis-scale';
import { nearestIndex } from '@/app/_ui/charts/cursor-link';
import { cursorGroup, panelsOf } from '@/app/_ui/charts/panels';
import { plotSpec } from '@/app/_ui/charts/plot-options';
import { readoutOf, steppedIndex } from '@/app/_ui/charts/readout';
import { light } from '@/app/_ui/tokens';
import { figureFixture, must } from './fixtures/result';

const figure = (kind: Figure['kind']): Figure => must(figureFixture.find((f) => f.kind === kind));

describe('panels of a figure', () => {
  it('put the residual and any other unit below, never on a second vertical axis', () => {
    expect(panelsOf(figure('waveforms')).map((p) => p.series.map((s) => s.role))).toEqual([['claimed', 'recomputed'], ['residual']]);
    expect(panelsOf(figure('integrand')).map((p) => p.unit)).toEqual(['', 'Hz^-1/2']);
  });
  it('print the horizontal axis once, at the foot', () => {
    expect(panelsOf(figure('waveforms')).map((p) => p.showsX)).toEqual([false, true]);
  });
  it('share a cursor within a claim when their horizontal axes mean the same', () => {
    const [waveforms, sweep] = [figure('waveforms'), figure('sweep')];
    expect(cursorGroup('C1', waveforms)).not.toBe(cursorGroup('C1', sweep));
    expect(cursorGroup('C1', waveforms)).not.toBe(cursorGroup('C2', waveforms));
    expect(cursorGroup('C1', { ...sweep, title: 'other' })).toBe(cursorGroup('C1', sweep));
  });
});

describe('a plot’s options', () => {
  it('take colours from the theme in use: claimed solid orange, recomputed dashed blue where both run together', () => {
    const [main] = panelsOf(figure('waveforms'));
    const { options } = plotSpec(figure('waveforms'), must(main), light);
    expect(options.series.slice(1).map((s) => s.stroke)).toEqual([light['trace-claimed'], light['trace-recomputed']]);
    expect(options.series.slice(1).map((s) => s.dash)).toEqual([undefined, [5, 3]]);
  });
  it('draw claimed values of a sweep as points on the curve, and the error band filled between its edges', () => {
    const [main] = panelsOf(figure('sweep'));
    const { options, data } = plotSpec(figure('sweep'), must(main), light);
    const claimed = must(main).series.findIndex((s) => s.role === 'claimed') + 1;
    expect(options.series[claimed]?.points).toMatchObject({ show: true });
    expect(options.series[claimed]?.width).toBe(0);
    const band = options.bands?.[0]?.series as [number, number];
    expect(band.map((i) => must(main).series[i - 1]?.role)).toEqual(['band-high', 'band-low']);
    expect(data).toHaveLength(must(main).series.length + 1);
  });
});

describe('an axis', () => {
  it('draws a logarithm where the values allow one, with decades as labels', () => {
    const axis = axisScale('log', [1e-24, 1e-20]);
    expect(axis.toPlot(1e-22)).toBeCloseTo(-22, 9);
    expect(axis.toPlot(0)).toBeNull();
    const places = axis.ticks?.(-24, -20) ?? [];
    expect(axis.labels(places)).toEqual(['10⁻²⁴', '10⁻²³', '10⁻²²', '10⁻²¹', '10⁻²⁰']);
  });
  it('marks 1, 2 and 5 on a short log axis, as frequencies want', () => {
    const axis = axisScale('log', [10, 1000]);
    expect(axis.labels(axis.ticks?.(1, 3) ?? [])).toEqual(['10', '20', '50', '100', '200', '500', '1,000']);
  });
  it('falls back to a linear one for values at or below zero', () => {
    expect(axisScale('log', [-1, 10]).ticks).toBeNull();
    expect(axisScale('log', [0, 10]).toPlot(5)).toBe(5);
  });
  it('keeps the decimals that tell its ticks apart', () => {
    const axis = axisScale('linear', [0.8, 1]);
    expect(axis.labels([0.8, 0.85, 0.9, 0.95, 1])).toEqual(['0.80', '0.85', '0.90', '0.95', '1.00']);
    expect(axis.labels([50, 75, 100])).toEqual(['50', '75', '100']);
    expect(axis.labels([0, 0.025, 0.05])).toEqual(['0.000', '0.025', '0.050']);
  });
  it('names the power of ten of very small values instead of printing a row of zeros', () => {
    const axis = axisScale('linear', [0, 4e-46]);
    expect(axis.toPlot(4e-46)).toBeCloseTo(4, 9);
    expect(axis.labels([0, 2, 4])).toEqual(['0', '2 × 10⁻⁴⁶', '4 × 10⁻⁴⁶']);
  });
});

describe('the cursor', () => {
  it('reads each trace with its unit, and a band with the value it belongs to', () => {
    const sweep = figure('sweep');
    const text = readoutOf(sweep, sweep.x.values.indexOf(60));
    expect(text).toMatch(/^at 60\.0 M⊙: /);
    expect(text).toContain('claimed = 0.97530');
    expect(text).toMatch(/recomputed = 0\.91900, band 0\.91500 to 0\.92300/);
    expect(readoutOf(figure('integrand'), 0)).toContain('Hz⁻¹ᐟ²');
  });
  it('moves by arrows and pages and stops at the ends', () => {
    expect(steppedIndex('ArrowRight', 10, 101, false)).toBe(11);
    expect(steppedIndex('ArrowLeft', 0, 101, false)).toBe(0);
    expect(steppedIndex('PageUp', 95, 101, false)).toBe(100);
    expect(steppedIndex('Home', 50, 101, false)).toBe(0);
    expect(steppedIndex('x', 50, 101, false)).toBeNull();
  });
  it('finds the nearest sample of an uneven axis', () => {
    expect([-5, 0.4, 0.6, 2.1, 99].map((x) => nearestIndex([0, 1, 2, 10], x))).toEqual([0, 0, 1, 2, 3]);
  });
});
