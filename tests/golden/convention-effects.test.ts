import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { curvatureOf } from '@/lib/engine/synthesis/electromagnetic-twin';
import { houseCosmology, luminosityDistanceMpc } from '@/lib/engine/units/cosmology';
import type { InputEdit } from '@/lib/explain/flip';
import { conventionById } from '@/lib/explain/conventions/conventions';
import type { ConventionId } from '@/lib/explain/conventions/convention';
import { bareMode, curveOf, design, differentiated, equalEnergy, equalRun, lateRun, longRun, noSpin, numberOf, pointOf, spin02, twoToOne, type Asked } from './convention-signals';
import { modeSet } from './energy-signals';

/**
 * The measured effects of the catalogue of conventions, required: independent derivation — unless said otherwise a numpy evaluation of
 * the same closed-form signals, which shares neither code nor method with either route (domain reference, 3.1). Agreement asked for
 * there: match 1e-3, loudness 0.3 %, energy 0.5 %, recoil 2 %. Route A is asked, as the search asks it.
 */
interface Effect {
  readonly id: ConventionId;
  readonly what: string;
  readonly value: number;
  readonly within: { readonly absolute: number } | { readonly relative: number };
  readonly compute: () => number;
}

const inMatch = { absolute: 1e-3 };
const inSnr = { relative: 3e-3 };
const inEnergy = { relative: 5e-3 };

const once = (make: () => number): (() => number) => {
  let kept: number | undefined;
  return () => (kept ??= make());
};

const band = { totalMassMsun: 60, fLowHz: 20 } as const;
const matchOf = (settings: Asked['settings'] = {}, more: Asked = {}, a = noSpin(), b = spin02()): number => numberOf('match', { a, b }, { ...more, settings: { ...band, ...settings } });
const snrOf = (settings: Asked['settings'] = {}, more: Asked = {}, a: Waveform = noSpin()): number => numberOf('snr', { a }, { ...more, settings: { ...band, distanceMpc: 1000, ...settings } });
const match = once(() => matchOf());
const snr = once(() => snrOf());
const louder = (settings: Asked['settings'], more: Asked = {}): number => snrOf(settings, more) / snr();
const edited = (...edits: InputEdit[]): Asked => ({ edits });

const held = (effects: readonly Effect[]): void => {
  for (const { id, what, value, within, compute } of effects) it(`${id}, ${conventionById(id).title.toLowerCase()}: ${what}`, () => expect(compute()).toAgreeWith(value, within));
};

describe('what a convention of noise, band and maximisation moves', () => {
  const slipped = curveOf((f) => design.psd(f) + (1e-48 * (0.0512 - 0.0152)) / (f / 245.4) ** 4);
  held([
    { id: 'C01', what: 'match with an amplitude density as power density', value: 0.8715, within: inMatch, compute: () => matchOf({}, edited({ edit: 'noise-power', power: 0.5 })) },
    { id: 'C01', what: 'match with a power density squared', value: 0.9744, within: inMatch, compute: () => matchOf({}, edited({ edit: 'noise-power', power: 2 })) },
    ...([[10, 0.847], [15, 0.866], [30, 0.975], [40, 0.992]] as const).map(([fLowHz, value]): Effect => ({ id: 'C04', what: `match from ${fLowHz} Hz`, value, within: inMatch, compute: () => matchOf({ fLowHz }) })),
    ...([[10, 1.025], [40, 0.852]] as const).map(([fLowHz, value]): Effect => ({ id: 'C04', what: `SNR from ${fLowHz} Hz against 20 Hz`, value, within: inSnr, compute: () => louder({ fLowHz }) })),
    { id: 'C05', what: 'match up to 128 Hz', value: 0.948, within: inMatch, compute: () => matchOf({ fHighHz: 128 }) },
    { id: 'C05', what: 'SNR up to 128 Hz against the whole', value: 0.891, within: inSnr, compute: () => louder({ fHighHz: 128 }) },
    { id: 'C06', what: 'match over phase alone', value: 0.033, within: inMatch, compute: () => matchOf({ maximise: ['phase'] }) },
    { id: 'C06', what: 'match over time alone', value: 0.428, within: inMatch, compute: () => matchOf({ maximise: ['time'] }) },
    { id: 'C06', what: 'match over both', value: 0.9185, within: inMatch, compute: match },
    { id: 'C37', what: 'match less that with the taper, without one', value: -0.0025, within: { absolute: 1e-4 }, compute: () => matchOf({ taper: 'none' }) - match() },
    { id: 'C37', what: 'SNR without a taper against that with one, less 1', value: 0.0014, within: { absolute: 1e-4 }, compute: () => louder({ taper: 'none' }) - 1 },
    { id: 'C39', what: 'match less the exact one, with a table of 25 points', value: -2.5e-4, within: { absolute: 2e-5 }, compute: () => matchOf({}, { noise: tableOf(25) }) - match() },
    { id: 'C40', what: 'SNR with 0.0512 for 0.0152', value: 29.4, within: inSnr, compute: () => snrOf({}, { noise: slipped }) },
  ]);
});

