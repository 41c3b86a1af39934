import type { Waveform } from '@/lib/engine/contract/waveform';
import { binaryOf, changed, cut, findingsOf, inM, type FindingSpecimen } from './finding-specimen';

const twoToOne = binaryOf({ massRatio: 2, modes: ['22', '21', '33'] });
const declared = { binary: { massRatio: 2, chi1z: 0, chi2z: 0 } } as const;
const recoil = (parts: Parameters<typeof inM>[0], more: Partial<Waveform> = declared) => findingsOf('recoil', { of: { a: inM(parts, more) } });
const energy = (parts: Parameters<typeof inM>[0], more: Partial<Waveform> = declared) => findingsOf('radiated-energy', { of: { a: inM(parts, more) } });
const only = (keep: (l: number, m: number) => boolean) => ({ t: twoToOne.t, modes: twoToOne.modes.filter(({ l, m }) => keep(l, m)) });

const negated = changed(twoToOne, 3, -3, (re, im) => [-re, -im]);
const copied = changed(twoToOne, 3, -3, (_re, _im, t) => {
  const mode = twoToOne.modes.find(({ l, m }) => l === 3 && m === 3)!;
  const i = Math.round(t / 0.5);
  return [-mode.re[i]!, -mode.im[i]!];
});

const equalMasses = binaryOf({ massRatio: 1, modes: ['22', '33'] });
const withOdd = (size: number) => {
  const odd = twoToOne.modes.find(({ l, m }) => l === 3 && m === 3)!;
  const top = Math.max(...odd.re.map((x, i) => Math.hypot(x, odd.im[i]!)));
  return changed(equalMasses, 3, 3, (_re, _im, t) => {
    const i = Math.min(Math.round(t / 0.5), odd.re.length - 1);
    return [(size / top) * odd.re[i]!, (size / top) * odd.im[i]!];
  });
};

/** A centre that moves by so many M along x over the record: (2,1) gains a third of the displacement times the rate of (2,2). */
function moved(driftM: number) {
  const { t, modes } = twoToOne;
  const quadrupole = modes.find(({ l, m }) => l === 2 && m === 2)!;
  const span = t[t.length - 1]! - t[0]!;
  const rate = (values: Float64Array, i: number): number => (i === 0 || i === t.length - 1 ? 0 : (values[i + 1]! - values[i - 1]!) / (t[i + 1]! - t[i - 1]!));
  const by = (at: number): readonly [number, number] => {
    const i = Math.round(at / 0.5);
    const gain = (driftM * at) / span / 3;
    return [gain * rate(quadrupole.re, i), gain * rate(quadrupole.im, i)];
  };
  const plus = changed(twoToOne, 2, 1, (re, im, at) => [re + by(at)[0], im + by(at)[1]]);
  // (2,−1) is the mirror: H*, with the sign of an even ℓ.
  return changed(plus, 2, -1, (re, im, at) => [re + by(at)[0], im - by(at)[1]]);
}

/** Strain turned into its first or second derivative by central differences. */
function differentiated(parts: Parameters<typeof inM>[0]): Parameters<typeof inM>[0] {
  const { t, modes } = parts;
  const rate = (values: Float64Array): Float64Array => values.map((_, i) => (i === 0 || i === t.length - 1 ? 0 : (values[i + 1]! - values[i - 1]!) / (t[i + 1]! - t[i - 1]!)));
  return { t, modes: modes.map((mode) => ({ ...mode, re: rate(mode.re), im: rate(mode.im) })) };
}
const scaled = (factor: number) => ({ t: twoToOne.t, modes: twoToOne.modes.map((mode) => ({ ...mode, re: mode.re.map((x) => factor * x), im: mode.im.map((x) => factor * x) })) });
const slowed = (factor: number) => ({ t: twoToOne.t.map((x) => factor * x), modes: twoToOne.modes });

