import { describe, expect, it } from 'vitest';
import { completeMeasurement } from '@/lib/engine/budget/complete-measurement';
import { smoothedInspiral } from '@/lib/engine/budget/smooth-inspiral';
import { sensitivitiesOf } from '@/lib/engine/budget/sensitivities';
import { stepsOf } from '@/lib/engine/budget/setting-steps';
import type { Measurement } from '@/lib/engine/contract/measurement';
import { Cancelled, type MeasureRequest, type Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { variedLines } from '@/lib/engine/budget/varied-lines';
import { peakLuminosity } from '@/lib/engine/quantities/peak-luminosity';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { evenTimes, gaussian, modeFrom, modeSet } from '@/tests/golden/energy-signals';

const quiet = { onProgress: () => undefined, cancelled: () => false };
const axis = evenTimes(-120, 60, 0.5);
/** A pulse whose amplitude, and so half of whose energy's error, is off by a part; (2,2) alone. */
const pulse = (name: string, part: number, more: Partial<Waveform> = {}): Waveform => ({ ...modeSet(axis, [modeFrom(axis, 2, 2, gaussian(1 + part, 10, 0.5, 0))]), name, negativeM: 'mirror', ...more });

interface Asked {
  readonly settings?: DeclaredSettings;
  readonly over?: MeasureRequest['over'];
  readonly withFigures?: boolean;
  readonly routeAOnly?: boolean;
}

function completed(a: Waveform, relatives: readonly Waveform[], { settings = {}, over = null, ...more }: Asked = {}, quantity: Quantity = radiatedEnergy): Measurement {
  const inputs = { of: { a }, noise: null, ...(relatives.length > 0 ? { relatives: new Map([[a.name, relatives]]) } : {}) };
  const request: MeasureRequest = { claimId: 'C', inputs, settings, over, claimed: (over?.values ?? [null]).map(() => null), withFigures: false, ...more };
  return completeMeasurement(quantity, request, quantity.measure(request, quiet), quiet);
}
const lineOf = ({ budget }: Measurement, id: string) => {
  const line = budget.find((each) => each.id === id);
  if (!line) throw new Error(`there is no line ${id}`);
  return line;
};
const valueOf = ({ points: [point] }: Measurement): number => point!.value!;

describe('an energy from one of three resolutions', () => {
  const spacing = (n: number) => 1 / n;
  const at = (name: string, n: number) => pulse(name, 0.1 * (80 * spacing(n)) ** 4, { series: 'U', resolution: spacing(n) });
  const [coarse, middle, fine] = [at('U1', 80), at('U2', 96), at('U3', 112)];
  const found = completed(fine, [coarse, middle]);

  // Energies go with the square of the amplitude: fourth order with a little of the eighth.
  it('has a truncation error of 1.25 times the way to the limit that Richardson finds', () => {
    const exact = valueOf(completed(pulse('exact', 0), []));
    const { u, degreesOfFreedom, note } = lineOf(found, 'E05');
    expect(Math.abs(u!) / (1.25 * (valueOf(found) - exact))).toBeCloseTo(1, 1);
    expect(degreesOfFreedom).toBe(2);
    expect(note).toContain('order 4.2');
  });

  it('still has no extraction radius, and says so', () => {
    expect(lineOf(found, 'E06')).toMatchObject({ u: null, note: 'Not available: one radius.', share: null });
  });

  it('has the same number, U and routes as without the others', () => {
    expect(found.points).toEqual(completed(fine, []).points);
    expect(lineOf(completed(fine, []), 'E05')).toMatchObject({ u: null, note: 'Not available: one resolution.' });
  });

  it('is not compared with a run at another radius as well', () => {
    expect(lineOf(completed(fine, [{ ...coarse, extractionRadiusM: 60 }, { ...middle, extractionRadiusM: 60 }]), 'E05').u).toBeNull();
  });

  it('has shares that add up to one over what is known', () => {
    expect(found.budget.reduce((sum, { share }) => sum + (share ?? 0), 0)).toBeCloseTo(1, 12);
  });

  it('is left alone in a first look, and stops when it is told to', () => {
    const first = completed(fine, [coarse, middle], { routeAOnly: true });
    expect(first.budget).toEqual([]);
    const request: MeasureRequest = { claimId: 'C', inputs: { of: { a: fine }, noise: null, relatives: new Map([['U3', [coarse]]]) }, settings: {}, over: null, claimed: [null], withFigures: false };
    const plain = radiatedEnergy.measure(request, quiet);
    expect(() => completeMeasurement(radiatedEnergy, request, plain, { ...quiet, cancelled: () => true })).toThrow(Cancelled);
  });
});

it('an energy from one of four radii has the way to infinity as its extraction error', () => {
  const at = (r: number) => pulse(`R${r}`, -1.5 / r, { series: 'R', extractionRadiusM: r });
  const found = completed(at(160), [at(60), at(80), at(120)]);
  const way = valueOf(completed(pulse('exact', 0), [])) - valueOf(found);
  const { u } = lineOf(found, 'E06');
  expect(u! * Math.sqrt(3)).toBeGreaterThan(0.99 * way);
  expect(u! * Math.sqrt(3)).toBeLessThan(1.3 * way);
});

describe('notes of a number with a unit', () => {
  const at = (name: string, resolution: number, part: number) => pulse(name, part, { series: 'P', resolution });
  const [fine, coarse] = [at('P1', 1, 0), at('P2', 2, 0.1)];
  const found = completed(fine, [coarse], {}, peakLuminosity);

  it('carry it, whatever the line', () => {
    expect(lineOf(found, 'E05').note).toMatch(/\(−\S+ c⁵\/G\)/);
    const request: MeasureRequest = { claimId: 'C', inputs: { of: { a: fine }, noise: null }, settings: {}, over: null, claimed: [null], withFigures: false };
    const measurement = { ...found, budget: [{ component: 'Start-up radiation', id: 'E07', group: 'coverage' as const, u: null, note: '' }], settings: [] };
    const [start, scatter] = variedLines({ quantityId: 'recoil', unit: 'km/s', allowed: [], request, measurement, here: 140, rerun: () => 137.5 }, { halfRange: 12 });
    expect(start!.note).toContain(': −2.5 km/s; half-width');
    expect(scatter!.note).toContain('(12 km/s)');
  });
  it('carry none where the number has none', () => {
    expect(lineOf(completed(fine, [coarse]), 'E05').note).toMatch(/\(−[\d.×⁻¹²³⁴⁵⁶⁷⁸⁹⁰]+\)/);
  });
});

describe('a declared eccentricity', () => {
  const long = evenTimes(0, 3000, 1);
  /** A chirp in which phase and amplitude wiggle by a part e. */
  const chirp = (e: number) => modeFrom(long, 2, 2, (t) => {
    const tau = 3100 - t;
    const phase = 2 * 0.4 * tau ** 0.625 * 10 + e * Math.sin(t / 40);
    const size = tau ** -0.25 * (1 + e * Math.cos(t / 40)) * Math.exp(-(Math.max(0, t - 2900) ** 2) / 1000);
    return [size * Math.cos(phase), size * Math.sin(phase)];
  });
  const wave = (e: number, binary: Waveform['binary'] = {}): Waveform => ({ ...modeSet(long, [chirp(e)], 'strain', binary), name: 'E', negativeM: 'mirror' });

  it('is smoothed away to within a tenth of itself in the middle of the inspiral', () => {
    const smooth = smoothedInspiral(wave(0.02))!;
    const [made, want, was] = [smooth, wave(0), wave(0.02)].map(({ content }) => (content.kind === 'modes' ? content.modes[0]! : null));
    const apart = (p: typeof made, q: typeof made): number => Math.max(...Array.from({ length: 1000 }, (_, i) => Math.hypot(p!.re[800 + i]! - q!.re[800 + i]!, p!.im[800 + i]! - q!.im[800 + i]!)));
    expect(apart(made!, want!)).toBeLessThan(0.1 * apart(was!, want!));
  });

  it('is weighed above a thousandth only, and not where the inspiral is too short to smooth', () => {
    expect(lineOf(completed(wave(0.02, { eccentricity: 0.02 }), []), 'E10').u).toBeGreaterThan(0);
    expect(completed(wave(0.02, { eccentricity: 0.0005 }), []).budget.some(({ id }) => id === 'E10')).toBe(false);
    expect(lineOf(completed(pulse('P', 0, { binary: { eccentricity: 0.1 } }), []), 'E10').u).toBeNull();
  });
});

describe('sensitivities', () => {
  const a = pulse('S', 0, { junkEndM: -60 });
  const rows = completed(a, [], { withFigures: true, settings: { lMax: 3 } }).sensitivities!;

  it('are computed with the figures only', () => {
    expect(completed(a, []).sensitivities).toBeUndefined();
  });

  it('are what the claim gives with that one setting declared', () => {
    const later = rows.find(({ setting, tried }) => setting === 'startM' && tried === -10)!;
    expect(later).toMatchObject({ standing: 'assumed', used: -60, unit: 'M' });
    expect(later.value).toBe(valueOf(completed(a, [], { settings: { lMax: 3, startM: -10 } })));
    expect(later.change).toBe(later.value! - valueOf(completed(a, [], { settings: { lMax: 3 } })));
    expect(Math.abs(later.change!)).toBeGreaterThan(0);
  });

  it('say of what cannot be computed that it cannot', () => {
    expect(rows.find(({ setting, tried }) => setting === 'normaliseBy' && tried === 'adm')).toMatchObject({ value: null, change: null, because: 'cannot be computed so' });
  });

  it('are not tried beyond ten times the cost of the claim, which is counted and said', () => {
    const setting = (name: string, value: unknown) => ({ name, value, standing: 'assumed' as const });
    const measurement = { ...completed(a, []), settings: [setting('maximise', ['time', 'phase']), setting('response', 'plus'), setting('taper', 'auto')] };
    const told = sensitivitiesOf({ request: { claimId: 'C', inputs: { of: { a }, noise: null }, settings: {}, over: null, claimed: [null], withFigures: true }, measurement, index: 0, here: 1, rerun: () => 2 });
    expect(told.filter(({ because }) => because?.startsWith('not tried')).map(({ setting: name, tried }) => [name, tried])).toEqual([['response', 'complex']]);
    expect(told.at(-1)).toMatchObject({ setting: 'taper', tried: 'none', value: 2, change: 1 });
    const huge = { ...a, axis: { length: 5e8 } as Float64Array };
    const none = sensitivitiesOf({ request: { claimId: 'C', inputs: { of: { a: huge }, noise: null }, settings: {}, over: null, claimed: [null], withFigures: true }, measurement, index: 0, here: 1, rerun: () => 2 });
    expect(none.every(({ value }) => value === null)).toBe(true);
  });

  it('of a sweep stand at its own value of the worst point', () => {
    const swept = completed(a, [], { withFigures: true, over: { setting: 'startM', values: [-60, -30] } });
    expect(swept.sensitivities!.filter(({ setting }) => setting === 'startM').map(({ used }) => used)).toEqual([-60, -60]);
  });

  it('move a number by its step, a choice to its other words, and nothing that is not there', () => {
    expect(stepsOf('fLowHz', 20)).toEqual([18, 22]);
    expect(stepsOf('inclinationRad', 0)).toEqual([Math.PI / 18]);
    expect(stepsOf('taper', 'auto')).toEqual([0.5, 2, 'none']);
    expect(stepsOf('response', 'plus')).toEqual(['cross', 'complex']);
    expect(stepsOf('includeEnergyBeforeStart', false)).toEqual([true, 'removed']);
    expect(stepsOf('window', [25, 60])).toEqual([[32, 60], [25, 53]]);
    expect(stepsOf('redshift', 0)).toEqual([]);
    expect(stepsOf('fHighHz', null)).toEqual([]);
    expect(stepsOf('observable', 'mass')).toEqual([]);
  });
});