/** The design curve as a table of so many points, between which the rule of the house holds. */
function tableOf(points: number) {
  const f = Float64Array.from({ length: points }, (_, i) => (i === points - 1 ? design.fHighHz : design.fLowHz * (design.fHighHz / design.fLowHz) ** (i / (points - 1))));
  const read = tabulatedCurve({ name: 'table', f, values: f.map((x) => design.psd(x)), meaning: 'psd', sided: 'one' });
  if (!read.ok) throw new Error('no curve');
  return read.value.curve;
}

describe('what a convention of angles and masses moves', () => {
  held([
    { id: 'C08', what: 'SNR of both polarisations against h₊', value: Math.SQRT2, within: inSnr, compute: () => louder({ response: 'complex' }) },
    { id: 'C09', what: 'SNR of the bare mode against the strain', value: 1.585, within: inSnr, compute: () => snrOf({}, {}, bareMode(noSpin())) / snr() },
    { id: 'C10', what: 'SNR edge-on against face-on', value: 0.5, within: { relative: 1e-9 }, compute: () => louder({ inclinationRad: Math.PI / 2 }) },
    { id: 'C11', what: 'SNR at a redshift of 0.2 against that in the frame of the detector', value: 1.138, within: inSnr, compute: () => louder({ massFrame: 'source', redshift: 0.2 }) },
    { id: 'C11', what: 'mismatch at a redshift of 0.2, as a part', value: 0.51, within: { absolute: 5e-3 }, compute: () => (1 - matchOf({ massFrame: 'source', redshift: 0.2 })) / (1 - match()) },
    { id: 'C12', what: 'SNR where the stated mass is that of the whole spacetime, 0.99 M', value: 1.007, within: { absolute: 5e-4 }, compute: () => louder({ totalMassMsun: 60 / 0.99 }) },
    { id: 'C12', what: 'SNR where the mass of the remnant, 0.952 M, is used', value: 0.965, within: { absolute: 1e-3 }, compute: () => louder({ totalMassMsun: 60 * 0.952 }) },
    { id: 'C12', what: 'SNR where one body is used', value: 0.59, within: { absolute: 5e-3 }, compute: () => louder({ totalMassMsun: 30 }) },
    { id: 'C14', what: 'luminosity distance at a redshift of 0.2, of two cosmologies', value: 1.0362, within: { relative: 1e-4 }, compute: () => luminosityDistanceMpc(0.2, houseCosmology) / luminosityDistanceMpc(0.2, { h0: 70, omegaM: 0.3 }) },
  ]);
});

describe('what a convention of the variable moves', () => {
  const asStrain = (order: 1 | 2): number => {
    const variable = order === 1 ? 'news' : 'psi4';
    const [a, b] = [differentiated(noSpin(), order), differentiated(spin02(), order)].map((waveform) => ({ ...waveform, variable }) as const);
    return matchOf({}, edited({ edit: 'variable', variable: 'strain' }), a!, b!);
  };
  held([
    { id: 'C19', what: 'match with news as strain', value: 0.983, within: inMatch, compute: () => asStrain(1) },
    { id: 'C19', what: 'match with ψ₄ as strain', value: 0.983, within: inMatch, compute: () => asStrain(2) },
    { id: 'C19', what: 'match with strain as news', value: 0.92815, within: inMatch, compute: () => matchOf({}, edited({ edit: 'variable', variable: 'news' })) },
    { id: 'C19', what: 'match with strain as ψ₄', value: 0.9676, within: inMatch, compute: () => matchOf({}, edited({ edit: 'variable', variable: 'psi4' })) },
    { id: 'C19', what: 'SNR with strain as news against strain, in units of M', value: 11.832, within: inSnr, compute: () => louder({}, edited({ edit: 'variable', variable: 'news' })) },
    { id: 'C19', what: 'SNR with strain as ψ₄ against strain, in units of M', value: 205.5, within: inSnr, compute: () => louder({}, edited({ edit: 'variable', variable: 'psi4' })) },
  ]);
});

