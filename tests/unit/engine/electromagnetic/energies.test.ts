import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { emEnergy } from '@/lib/engine/quantities/em-energy';
import { emRatio } from '@/lib/engine/quantities/em-ratio';
import { fieldExponent } from '@/lib/engine/quantities/field-exponent';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { mirroredField, withPlateau } from '@/lib/engine/synthesis/electromagnetic-twin';
import { bothRoutes, codesOf, measureOfRoles, phi2Set, ringing, ringTimes } from '../../../golden/electromagnetic-signals';
import { modeSet } from '../../../golden/energy-signals';

const UNIT = 2.35596e19;
const wave = { t: ringTimes, modes: [ringing()] };
const at = (fieldGauss: number, massMsun: number, more: Partial<Waveform> = {}): Waveform => phi2Set(ringTimes, mirroredField(wave, (fieldGauss * massMsun) / UNIT).modes, { ownTotalMassMsun: massMsun, binary: { fieldGauss }, ...more });
const weak = at(1e4, 1e8);
const hat = (1e4 * 1e8) / UNIT;

describe('an electromagnetic energy', () => {
  it('is 0.56 B̂² as it was made, by both routes, with what it is in erg', () => {
    const measured = measureOfRoles(emEnergy, { a: weak });
    for (const value of bothRoutes(measured)) expect(value).toAgreeWith(0.56 * hat * hat, { relative: 1e-6 });
    const { erg, fieldHat, peakErgPerS } = measured.points[0]!.components!;
    expect(fieldHat).toAgreeWith(hat, { relative: 1e-12 });
    expect(erg).toAgreeWith(measured.points[0]!.value! * 1e8 * 1.78707e54, { relative: 1e-4 });
    expect(peakErgPerS).toBeGreaterThan(erg! / (420 * 1e8 * 4.9255e-6));
    expect(codesOf(measured)).toEqual([]);
    expect(measured.assumed).toEqual(['startM', 'tetrad']);
    expect(measureOfRoles(emEnergy, { a: { ...weak, tetrad: 'symmetric' } }).assumed).toEqual(['startM']);
  });
  it('goes to another field and mass with B̂², and takes from the file what the claim leaves out', () => {
    const value = measureOfRoles(emEnergy, { a: weak }).points[0]!.value!;
    const to = (settings: object) => measureOfRoles(emEnergy, { a: weak }, settings).points[0]!;
    expect(to({ fieldGauss: 1e6, totalMassMsun: 1e7 }).value).toAgreeWith(100 * value, { relative: 1e-12 });
    expect(to({ fieldGauss: 3e4 }).value).toAgreeWith(9 * value, { relative: 1e-12 });
    expect(to({ totalMassMsun: 2e8 }).value).toAgreeWith(4 * value, { relative: 1e-12 });
    expect(to({ fieldGauss: 1e6, totalMassMsun: 1e7 }).components!.fieldHat).toAgreeWith(10 * hat, { relative: 1e-12 });
  });
  it('per field is an energy over M·B̂² until a field is named', () => {
    const bare = phi2Set(ringTimes, mirroredField(wave, 1).modes, { amplitudeUnit: 'perField' });
    const asItStands = measureOfRoles(emEnergy, { a: bare });
    expect(asItStands.points[0]!.value).toAgreeWith(0.56, { relative: 1e-6 });
    expect(asItStands.points[0]!.components).toEqual({ erg: null, fieldHat: null, peakErgPerS: null });
    expect(codesOf(asItStands)).toEqual(['engine/per-field note']);
    const named = measureOfRoles(emEnergy, { a: bare }, { fieldGauss: 1e4, totalMassMsun: 1e8 });
    expect(named.points[0]!.value).toAgreeWith(0.56 * hat * hat, { relative: 1e-6 });
    expect(codesOf(named)).toEqual([]);
  });
  it('stops where it should be rescaled and a field or mass is not known', () => {
    const unknown = phi2Set(ringTimes, weak.content.kind === 'modes' ? weak.content.modes : []);
    const stopped = (a: Waveform, settings: object, over: Parameters<typeof measureOfRoles>[3] = null) => codesOf(measureOfRoles(emEnergy, { a }, settings, over));
    const noField = ['engine/no-field stops-lodging'];
    expect(stopped(unknown, { fieldGauss: 1e6, totalMassMsun: 1e8 })).toEqual(noField);
    expect(stopped(unknown, {}, { setting: 'totalMassMsun', values: [1e7, 1e8] })).toEqual(noField);
    expect(stopped({ ...weak, ownTotalMassMsun: null }, { fieldGauss: 1e6 })).toEqual(noField);
    expect(stopped({ ...unknown, amplitudeUnit: 'perField' }, { totalMassMsun: 1e8 })).toEqual(noField);
  });
  it('takes a mass alone for erg where the file states no field', () => {
    const unknown = phi2Set(ringTimes, weak.content.kind === 'modes' ? weak.content.modes : []);
    const [point] = measureOfRoles(emEnergy, { a: unknown }, { totalMassMsun: 1e8 }).points;
    expect(point!.value).toAgreeWith(0.56 * hat * hat, { relative: 1e-6 });
    expect(point!.components!.erg).toAgreeWith(1.803e47, { relative: 1e-3 });
    expect(point!.components!.fieldHat).toBeNull();
  });
  it('sees a background before the signal, and none in a clean record', () => {
    for (const share of [0.01, 0.02, 0.2]) expect(codesOf(measureOfRoles(emEnergy, { a: phi2Set(ringTimes, withPlateau(wave, share).modes) }))).toEqual(['engine/early-plateau worth-a-look']);
    expect(codesOf(measureOfRoles(emEnergy, { a: phi2Set(ringTimes, withPlateau(wave, 0.005).modes) }))).toEqual([]);
  });
  it('says where a field is no test field any more, at any point of a sweep', () => {
    const swept = measureOfRoles(emEnergy, { a: weak }, { totalMassMsun: 1e8 }, { setting: 'fieldGauss', values: [1e4, 1e10] });
    expect(codesOf(swept)).toEqual(['engine/not-test-field worth-a-look']);
    expect(swept.findings[0]!.text).toContain('1×10¹⁰ G and 1×10⁸ M☉, B̂ = 0.042');
    expect(swept.points[1]!.value! / swept.points[0]!.value!).toAgreeWith(1e12, { relative: 1e-12 });
  });
  it('has no number without modes, without a signal, or from a start outside the record', () => {
    const silent = phi2Set(ringTimes, [{ l: 2, m: 2, re: ringTimes.map(() => 0), im: ringTimes.map(() => 0) }]);
    const along: Waveform = { ...weak, content: { kind: 'line-of-sight', plus: ringTimes, cross: null } };
    for (const [a, settings] of [[silent, {}], [along, {}], [weak, { startM: 500 }]] as const) expect(codesOf(measureOfRoles(emEnergy, { a }, settings))).toEqual(['engine/no-signal stops-lodging']);
  });
  it('counts printed digits and coarse steps in U, and lists start and modes beside it', () => {
    const { budget, points } = measureOfRoles(emEnergy, { a: { ...weak, significantDigits: 4 } });
    expect(budget.map(({ id, group }) => `${id} ${group}`)).toEqual(['E01 computation', 'rounding computation', 'E05 coverage', 'E06 coverage', 'E07 coverage', 'E09 coverage']);
    const size = (id: string) => budget.find((line) => line.id === id)!.u;
    expect(size('rounding')).toAgreeWith((points[0]!.value! * 1e-3) / Math.sqrt(3), { relative: 1e-12 });
    expect(points[0]!.expandedUncertainty).toAgreeWith(2 * Math.hypot(size('E01')!, size('rounding')!), { relative: 1e-12 });
    expect([size('E05'), size('E06'), size('E09')]).toEqual([null, null, null]);
  });
  it('draws the luminosity and what was emitted', () => {
    const [figure] = measureOfRoles(emEnergy, { a: weak }, {}, null, true).figures;
    expect(figure!.series.map(({ values }) => values.length)).toEqual([0, 1].map(() => figure!.x.values.length));
    expect(figure!.series[1]!.values.at(-1)).toAgreeWith(0.56 * hat * hat, { relative: 1e-3 });
  });
});

