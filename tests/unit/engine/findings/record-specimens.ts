import { defaultBurst, peakTime, withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { seededRandom } from '../../../support/seeded-random';
import { binaryOf, changed, cut, findingsOf, inM, type FindingSpecimen } from './finding-specimen';

const equal = { binary: { massRatio: 1, chi1z: 0, chi2z: 0 } } as const;
const clean = binaryOf();
const peak = peakTime(clean);
const energy = (parts: Parameters<typeof inM>[0], more: Parameters<typeof inM>[1] = equal) => findingsOf('radiated-energy', { of: { a: inM(parts, more) }, settings: { modes: [[2, 2], [2, -2]] } });
const ringdown = (parts: Parameters<typeof inM>[0]) => findingsOf('ringdown-frequency', { of: { a: inM(parts, equal) } });
const snr = (parts: Parameters<typeof inM>[0], totalMassMsun: number, settings: object = {}, more: Parameters<typeof inM>[1] = equal) =>
  findingsOf('snr', { of: { a: inM(parts, more) }, settings: { totalMassMsun, distanceMpc: 1000, fLowHz: 20, ...settings }, inDetector: true });
const match = (totalMassMsun: number) => findingsOf('match', { of: { a: inM(clean, equal), b: inM(binaryOf({ chi1z: 0.2, chi2z: 0.2 }), { name: 'B' }) }, settings: { totalMassMsun, fLowHz: 20 }, inDetector: true });

/** Every k-th sample: the step that a coarser record would have. */
const thinned = (k: number) => ({ t: clean.t.filter((_, i) => i % k === 0), modes: clean.modes.map((mode) => ({ ...mode, re: mode.re.filter((_, i) => i % k === 0), im: mode.im.filter((_, i) => i % k === 0) })) });

/** Start-up noise near the Nyquist frequency of steps of 0.5 M. */
const hiss = changed(clean, 2, 2, (re, im, t) => {
  const size = 2e-4 * Math.exp(-(((t - 100) / 40) ** 2));
  return [re + size * Math.cos(6 * t), im - size * Math.sin(6 * t)];
});

const drifting = (size: number) => changed(changed(clean, 2, 2, (re, im, t) => [re + (size * t) / peak, im]), 2, -2, (re, im, t) => [re + (size * t) / peak, im]);

const random = seededRandom(7);
/** Deterministic noise of one size on (2,2) and its mirror. */
const noisy = (size: number) => {
  const [x, y] = [clean.t.map(() => size * (2 * random() - 1)), clean.t.map(() => size * (2 * random() - 1))];
  const at = (t: number): number => Math.round(t / 0.5);
  return changed(changed(clean, 2, 2, (re, im, t) => [re + x[at(t)]!, im + y[at(t)]!]), 2, -2, (re, im, t) => [re + x[at(t)]!, im - y[at(t)]!]);
};

export const recordSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V04', code: 'engine/sampling', level: 'worth-a-look', when: 'the ringdown has eleven samples to a period',
    raises: () => energy(thinned(2)), says: ['(2,2)', /period of 1\d\.?\d* M/, 'steps of 1 M', /11\.\d samples/], silent: () => energy(clean),
  },
  {
    number: 'V04', code: 'engine/sampling', level: 'stops-lodging', when: 'the ringdown has three samples to a period',
    raises: () => energy(thinned(8)), says: ['steps of 4 M', /samples to a period/, 'At least 4'], silent: () => energy(thinned(2)),
  },
  {
    number: 'V05', code: 'engine/band-beyond-sampling', level: 'worth-a-look', when: 'the claim integrates beyond the Nyquist frequency',
    raises: () => snr(clean, 60, { fHighHz: 5000 }), says: ['At 60 M☉', /up to \d+ Hz only/, 'to 5000 Hz'], silent: () => snr(clean, 60),
  },
  {
    number: 'V05', code: 'engine/band-beyond-sampling', level: 'worth-a-look', when: 'the ringdown has fewer than four samples to its period',
    raises: () => snr(thinned(6), 60), says: ['At 60 M☉', /ringdown of A is at \d+ Hz/, /to \d+ Hz: 3\.\d+ samples/], silent: () => snr(thinned(4), 60),
  },
  {
    number: 'V06', code: 'engine/aliasing', level: 'worth-a-look', when: 'start-up noise lies just below the Nyquist frequency',
    raises: () => energy(hiss), says: ['(2,2) of A', /above 0\.\d+ of the Nyquist frequency/, /fold towards its end/, /around t = \d+ M/], silent: () => energy(clean),
  },
  {
    number: 'V06', code: 'engine/aliasing', level: 'worth-a-look', when: 'the same is listened to by a detector',
    raises: () => snr(hiss, 60), says: ['Nyquist frequency'], silent: () => snr(clean, 60),
  },
  {
    number: 'V07', code: 'engine/signal-starts-in-band', level: 'worth-a-look', when: 'a light system starts above fLowHz',
    raises: () => snr(clean, 60), says: ['At 60 M☉ A comes in at', 'from 20 Hz', /smallest mass whose signal fills the band is \d/], silent: () => snr(clean, 120),
  },
  {
    number: 'V07', code: 'engine/signal-starts-in-band', level: 'needs-answer', when: 'the cut signal is compared with another',
    raises: () => match(60), says: ['At 60 M☉', 'from 20 Hz'], silent: () => match(120),
  },
  {
    number: 'V08', code: 'engine/taper-room', level: 'worth-a-look', when: 'less than two cycles lie below the band',
    raises: () => snr(clean, 88), says: ['At 88 M☉', /only about \d\.?\d* cycles? of A lie below 20 Hz/], silent: () => snr(clean, 120),
  },
  {
    number: 'V09', code: 'engine/startup-burst', level: 'needs-answer', when: 'start-up radiation lies inside the integral',
    raises: () => energy(withStartUpBurst(clean)), says: [/energy 0\.000\d+ M/, /t = 7\d\.?\d* ± \d\.?\d* M/, '% of the energy'], silent: () => energy(clean),
  },
  {
    number: 'V09', code: 'engine/startup-burst', level: 'worth-a-look', when: 'its end is declared too early',
    raises: () => energy(withStartUpBurst(clean), { ...equal, junkEndM: 40 }), says: ['inside the integral'], silent: () => energy(withStartUpBurst(clean, defaultBurst), { ...equal, junkEndM: 150 }),
  },
  {
    number: 'V10', code: 'engine/drift', level: 'worth-a-look', when: 'the strain ends at 0.02',
    raises: () => energy(drifting(0.02)), says: ['ends at 0.02', 'instead of 0', /mean from t = \d+/, /5\.\d % of its peak/], silent: () => energy(drifting(0.002)),
  },
  {
    number: 'V10', code: 'engine/drift', level: 'worth-a-look', when: 'a detector or a fit of the ringdown reads the same file',
    raises: () => [...snr(drifting(0.02), 120), ...ringdown(drifting(0.02))], says: ['integration drift'], silent: () => [...snr(clean, 120), ...ringdown(clean)],
  },
  {
    number: 'V11', code: 'engine/short-ringdown', level: 'worth-a-look', when: 'an energy is integrated to 28 M after the strain peaks',
    raises: () => energy(cut(clean, 0, peak + 28)), says: [/stops 2\d\.?\d* M \(1\.\d damping times\) after its flux peaks/, /still \d+ % of its largest/, '% of its power'], silent: () => energy(cut(clean, 0, peak + 80)),
  },
  {
    number: 'V11', code: 'engine/short-ringdown', level: 'worth-a-look', when: 'the window of a fit is cut by the end of the record',
    raises: () => ringdown(cut(clean, 0, peak + 52)), says: ['damping times', 'instead of 60 M'], silent: () => ringdown(clean),
  },
  {
    number: 'V12', code: 'engine/noise-floor', level: 'note', when: 'the ringing sinks into noise that an energy goes on integrating',
    raises: () => energy(noisy(5e-4)), says: [/\(2,2\) of A stops decaying at 0\.00\d+ of its peak/, /from about t = \d+/], silent: () => energy(clean),
  },
  {
    number: 'V12', code: 'engine/noise-floor', level: 'note', when: 'the ringing stalls inside the window of its fit',
    raises: () => ringdown(changed(clean, 2, 2, (re, im, t) => (t > peak + 40 ? [0.005 * Math.cos(0.55 * t), -0.005 * Math.sin(0.55 * t)] : [re, im]))), says: [/decays at \S+\/M/, /of its first half/], silent: () => ringdown(clean),
  },
];