/**
 * Speeds in km/s with the stated mass of the remnant. Required: independent derivation — cubic splines, Simpson and the mode formula in
 * numpy over the same samples. The whole speed has a part along the axis as soon as m and −m no longer mirror each other.
 */
describe('what a convention of modes moves', () => {
  const recoil = (settings: Asked['settings'] = {}, ...edits: InputEdit[]) => pointOf('recoil', { a: twoToOne() }, { settings: { startM: 0, ...settings }, edits, bothRoutes: true });
  const inPlane = (...edits: InputEdit[]): number => recoil({}, ...edits).components!.inPlane!;
  const direction = (...edits: InputEdit[]): number => recoil({}, ...edits).components!.directionDeg!;
  const by = { relative: 1e-3 };
  const energyOf = (waveform: Waveform, settings: Asked['settings'] = {}, ...edits: InputEdit[]): number => numberOf('radiated-energy', { a: waveform }, { settings: { startM: 0, ...settings }, edits });
  const quadrupole = { modes: [[2, 2], [2, -2]] as const };
  held([
    { id: 'C22', what: 'speed as it stands', value: 141.868, within: by, compute: () => recoil().value! },
    { id: 'C22', what: 'speed turned the other way', value: 141.868, within: by, compute: () => recoil({}, { edit: 'conjugate', roles: ['a'] }).value! },
    { id: 'C22', what: 'direction, in degrees', value: 133.92, within: { absolute: 0.1 }, compute: () => direction() },
    { id: 'C22', what: 'direction turned the other way, in degrees', value: -133.92, within: { absolute: 0.1 }, compute: () => direction({ edit: 'conjugate', roles: ['a'] }) },
    { id: 'C23', what: 'speed with m read as −m', value: 127.0945, within: by, compute: () => recoil({}, { edit: 'relabel-m' }).value! },
    { id: 'C24', what: 'speed in the plane without (−1)^ℓ', value: 50.519, within: by, compute: () => inPlane({ edit: 'mirror-sign' }) },
    { id: 'C24', what: 'direction in the plane without (−1)^ℓ, in degrees', value: 73.57, within: { absolute: 0.1 }, compute: () => direction({ edit: 'mirror-sign' }) },
    { id: 'C24', what: 'whole speed without (−1)^ℓ', value: 115.16, within: by, compute: () => recoil({}, { edit: 'mirror-sign' }).value! },
    { id: 'C24', what: 'speed in the plane with one sign of m', value: 70.934, within: by, compute: () => inPlane({ edit: 'drop-negative-m' }) },
    { id: 'C24', what: 'energy with one sign of m, as a part', value: 0.5, within: { relative: 1e-9 }, compute: () => energyOf(twoToOne(), {}, { edit: 'drop-negative-m' }) / energyOf(twoToOne()) },
    { id: 'C25', what: 'energy of (2,±2) for equal masses, as a part', value: 1 - 0.016, within: inEnergy, compute: () => energyOf(equalEnergy(), quadrupole) / energyOf(equalEnergy()) },
    { id: 'C25', what: 'energy of (2,±2) for mass ratio 2, as a part', value: 1 - 0.07, within: inEnergy, compute: () => energyOf(twoToOne(), quadrupole) / energyOf(twoToOne()) },
    { id: 'C25', what: 'speed from ℓ = 2 alone', value: 44.4277, within: by, compute: () => recoil({ lMax: 2 }).value! },
    { id: 'C46', what: 'speed by M against speed by the remnant', value: 0.96124, within: { relative: 1e-4 }, compute: () => recoil({ normaliseBy: 'M' }).value! / recoil().value! },
  ]);
});

