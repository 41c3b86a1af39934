import { describe, expect, it } from 'vitest';
import { parseClaimSheet } from '@/lib/claims/parse-sheet';
import type { Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { peakLuminosity } from '@/lib/engine/quantities/peak-luminosity';
import { radiatedAngularMomentum } from '@/lib/engine/quantities/radiated-angular-momentum';
import { recoil } from '@/lib/engine/quantities/recoil';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { catalogue } from '@/lib/pipeline/catalogue';
import { C_KM_PER_S } from '@/lib/engine/units/constants';
import { evenTimes, gaussian, measureOf, modeFrom, modeSet, numberBy } from '../../../golden/energy-signals';

const axis = evenTimes(-100, 80, 0.25);
const mode = (l: number, m: number, amplitude: number, omega = 0.35): Mode => modeFrom(axis, l, m, gaussian(amplitude, 9, omega, 0));
const upper = [mode(2, 2, 0.12), mode(2, 1, 0.02, 0.2), mode(3, 3, 0.03, 0.5)];
const wave: Waveform = { ...modeSet(axis, upper), negativeM: 'mirror' };
const all: readonly Quantity[] = [radiatedAngularMomentum, peakLuminosity, recoil];
const codes = (quantity: Quantity, w: Waveform, settings: DeclaredSettings = {}): string[] => measureOf(quantity, w, settings).findings.map(({ code, level }) => `${code} ${level}`);
const only = (...modes: Mode[]): Waveform => ({ ...wave, content: { kind: 'modes', modes } });

describe.each(all.map((quantity) => [quantity.id, quantity] as const))('%s', (_, quantity) => {
  it('has two routes that agree within U, also when it starts inside the burst', () => {
    for (const settings of [{}, { startM: -7.33 }, { startM: 3 }, { lMax: 3 }]) {
      const [point] = measureOf(quantity, wave, settings).points;
      expect(Math.abs(point!.routes.A! - point!.routes.B!)).toBeLessThanOrEqual(Math.max(point!.expandedUncertainty!, 1e-9 * Math.abs(point!.value!)));
    }
  });

  it.each(['news', 'psi4'] as const)('has two routes that agree from %s, also when the floor bites', (variable) => {
    const given = { ...modeSet(axis, [[2, 2, 0.12, 0.35], [2, 1, 0.02, 0.2], [3, 3, 0.03, 0.5]].map(([l, m, a, w]) => modeFrom(axis, l!, m!, gaussian(a!, 9, w!, variable === 'news' ? 1 : 2))), variable), negativeM: 'mirror' as const };
    for (const integrationFloor of [0.05, 0.3]) {
      for (const startM of [-100, -4.1]) {
        const settings = { integrationFloor, startM };
        expect(numberBy(quantity, 'B', given, settings) / numberBy(quantity, 'A', given, settings)).toAgreeWith(1, 1e-7);
      }
    }
  });

  it('makes U of the computation alone and lists what one file cannot show as unknown', () => {
    const { budget, points } = measureOf(quantity, { ...wave, significantDigits: 6 });
    const own = budget.filter(({ group }) => group === 'computation').map(({ u }) => u!);
    expect(2 * Math.hypot(...own)).toAgreeWith(points[0]!.expandedUncertainty!, { relative: 1e-12 });
    expect(budget.map(({ id }) => id)).toEqual(['E01', 'E02', 'rounding', 'E05', 'E06', 'E07', 'E09']);
    // What ℓ = 3 adds to the recoil here is more than ℓ = 2 alone gives: no series to continue.
    expect(budget.filter(({ u }) => u === null).map(({ id }) => id)).toEqual(quantity === recoil ? ['E05', 'E06', 'E09'] : ['E05', 'E06']);
  });

  it('covers with U what printing the file with four digits does', () => {
    const round = (x: number): number => Number(x.toPrecision(4));
    const rounded = { ...wave, significantDigits: 4, content: { kind: 'modes' as const, modes: upper.map((m) => ({ ...m, re: m.re.map(round), im: m.im.map(round) })) } };
    const [point] = measureOf(quantity, rounded).points;
    const off = Math.abs(point!.value! - numberBy(quantity, 'A', wave));
    expect(off).toBeGreaterThan(0);
    expect(point!.expandedUncertainty!).toBeGreaterThan(off);
    expect(point!.expandedUncertainty!).toBeLessThan(2e-2 * point!.value!);
  });

  it.each([
    ['a start outside the record', wave, { startM: 500 }],
    ['modes that are not there', wave, { modes: [[4, 4]] as const }],
    ['one line of sight', { ...wave, content: { kind: 'line-of-sight' as const, plus: axis, cross: null } }, {}],
    ['silence', only(mode(2, 2, 0), mode(2, 1, 0), mode(3, 3, 0)), {}],
  ])('stops at %s, and says why', (__, w, settings) => {
    const m = measureOf(quantity, w as Waveform, settings);
    expect(m.points.every((p) => p.value === null)).toBe(true);
    expect(m.findings.length).toBeGreaterThan(0);
    for (const finding of m.findings) {
      expect(finding.level).toBe('stops-lodging');
      expect(finding.text).not.toContain('NaN');
      expect(finding.fix).toBeTruthy();
    }
  });

  it.each([Number.NaN, 1e200])('gives no finite number where a sample is %d', (bad) => {
    const broken = upper.map((m) => ({ ...m, re: m.re.map((x, i) => (i === 400 ? bad : x)) }));
    const { points } = measureOf(quantity, only(...broken));
    expect(points.some(({ value, expandedUncertainty }) => Number.isFinite(value) && Number.isFinite(expandedUncertainty))).toBe(false);
  });

  it('asks when partners with m < 0 were made up', () => {
    expect(codes(quantity, { ...wave, negativeM: null })).toEqual(['engine/negative-m-assumed needs-answer']);
    expect(codes(quantity, wave)).toEqual([]);
    expect(measureOf(quantity, { ...wave, negativeM: null }).assumed).toContain('negativeM');
    expect(measureOf(quantity, { ...wave, negativeM: null }).settings).toContainEqual({ name: 'negativeM', value: 'mirror', standing: 'assumed' });
    expect(measureOf(quantity, wave).assumed).not.toContain('negativeM');
    // Where none of those made up is used, the rule decides nothing.
    expect(measureOf(quantity, { ...wave, negativeM: null }, { modes: [[2, 2], [2, 1]] }).assumed).not.toContain('negativeM');
  });

  it('is swept over its start and its highest ℓ', () => {
    const m = measureOf(quantity, wave, {}, { setting: 'startM', values: [-50, -10, 0] });
    expect(m.routeBPoints).toEqual([0, 1, 2]);
    expect(m.points.every(({ value }) => Number.isFinite(value))).toBe(true);
  });

  it('draws a flux and what it adds up to, and gives the same bytes twice', () => {
    const [once, twice] = [measureOf(quantity, wave, {}, null, true), measureOf(quantity, wave, {}, null, true)];
    expect(JSON.stringify(once)).toBe(JSON.stringify(twice));
    expect(once.figures.length).toBe(quantity === peakLuminosity ? 2 : 1);
    const [figure, byMode] = once.figures;
    for (const { label, unit, scale, values } of byMode?.series ?? []) expect([/^\(\d,−?\d\): flux$/.test(label), unit, scale, values.every((y) => y === null || y > 0)]).toEqual([true, 'c⁵/G', 'log', true]);
    expect(figure!.series.map(({ axis: side }) => side)).toEqual(['left', 'right']);
    for (const { values } of figure!.series) expect(values.every((y) => Number.isFinite(y))).toBe(true);
  });
});

describe('radiated angular momentum', () => {
  it('claims the part along z, positive for waves that turn as the house has it', () => {
    const [point] = measureOf(radiatedAngularMomentum, wave).points;
    expect(point!.value).toBe(point!.components!.z);
    expect(point!.value!).toBeGreaterThan(0);
    const backwards = upper.map((m) => ({ ...m, im: m.im.map((y) => -y) }));
    expect(numberBy(radiatedAngularMomentum, 'A', only(...backwards))).toAgreeWith(-point!.value!, { relative: 1e-12 });
  });

  it.each(['news', 'psi4'] as const)('divides by the floor alike in frequency and in time where %s does not average to nothing', (variable) => {
    const slow = { ...modeSet(axis, [modeFrom(axis, 2, 2, gaussian(0.01, 9, 0.02, 0)), modeFrom(axis, 3, 1, gaussian(0.01, 12, 0, 0))], variable), negativeM: 'given' as const };
    for (const integrationFloor of [0.01, 0.06, 0.3]) {
      const [a, b] = (['A', 'B'] as const).map((route) => numberBy(radiatedAngularMomentum, route, slow, { integrationFloor }));
      expect(b! / a!).toAgreeWith(1, 1e-7);
    }
  });

  it('lists the floor for news too, because the strain has to be integrated', () => {
    const news = { ...modeSet(axis, [modeFrom(axis, 2, 2, gaussian(0.1, 9, 0.35, 1)), modeFrom(axis, 3, 3, gaussian(0.01, 9, 0.5, 1))], 'news'), negativeM: 'mirror' as const };
    expect(measureOf(radiatedAngularMomentum, news).budget.map(({ id }) => id)).toContain('E08');
    expect(measureOf(radiatedAngularMomentum, news).assumed).toContain('integrationFloor');
    expect(measureOf(peakLuminosity, news).budget.map(({ id }) => id)).not.toContain('E08');
  });

  it('refuses to add what was radiated before the start, and says that it has no bound', () => {
    const claim = { id: 'C1', quantity: 'radiated-angular-momentum', of: { a: 'A' }, settings: { includeEnergyBeforeStart: true }, claimed: '0.4' };
    const sheet = parseClaimSheet({ format: 'counterfoil-claim/1', title: 'T', waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] } }, claims: [claim] }, catalogue);
    const [problem] = sheet.ok ? [] : sheet.error;
    expect(problem?.where).toBe('/claims/0/settings/includeEnergyBeforeStart');
    expect(problem?.hint).toContain('no bound');
  });
});

