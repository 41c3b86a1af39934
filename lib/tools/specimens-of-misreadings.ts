import { withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { formatModesText, modeColumns } from '@/lib/engine/synthesis/modes-text';
import { synthesise, type SynthesisRequest, type SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';
import { binaryFacts, designCurveFile, fewDigits, modesFile, sheet, waveform, type SpecimenFile } from './specimen-parts';

/** Specimens of claims that follow from the files under another reading than the declared one: a unit, a frame, a sign, a digit. */
const quiet: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.012, stepM: 1, modes: ['22'] };
const turning: SynthesisRequest = { ...quiet, chi1z: 0.2, chi2z: 0.2 };
const detector = { fLowHz: 20, massFrame: 'detector' } as const;

/** D2: the curve is an amplitude density, and the authors' program took it for a power density. */
export function weakSpins(): SpecimenFile[] {
  const [a, b] = [synthesise(quiet), synthesise(turning)];
  const statement = [
    'Oxbow Relativity Unit, code *Oxbow-4*.',
    '',
    'Spins of 0.2 along the orbital angular momentum lower the match of an equal-mass merger with one that does not spin to 0.8715 at 60 and to 0.9833 at 100 solar masses (detector frame), in the attached second-generation design curve from 20 Hz. Only the (2,±2) modes are used.',
  ].join('\n');
  return [
    sheet({
      title: 'Distinguishing weak spins with next detectors',
      statement,
      waveforms: { A: waveform('level.txt', a.modes, { binary: binaryFacts(quiet) }), B: waveform('spinning.txt', b.modes, { binary: binaryFacts(turning) }) },
      noise: { S: { file: 'noise.txt', columns: ['f', 'asd'], sided: 'one' } },
      claims: [{ id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings: { ...detector, maximise: ['time', 'phase'] }, over: { totalMassMsun: [60, 100] }, claimed: ['0.8715', '0.9833'], tolerance: 0.0005 }],
    }),
    modesFile('level.txt', 'Oxbow Relativity Unit, Oxbow-4 run 21, no spin', quiet, a, fewDigits),
    modesFile('spinning.txt', 'Oxbow Relativity Unit, Oxbow-4 run 22, spins 0.2', turning, b, fewDigits),
    designCurveFile('noise.txt', 600),
  ];
}

const loudnessOf = (noise: string, settings: object, claimed: unknown) => ({ id: 'C1', quantity: 'snr', of: { a: 'A' }, noise, settings: { distanceMpc: 1000, fLowHz: 20, inclinationRad: 0, ...settings }, claimed });
const levelWave = (run: string): { readonly wave: SyntheticWaveform; readonly file: SpecimenFile } => {
  const wave = synthesise(quiet);
  return { wave, file: modesFile('modes.txt', run, quiet, wave, fewDigits) };
};
const only = (wave: SyntheticWaveform) => ({ A: waveform('modes.txt', wave.modes, { binary: binaryFacts(quiet) }) });

/** D4: the mass is that at the source, and the number is that of the same mass at the detector. */
export function sourceFrame(): SpecimenFile[] {
  const { wave, file } = levelWave('North Quay Astrophysics, Ferrywright run 3');
  const statement = [
    'North Quay Astrophysics, code *Ferrywright*.',
    '',
    'An equal-mass merger without spin has 60 solar masses in its own frame. At redshift 0.1972, a luminosity distance of 1000 Mpc, it is heard face-on with a signal-to-noise ratio of 36.30 in the second-generation design curve from 20 Hz.',
  ].join('\n');
  const settings = { totalMassMsun: 60, massFrame: 'source', redshift: 0.1972 };
  return [sheet({ title: 'A 60-solar-mass source at redshift 0.197', statement, waveforms: only(wave), noise: { S: { curve: 'G2' } }, claims: [loudnessOf('S', settings, '36.30')] }), file];
}

/** D12: the horizon of a source whose mass was not redshifted on the way. */
export function horizonOfSixty(): SpecimenFile[] {
  const { wave, file } = levelWave('Saltern Institute of Strong Gravity, Gridlark run q2');
  const statement = [
    'Saltern Institute of Strong Gravity, code *Gridlark*.',
    '',
    'A non-spinning, equal-mass system of 60 solar masses at the source is heard with a signal-to-noise ratio of 8, face-on and optimally placed, up to a redshift of 0.72 in the second-generation design curve from 20 Hz.',
  ].join('\n');
  const settings = { totalMassMsun: 60, massFrame: 'source', fLowHz: 20, threshold: 8 };
  return [sheet({ title: 'Horizon of a non-spinning 60-solar-mass system', statement, waveforms: only(wave), noise: { S: { curve: 'G2' } }, claims: [{ id: 'C1', quantity: 'horizon-redshift', of: { a: 'A' }, noise: 'S', settings, claimed: '0.72' }] }), file];
}

/** D15: of the published fit 10⁻⁴⁸(0.0152 x⁻⁴ + …), x = f/245.4 Hz, with two digits of the first coefficient changed about. */
const meant = 0.0152;
const typed = 0.0512;
const tooMuch = (fHz: number): number => 1e-48 * (typed - meant) * (fHz / 245.4) ** -4;

export function typedByHand(): SpecimenFile[] {
  const { wave, file } = levelWave('Hollowell Computation Centre, Ninefold run 9');
  const statement = [
    'Hollowell Computation Centre, code *Ninefold*.',
    '',
    'With our table of the second-generation design curve an equal-mass, non-spinning merger of 60 solar masses (detector frame) at 1000 Mpc, face-on, has a signal-to-noise ratio of 29.4 from 20 Hz.',
  ].join('\n');
  const noise = { D: { file: 'noise.txt', columns: ['f', 'asd'], sided: 'one' } };
  return [sheet({ title: 'Noise curve typed by hand', statement, waveforms: only(wave), noise, claims: [loudnessOf('D', { totalMassMsun: 60, massFrame: 'detector' }, '29.4')] }), file, designCurveFile('noise.txt', 600, tooMuch)];
}

const recoiling: SynthesisRequest = { massRatio: 2, chi1z: 0, chi2z: 0, mOmega0: 0.028, stepM: 0.5, modes: ['22', '21', '33', '44', '32'] };

/** D7: of the modes with m < 0, those of odd ℓ carry the wrong sign. The recoil is asked of the mirrors of m > 0, the energy of all as written. */
export function recoilOfTwoToOne(): SpecimenFile[] {
  const whole = synthesise(recoiling);
  const modes = whole.modes.map((mode) => (mode.m < 0 && mode.l % 2 === 1 ? { ...mode, re: mode.re.map((x) => -x), im: mode.im.map((x) => -x) } : mode));
  const statement = [
    'Larkfield Wave Group, code *Tinderbox*.',
    '',
    'A non-spinning merger of mass ratio 2 leaves its remnant with a recoil of 112 km/s (momentum over its own mass), at 71° from the x axis of the files.',
    '',
    'Modes (2,±2), (2,±1), (3,±3), (3,±2), (4,±4). Those with $m<0$ stand in the file as we use them for the recoil; the energy of all of them is $0.0293\\,M$.',
  ].join('\n');
  const columns = modeColumns(modes);
  const facts = waveform('modes.txt', modes, { binary: binaryFacts(recoiling) });
  const notes = [`mass ratio 2, no spin; M Omega = ${recoiling.mOmega0} at t = 0; step ${recoiling.stepM} M`];
  return [
    sheet({
      title: 'Recoil of a 2:1 merger',
      statement,
      waveforms: {
        A: { ...facts, columns: columns.map((name) => (name.includes('-') ? '_' : name)) },
        asWritten: { ...facts, columns, negativeM: 'given' },
      },
      claims: [
        { id: 'C1', quantity: 'recoil', of: { a: 'A' }, settings: { startM: 0, normaliseBy: 'remnant' }, claimed: '112' },
        { id: 'C2', quantity: 'radiated-energy', of: { a: 'asWritten' }, settings: { startM: 0 }, claimed: '0.0293' },
      ],
    }),
    { path: 'modes.txt', text: formatModesText({ title: 'Larkfield Wave Group, Tinderbox run 31, mass ratio 2, all modes', notes, t: whole.t, modes, significantDigits: fewDigits }) },
  ];
}

const starting: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.4, modes: ['22', '44', '32'] };