describe('what a convention of integrals over time moves', () => {
  const ofEqual = (waveform: Waveform, settings: Asked['settings'] = {}): number => numberOf('radiated-energy', { a: waveform }, { settings: { startM: 0, ...settings } });
  const energy = once(() => ofEqual(equalEnergy()));
  const psi4 = (settings: Asked['settings']): number => {
    const { t, modes } = curvatureOf(equalRun());
    return numberOf('radiated-energy', { a: modeSet(t, modes, 'psi4', { massRatio: 1 }) }, { settings: { startM: t[0]!, modes: [[2, 2], [2, -2]], ...settings } });
  };
  const whole = once(() => psi4({}));
  const withBurst = once(() => {
    const { t, modes } = withStartUpBurst(equalRun());
    return ofEqual(modeSet(t, modes));
  });
  const luminosity = (waveform: Waveform): number => numberOf('peak-luminosity', { a: waveform }, { settings: { startM: 0 } });
  const coarse = (): Waveform => ({ ...differentiated(equalEnergy(), 1), variable: 'news' });
  held([
    ...([[0.04, 0.999], [0.08, 0.95], [0.16, 0.84], [0.3, 0.72]] as const).map(([integrationFloor, value]): Effect => ({ id: 'C30', what: `energy of (2,±2) with a floor of ${integrationFloor}/M, as a part`, value, within: { absolute: 5e-3 }, compute: () => psi4({ integrationFloor }) / whole() })),
    { id: 'C31', what: 'energy of a burst at the start', value: 5.2e-4, within: { absolute: 5e-6 }, compute: () => withBurst() - energy() },
    { id: 'C31', what: 'energy with that burst against without', value: 1.013, within: { absolute: 5e-4 }, compute: () => withBurst() / energy() },
    { id: 'C32', what: 'energy from the first sample on', value: 0.0399, within: inEnergy, compute: energy },
    { id: 'C32', what: 'energy with what went before', value: 0.0485, within: inEnergy, compute: () => ofEqual(equalEnergy(), { includeEnergyBeforeStart: true }) },
    { id: 'C33', what: 'energy referred to the mass of the whole spacetime', value: 1.009, within: { absolute: 5e-4 }, compute: () => ofEqual(equalEnergy(), { normaliseBy: 'adm' }) / energy() },
    { id: 'C33', what: 'energy referred to the mass of the remnant', value: 1.05, within: { absolute: 5e-3 }, compute: () => ofEqual(equalEnergy(), { normaliseBy: 'remnant' }) / energy() },
    { id: 'C34', what: 'energy by differences of second order, as a part', value: 0.988, within: inEnergy, compute: () => ofEqual(coarse()) / energy() },
    { id: 'C34', what: 'peak luminosity by differences of second order, as a part', value: 0.981, within: inEnergy, compute: () => luminosity(coarse()) / luminosity(equalEnergy()) },
  ]);
});

describe('what the amplitude of a hybrid moves', () => {
  const settings = { totalMassMsun: 20, distanceMpc: 400, fLowHz: 20 } as const;
  const long = once(() => numberOf('snr', { a: longRun() }, { settings }));
  const hybrid = (joinHz: number, amplitudeOrder: number): number => numberOf('hybrid-snr', { a: lateRun() }, { settings: { ...settings, joinHz, amplitudeOrder } });
  held([
    { id: 'C53', what: 'SNR of the long signal', value: 40.54, within: inSnr, compute: long },
    ...([[80, 42.2], [100, 42.7], [150, 43.5], [200, 43.9]] as const).map(([joinHz, value]): Effect => ({ id: 'C53', what: `restricted amplitude joined at ${joinHz} Hz`, value, within: inSnr, compute: () => hybrid(joinHz, 0) })),
    ...([[80, 40.9], [100, 41.1], [150, 41.4], [200, 41.5]] as const).map(([joinHz, value]): Effect => ({ id: 'C53', what: `corrected amplitude joined at ${joinHz} Hz`, value, within: inSnr, compute: () => hybrid(joinHz, 1) })),
  ]);
  it('C53: the restricted amplitude is 4 to 8 % too loud', () => {
    for (const joinHz of [80, 200]) {
      const excess = hybrid(joinHz, 0) / long() - 1;
      expect(excess).toBeGreaterThan(0.035);
      expect(excess).toBeLessThan(0.085);
    }
  });
});