export const modeSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V13', code: 'engine/modes-missing', level: 'stops-lodging', when: 'a recoil is claimed of (2,±2) alone',
    raises: () => recoil(only((l, m) => l === 2 && Math.abs(m) === 2)), says: ['(2,±1) and (3,±3)', 'does not hold (2,1)'], silent: () => recoil(twoToOne),
  },
  {
    number: 'V13', code: 'engine/modes-missing', level: 'worth-a-look', when: 'an energy is claimed of ℓ = 2 alone',
    raises: () => energy(only((l) => l === 2)), says: ['ℓ = 2 alone', '7 % at 2:1'], silent: () => energy(twoToOne),
  },
  {
    number: 'V14', code: 'engine/negative-m-assumed', level: 'needs-answer', when: 'modes with m < 0 are absent without a word',
    raises: () => energy(only((_l, m) => m > 0), { ...declared, negativeM: null }), says: ['m < 0', 'A', '(−1)^ℓ'], silent: () => energy(only((_l, m) => m > 0), { ...declared, negativeM: 'mirror' }),
  },
  {
    number: 'V15', code: 'engine/mirror-broken', level: 'worth-a-look', when: 'the modes of odd ℓ lack their (−1)^ℓ',
    raises: () => recoil(negated), says: ['(3,−3) of A', 'mirror of (3,3)', '200 %', '(−1)^ℓ missing'], silent: () => recoil(twoToOne),
  },
  {
    number: 'V15', code: 'engine/mirror-broken', level: 'worth-a-look', when: 'a mode was copied without its conjugate',
    raises: () => energy(copied), says: ['(3,−3) of A', 'instead of its conjugate'], silent: () => energy(twoToOne),
  },
  {
    number: 'V15', code: 'engine/mirror-broken', level: 'worth-a-look', when: 'a detector listens to the same file',
    raises: () => findingsOf('snr', { of: { a: inM(negated, declared) }, settings: { totalMassMsun: 120, distanceMpc: 1000, fLowHz: 20 }, inDetector: true }), says: ['(3,−3) of A'],
    silent: () => findingsOf('snr', { of: { a: inM(negated, declared) }, settings: { totalMassMsun: 120, distanceMpc: 1000, fLowHz: 20, modes: [[2, 2], [2, -2]] }, inDetector: true }),
  },
  {
    number: 'V16', code: 'engine/odd-m-at-equal-mass', level: 'worth-a-look', when: 'an equal-mass binary has 0.6 % in (3,3)',
    raises: () => energy(withOdd(0.0024), { binary: { massRatio: 1, chi1z: 0, chi2z: 0 } }), says: ['equal masses', '(3,3) reaches 0.61 % of (2,2)', /t = \d+/], silent: () => energy(withOdd(0.0002), { binary: { massRatio: 1, chi1z: 0, chi2z: 0 } }),
  },
  {
    number: 'V17', code: 'engine/centre-drift', level: 'worth-a-look', when: 'the centre moves by 0.3 M over the run',
    raises: () => recoil(moved(0.3)), says: ['(2,1) of A', /about 0\.(29|3|31) M over the record/, /from t = \d+/], silent: () => recoil(moved(0.03)),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'the angular factor is in the modes already',
    raises: () => energy(scaled(0.630783)), says: ['MΩ = 0.03', /×0\.6\d+ of that/, 'factor 0.631', 'at most'], silent: () => energy(twoToOne),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'ψ₄ is declared as a strain',
    raises: () => energy(differentiated(differentiated(twoToOne))), says: ['As r M ψ₄ it would fit'], silent: () => energy(differentiated(differentiated(twoToOne)), { ...declared, variable: 'psi4' }),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'ψ₄ is twice what its normalisation says',
    raises: () => energy(differentiated(differentiated(scaled(2))), { ...declared, variable: 'psi4' }), says: ['psi4Factor'], silent: () => energy(differentiated(twoToOne), { ...declared, variable: 'news' }),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'time is in half its unit',
    raises: () => energy(slowed(2)), says: [/chirp mass of 0\.\d+ M/, 'gives 0.406 M'], silent: () => energy(twoToOne, {}),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'time is in twice its unit and the record holds the merger alone',
    raises: () => energy(cut(slowed(0.4), 380, 5000)), says: [/rings at Mω = 1\.\d+/, 'between 0.25 and 1.2'], silent: () => energy(cut(twoToOne, 950, 5000)),
  },
  {
    number: 'V21', code: 'engine/strain-units', level: 'needs-answer', when: 'the merger alone is louder than its masses allow',
    raises: () => energy(cut(scaled(1 / 0.630783), 950, 5000)), says: ['At its peak', 'divided out'], silent: () => energy(cut(twoToOne, 950, 5000)),
  },
];