describe('electromagnetic over gravitational energy', () => {
  const gw = { ...modeSet(ringTimes, [ringing()], 'news'), name: 'G', negativeM: 'given' } as const;
  it('is the quotient of both energies, and goes with the square of the field', () => {
    const waves = measureOfRoles(radiatedEnergy, { a: gw }).points[0]!.value!;
    const measured = measureOfRoles(emRatio, { em: weak, gw });
    for (const value of bothRoutes(measured)) expect(value).toAgreeWith((0.56 * hat * hat) / waves, { relative: 1e-6 });
    expect(measured.assumed).not.toContain('negativeM');
    expect(measureOfRoles(emRatio, { em: weak, gw: { ...gw, negativeM: null } }).assumed).toEqual(expect.arrayContaining(['tetrad', 'negativeM']));
    expect(measured.points[0]!.components).toMatchObject({ gwEnergy: waves, fieldHat: hat });
    expect(measureOfRoles(emRatio, { em: weak, gw }, { fieldGauss: 1e5, totalMassMsun: 1e8 }).points[0]!.value).toAgreeWith((56 * hat * hat) / waves, { relative: 1e-6 });
    expect(measured.budget.filter(({ group }) => group === 'computation').map(({ id }) => id)).toEqual(['E01', 'rounding', 'E01', 'E02', 'rounding']);
  });
  it('is no ratio of a test field above a thousandth, whatever the field', () => {
    const codes = codesOf(measureOfRoles(emRatio, { em: weak, gw }, { fieldGauss: 2e9, totalMassMsun: 1e8 }));
    expect(codes).toContain('engine/not-test-field worth-a-look');
    expect(codesOf(measureOfRoles(emRatio, { em: weak, gw }))).not.toContain('engine/not-test-field worth-a-look');
  });
  it('stops with either file, and draws both fluxes over each other', () => {
    expect(codesOf(measureOfRoles(emRatio, { em: weak, gw: { ...gw, unit: 's' } }))).toEqual(['engine/no-signal stops-lodging']);
    const [figure] = measureOfRoles(emRatio, { em: weak, gw }, {}, null, true).figures;
    const [waves, light] = figure!.series.map(({ values }) => values);
    // φ₂ mirrors the news here, so that the two curves are one.
    light!.forEach((value, i) => expect(value).toAgreeWith(waves![i]!, { relative: 1e-9 }));
  });
});