/** D5: the energy is counted from the first sample, burst of start-up radiation and all. */
export function startUpRadiation(): SpecimenFile[] {
  const wave = withStartUpBurst(synthesise(starting));
  const statement = [
    'Hollowell Computation Centre, code *Ninefold*.',
    '',
    'From the start of the run an equal-mass, non-spinning merger radiates 4.04 % of its mass,',
    '',
    '$$\n\\frac{E}{M}=\\frac1{16\\pi}\\sum_{\\ell m}\\int|\\dot H_{\\ell m}|^2\\,dt=0.0404.\n$$',
    '',
    'Modes (2,±2), (3,±2), (4,±4).',
  ].join('\n');
  const settings = { startM: 150, includeEnergyBeforeStart: 'removed', normaliseBy: 'M' };
  return [
    sheet({ title: 'Four per cent of the mass radiated', statement, waveforms: { A: waveform('modes.txt', wave.modes, { binary: binaryFacts(starting) }) }, claims: [{ id: 'C1', quantity: 'radiated-energy', of: { a: 'A' }, settings, claimed: '0.0404', tolerance: 0.0002 }] }),
    modesFile('modes.txt', 'Hollowell Computation Centre, Ninefold run 5', starting, wave, fewDigits),
  ];
}

const seen: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.025, stepM: 1 };
const opposite: SynthesisRequest = { ...seen, chi1z: 0.6, chi2z: -0.6 };

/** D10: what is true of the quadrupole is claimed of every side. */
export function oppositeSpins(): SpecimenFile[] {
  const present = (request: SynthesisRequest) => {
    const wave = synthesise(request);
    return { ...wave, modes: wave.modes.filter(({ re, im }) => re.some((x) => x !== 0) || im.some((x) => x !== 0)) };
  };
  const [a, b] = [present(opposite), present(seen)];
  const statement = [
    'Hollowell Computation Centre, code *Ninefold*.',
    '',
    'At 100 solar masses an equal-mass binary with spins of 0.6 and −0.6 cannot be told from one without spin: their match is above 0.999 at every inclination, from 20 Hz in the second-generation design curve.',
  ].join('\n');
  const settings = { totalMassMsun: 100, ...detector, response: 'complex' };
  return [
    sheet({
      title: 'Opposite spins cannot be told apart',
      statement,
      waveforms: { A: waveform('opposite.txt', a.modes, { binary: binaryFacts(opposite) }), B: waveform('none.txt', b.modes, { binary: binaryFacts(seen) }) },
      noise: { S: { curve: 'G2' } },
      claims: [
        { id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings, over: { inclinationRad: [0.5236, 1.0472, 1.5708] }, claimed: { above: 0.999 } },
        { id: 'C2', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings: { ...settings, modes: [[2, 2], [2, -2]], inclinationRad: 0 }, claimed: { above: 0.999 } },
      ],
    }),
    modesFile('opposite.txt', 'Hollowell Computation Centre, Ninefold run 14, spins 0.6 and -0.6', opposite, a, fewDigits),
    modesFile('none.txt', 'Hollowell Computation Centre, Ninefold run 15, no spin', seen, b, fewDigits),
  ];
}
