import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { emMirroring } from '@/lib/engine/quantities/em-mirroring';
import { bothRoutes, codesOf, measureOfRoles, phi2Set } from '../../../golden/electromagnetic-signals';
import { evenTimes, gaussian, modeFrom, modeSet } from '../../../golden/energy-signals';

const axis = evenTimes(-260, 160, 0.5);
const shape = (t: number): readonly [number, number] => {
  const [size, phase] = [0.08 / Math.cosh(t / 45), 0.3 * t + 4e-4 * t * t];
  return [size * Math.cos(phase), -size * Math.sin(phase)];
};
const gw: Waveform = { ...modeSet(axis, [modeFrom(axis, 2, 2, shape)], 'psi4'), name: 'G' };
/** φ₂ = c·ψ₄ delayed, with a ratio and a phase that wave slowly. */
const light = (by: number, wave = 0, turn = 0): Waveform =>
  phi2Set(axis, [
    modeFrom(axis, 2, 2, (t) => {
      const [re, im] = shape(t - by);
      const [a, p] = [3e-6 * (1 + wave * Math.cos((2 * Math.PI * (t - by)) / 70)), turn * Math.cos((2 * Math.PI * (t - by)) / 70) + 0.4];
      return [a * (re * Math.cos(p) - im * Math.sin(p)), a * (re * Math.sin(p) + im * Math.cos(p))];
    }),
  ]);

describe('the mirroring of two waves', () => {
  it('is perfect for a constant ratio, whatever the delay, by both routes', () => {
    const measured = measureOfRoles(emMirroring, { em: light(17.3), gw });
    for (const value of bothRoutes(measured)) expect(value).toAgreeWith(0, 1e-7);
    expect(measured.points[0]!.components!.meanRatio).toAgreeWith(3e-6, { relative: 1e-7 });
    expect(measured.points[0]!.components!.phaseRms).toAgreeWith(0, 1e-6);
    expect(codesOf(measured)).toEqual([]);
  });
  it('is the spread that was put in, over two whole periods of it', () => {
    // A cosine over whole periods has a standard deviation of 1/√2; its crest at the peak moves no peak.
    const measured = measureOfRoles(emMirroring, { em: light(0, 0.04, 0.2), gw });
    for (const value of bothRoutes(measured)) expect(value).toAgreeWith(0.04 / Math.SQRT2, 1e-6);
    expect(measured.points[0]!.components!.phaseRms).toAgreeWith(0.2 / Math.SQRT2, 1e-5);
  });
  it('covers the difference of its routes, and counts the digits of both files', () => {
    const measured = measureOfRoles(emMirroring, { em: { ...light(3.21), significantDigits: 6 }, gw: { ...gw, significantDigits: 5 } });
    const [A, B] = bothRoutes(measured);
    expect(Math.abs(A! - B!)).toBeLessThan(measured.points[0]!.expandedUncertainty!);
    expect(measured.budget.find(({ id }) => id === 'rounding')!.u).toAgreeWith((0.5e-4 * Math.hypot(1, 0.1)) / Math.sqrt(3), { relative: 1e-9 });
    expect(measured.assumed).toEqual(['window']);
  });
  it('takes ψ₄ from strain and news by differentiation', () => {
    const times = evenTimes(-150, 150, 0.5);
    const em = phi2Set(times, [modeFrom(times, 2, 2, gaussian(2e-6, 25, 0.4, 2))]);
    const window = [-35, 35] as const;
    for (const [variable, order] of [['strain', 0], ['news', 1]] as const) {
      const waves = { ...modeSet(times, [modeFrom(times, 2, 2, gaussian(0.3, 25, 0.4, order))], variable), name: 'G' };
      const measured = measureOfRoles(emMirroring, { em, gw: waves }, { window });
      for (const value of bothRoutes(measured)) expect(value).toAgreeWith(0, 1e-6);
      expect(measured.points[0]!.components!.meanRatio).toAgreeWith(2e-6 / 0.3, { relative: 1e-6 });
      expect(measured.budget.map(({ id }) => id).slice(0, 3)).toEqual(['E01', 'E02', 'rounding']);
    }
  });
  it('has no number without the mode or a peak, and says where the window was cut', () => {
    expect(codesOf(measureOfRoles(emMirroring, { em: light(0), gw }, { modes: [[3, 3]] }))).toEqual(['engine/modes-missing stops-lodging']);
    const rising = evenTimes(-260, -10, 0.5);
    expect(codesOf(measureOfRoles(emMirroring, { em: light(0), gw: { ...modeSet(rising, [modeFrom(rising, 2, 2, shape)], 'psi4'), name: 'G' } }))).toEqual(['engine/no-signal stops-lodging']);
    const short = evenTimes(-60, 160, 0.5);
    const cut = { ...modeSet(short, [modeFrom(short, 2, 2, shape)], 'psi4'), name: 'G' };
    expect(codesOf(measureOfRoles(emMirroring, { em: light(0), gw: cut }))).toEqual(['engine/short-window worth-a-look']);
    const shorter = evenTimes(-20, 160, 0.5);
    expect(codesOf(measureOfRoles(emMirroring, { em: light(0), gw: { ...cut, ...modeSet(shorter, [modeFrom(shorter, 2, 2, shape)], 'psi4') } }))).toEqual(['engine/no-signal stops-lodging']);
  });
  it('asks about a gravitational mode that was mirrored', () => {
    const conjugate = phi2Set(axis, [modeFrom(axis, 2, -2, (t) => [shape(t)[0], -shape(t)[1]])]);
    expect(codesOf(measureOfRoles(emMirroring, { em: conjugate, gw: { ...gw, negativeM: null } }, { modes: [[2, -2]] }))).toEqual(['engine/negative-m-assumed needs-answer']);
  });
  it('draws both amplitudes over each other', () => {
    const [figure] = measureOfRoles(emMirroring, { em: light(17.3), gw }, {}, null, true).figures;
    const [waves, emitted, left] = figure!.series.map(({ values }) => values);
    emitted!.forEach((value, i) => value !== null && expect(value).toAgreeWith(waves![i]!, { relative: 1e-3 }));
    expect(Math.max(...left!.map((x) => Math.abs((x ?? 0.4) - 0.4)))).toBeLessThan(1e-2);
  });
});