describe('the exponent of the field', () => {
  const run = (fieldGauss: number, by: number, more: Partial<Waveform> = {}): Waveform => ({ ...at(fieldGauss, 1e8), content: { kind: 'modes', modes: mirroredField(wave, by).modes }, name: `P${fieldGauss}`, ...more });
  it('is two for a test field and whatever else was put in, by both routes', () => {
    for (const k of [2, 1, 2.3]) {
      const series = [1e4, 3e4, 1e6].map((field) => run(field, (field / 1e4) ** (k / 2)));
      const measured = measureOfRoles(fieldExponent, { series });
      for (const value of bothRoutes(measured)) expect(value).toAgreeWith(k, 1e-9);
      expect(measured.points[0]!.components!.scatter).toAgreeWith(0, 1e-9);
    }
  });
  it('says how far three files lie from their line, and nothing of two', () => {
    const series = [run(1e4, 1), run(1e5, 10 * Math.exp(0.03)), run(1e6, 100)];
    // ln E is off by 0.06 in the middle: residuals −0.02, 0.04, −0.02, one degree of freedom left.
    const measured = measureOfRoles(fieldExponent, { series });
    expect(measured.points[0]!.value).toAgreeWith(2, 1e-9);
    expect(measured.points[0]!.components!.scatter).toAgreeWith(0.02 * Math.sqrt(6), { relative: 1e-6 });
    expect(measured.budget.find(({ id }) => id === 'scatter')!.u).toAgreeWith((0.02 * Math.sqrt(6)) / (Math.SQRT2 * Math.log(10)), { relative: 1e-6 });
    expect(measureOfRoles(fieldExponent, { series: series.slice(0, 2) }).points[0]!.components!.scatter).toBeNull();
  });
  it('counts files per field with the energy at their own', () => {
    const series = [1e4, 1e6].map((field) => run(field, 1, { amplitudeUnit: 'perField' }));
    for (const value of bothRoutes(measureOfRoles(fieldExponent, { series }))) expect(value).toAgreeWith(2, 1e-12);
  });
  it('has no number for one file, one field, or a file without its field; differing masses are worth a look', () => {
    const [a, b] = [run(1e4, 1), run(1e6, 100)];
    expect(codesOf(measureOfRoles(fieldExponent, { series: [a] }))).toEqual(['engine/too-few-points stops-lodging']);
    expect(codesOf(measureOfRoles(fieldExponent, { series: [a, { ...b, binary: { fieldGauss: 1e4 } }] }))).toEqual(['engine/too-few-points stops-lodging']);
    expect(codesOf(measureOfRoles(fieldExponent, { series: [a, { ...b, binary: {} }] }))).toEqual(['engine/no-field stops-lodging']);
    expect(codesOf(measureOfRoles(fieldExponent, { series: [a, { ...b, ownTotalMassMsun: 2e8 }] }))).toEqual(['engine/masses-differ worth-a-look']);
  });
});