describe('peak luminosity', () => {
  it('says when, and how many erg a second', () => {
    const { components, value } = measureOf(peakLuminosity, only(mode(2, 2, 0.12))).points[0]!;
    expect(components!.timeM).toAgreeWith(0, 1e-6);
    expect(components!.ergPerS! / value!).toAgreeWith(3.62825e59, { relative: 1e-5 });
  });

  it('is a lower bound when the record ends or the interval begins beside it', () => {
    const [before, after] = [measureOf(peakLuminosity, { ...wave, axis: axis.subarray(0, 300), content: { kind: 'modes', modes: upper.map((m) => ({ ...m, re: m.re.subarray(0, 300), im: m.im.subarray(0, 300) })) } }), measureOf(peakLuminosity, wave, { startM: 6.1 })];
    for (const m of [before, after]) {
      expect(m.points[0]!.remarks).toEqual(['lower bound only']);
      expect(m.findings.map(({ code }) => code)).toContain('engine/peak-at-edge');
      expect(m.points[0]!.routes.B! / m.points[0]!.routes.A!).toAgreeWith(1, 1e-6);
    }
    expect(after.points[0]!.components!.timeM).toBe(6.1);
  });
});

describe('recoil', () => {
  it('refers to the remnant: the stated one, else M less what is radiated; to M when asked', () => {
    const energy = numberBy(radiatedEnergy, 'A', wave);
    const ofM = numberBy(recoil, 'A', wave, { normaliseBy: 'M' });
    expect(numberBy(recoil, 'A', wave)).toAgreeWith(ofM / (1 - energy), { relative: 1e-12 });
    expect(numberBy(recoil, 'B', wave)).toAgreeWith(ofM / (1 - energy), { relative: 1e-8 });
    expect(numberBy(recoil, 'A', { ...wave, binary: { remnantMass: 0.9 } })).toAgreeWith(ofM / 0.9, { relative: 1e-12 });
    expect(codes(recoil, wave, { normaliseBy: 'adm' })).toEqual(['engine/normaliser-missing stops-lodging']);
    expect(measureOf(recoil, wave).assumed).toEqual(['modes', 'startM', 'normaliseBy']);
  });

  it('points away from what was radiated, with a direction in the file’s axes', () => {
    const { components, value } = measureOf(recoil, wave).points[0]!;
    const { vx, vy, vz, inPlane, directionDeg } = components! as Record<string, number>;
    expect(Math.hypot(vx!, vy!, vz!)).toAgreeWith(value!, { relative: 1e-12 });
    expect(Math.hypot(vx!, vy!)).toAgreeWith(inPlane!, { relative: 1e-12 });
    expect(Math.cos((directionDeg! * Math.PI) / 180) * inPlane!).toAgreeWith(vx!, 1e-9);
    expect(value!).toBeLessThan(C_KM_PER_S);
  });

  it('stops without the neighbouring modes, and names them', () => {
    const m = measureOf(recoil, only(mode(2, 2, 0.12), mode(4, 4, 0.01)));
    expect(m.findings.map(({ code, level }) => `${code} ${level}`)).toEqual(['engine/modes-missing stops-lodging']);
    expect(m.findings[0]!.text).toContain('(2,1), (2,-1), (3,3), (3,-3)');
    expect(m.points[0]!.value).toBeNull();
  });

  it('takes modes that stand alone by declaration, and looks where no two are neighbours', () => {
    expect(codes(recoil, { ...only(mode(2, 2, 0.12), mode(3, 3, 0.03)), negativeM: 'none' })).toEqual(['engine/modes-missing worth-a-look']);
    const lone = measureOf(recoil, { ...only(mode(2, 2, 0.12)), negativeM: 'none' });
    const energy = numberBy(radiatedEnergy, 'A', { ...only(mode(2, 2, 0.12)), negativeM: 'none' });
    // A lone mode pushes along z by c(ℓ,m) = 2m/(ℓ(ℓ+1)) of its energy: 2/3 for (2,2).
    for (const route of ['A', 'B'] as const) expect(lone.points[0]!.routes[route]!).toAgreeWith(((2 / 3) * energy * C_KM_PER_S) / (1 - energy), { relative: 1e-8 });
    expect(lone.findings.map(({ level }) => level)).toEqual(['worth-a-look', 'worth-a-look']);
    expect(lone.findings[0]!.text).toContain('no two are neighbours');
  });

  it('is zero, with a look, for (2,±2) listed alone out of a whole file', () => {
    const { points, findings } = measureOf(recoil, wave, { modes: [[2, 2], [2, -2]] });
    expect(points[0]!.value).toAgreeWith(0, 1e-9);
    expect(points[0]!.components!.directionDeg).toBeNull();
    expect(points[0]!.routes.B!).toAgreeWith(0, 1e-9);
    expect(findings.map(({ code, level }) => `${code} ${level}`)).toEqual(['engine/modes-missing worth-a-look']);
  });

  it('keeps its natural tolerance at 5 km/s for slow remnants', () => {
    expect(recoil.naturalTolerance(20)).toBe(5);
    expect(recoil.naturalTolerance(400)).toBe(20);
    expect(radiatedAngularMomentum.naturalTolerance(0.4)).toAgreeWith(0.008, 1e-12);
    expect(peakLuminosity.naturalTolerance(1e-3)).toAgreeWith(3e-5, 1e-12);
  });
});
