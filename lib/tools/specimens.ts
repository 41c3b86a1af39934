import { peakTime, withResolutionError } from '@/lib/engine/synthesis/effects';
import { fieldHatOf } from '@/lib/engine/electromagnetic/em-units';
import { curvatureOf, mirroredField } from '@/lib/engine/synthesis/electromagnetic-twin';
import { formatModesText, modeColumns, watermark } from '@/lib/engine/synthesis/modes-text';
import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';
import { binaryFacts, designCurveFile, digits, modesFile, positive, sheet, waveform, withoutStart, type SpecimenFile } from './specimen-parts';
import { horizonOfSixty, oppositeSpins, recoilOfTwoToOne, sourceFrame, startUpRadiation, typedByHand, weakSpins } from './specimens-of-misreadings';
import { nearlyCircular } from './specimens-of-orbits';
import { spinBlindSearch } from './specimens-of-banks';
import { allSides, longSignal } from './specimens-of-sights';
import { remnantByBalance, unconvergedPhase } from './specimens-of-runs';

/**
 * The specimens: small claim sheets with synthesised data that are example, seed and test at once.
 * Each is a function of nothing, so that the files in content/specimens can be made again byte for byte.
 * Claimed numbers are what the invented authors print, not what the engine finds.
 */
export interface Specimen {
  readonly folder: string;
  readonly files: () => readonly SpecimenFile[];
}

const nonSpinning: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.012, stepM: 0.5, modes: ['22'] };
const spinning: SynthesisRequest = { ...nonSpinning, chi1z: 0.2, chi2z: 0.2 };

function spinVisible(): SpecimenFile[] {
  const [a, b] = [synthesise(nonSpinning), synthesise(spinning)];
  const statement = [
    'Larkfield Wave Group, code *Tinderbox*.',
    '',
    'Two equal-mass binaries, one without spin and one with $\\chi_1=\\chi_2=0.2$ along the orbital angular momentum, are told apart by a second-generation detector: with a lower cut-off of 20 Hz their match is',
    '',
    '$$\n\\mathcal M=\\max_{t_0,\\phi_0}\\frac{\\langle h_1|h_2\\rangle}{\\sqrt{\\langle h_1|h_1\\rangle\\langle h_2|h_2\\rangle}}=0.9753\n$$',
    '',
    'at 60 solar masses, and 0.9959 and 0.9932 at 100 and 200 solar masses. Only the (2,±2) modes are used; masses are detector-frame.',
  ].join('\n');
  return [
    sheet({
      title: 'Spin 0.2 is visible at 60 solar masses',
      statement,
      waveforms: {
        A: waveform('a.txt', a.modes, { binary: binaryFacts(nonSpinning) }),
        B: waveform('b.txt', b.modes, { binary: binaryFacts(spinning) }),
      },
      noise: { S: { file: 'noise.txt', columns: ['f', 'asd'], sided: 'one' } },
      claims: [
        {
          id: 'C1',
          quantity: 'match',
          of: { a: 'A', b: 'B' },
          noise: 'S',
          settings: { fLowHz: 20, massFrame: 'detector', maximise: ['time', 'phase'] },
          over: { totalMassMsun: [60, 100, 200] },
          claimed: ['0.9753', '0.9959', '0.9932'],
          tolerance: 0.0005,
        },
      ],
    }),
    modesFile('a.txt', 'Larkfield Wave Group, Tinderbox run 12, no spin', nonSpinning, a),
    modesFile('b.txt', 'Larkfield Wave Group, Tinderbox run 13, spins 0.2', spinning, b),
    designCurveFile('noise.txt', 600),
  ];
}

function loudness(): SpecimenFile[] {
  const a = synthesise(nonSpinning);
  const statement = [
    'Saltern Institute of Strong Gravity, code *Gridlark*.',
    '',
    'Signal-to-noise ratio $\\rho$ of an equal-mass, non-spinning merger, face-on and optimally placed at a luminosity distance of 1000 Mpc, with',
    '',
    '$$\n\\rho^2=4\\int_{f_l}^{f_h}\\frac{|\\tilde h(f)|^2}{S_n(f)}\\,df,\\qquad f_l=20\\ \\mathrm{Hz},\n$$',
    '',
    'and the second-generation design curve: 25.67 at 60 and 37.25 at 100 solar masses (detector frame).',
  ].join('\n');
  return [
    sheet({
      title: 'Loudness of non-spinning mergers at 1 Gpc',
      statement,
      waveforms: { A: waveform('a.txt', a.modes, { binary: binaryFacts(nonSpinning) }) },
      noise: { S: { curve: 'G2' } },
      claims: [
        {
          id: 'C1',
          quantity: 'snr',
          of: { a: 'A' },
          noise: 'S',
          settings: { distanceMpc: 1000, fLowHz: 20, massFrame: 'detector', inclinationRad: 0 },
          over: { totalMassMsun: [60, 100] },
          claimed: ['25.67', '37.25'],
        },
      ],
    }),
    modesFile('a.txt', 'Saltern Institute of Strong Gravity, Gridlark run q1', nonSpinning, a),
  ];
}

/** Phase that the coarser run has lost at the peak: a mismatch of 1e-6 at 100 solar masses on curve G2. */
const coarsePhaseRad = 0.23;

const preciseModels = () =>
  [
    { name: 'A', request: nonSpinning },
    { name: 'B', request: spinning },
  ].map(({ name, request }) => {
    const fine = withoutStart(synthesise(request), 11000);
    const coarse = withResolutionError(fine, { phaseRad: coarsePhaseRad, amplitude: 0 }, peakTime(fine));
    return [
      { name, file: `${name.toLowerCase()}-fine.txt`, request, wave: fine, spacing: 0.01, series: `run-${name}` },
      { name: `${name}coarse`, file: `${name.toLowerCase()}-coarse.txt`, request, wave: coarse, spacing: 0.0125, series: `run-${name}` },
    ];
  });

function preciseMatch(): SpecimenFile[] {
  const runs = preciseModels().flat();
  const statement = [
    'Oxbow Relativity Unit, code *Oxbow-4*.',
    '',
    'The match of two of our equal-mass models, spins 0 and 0.2, at 100 solar masses with the second-generation design curve from 20 Hz is $\\mathcal M=0.988942$. Each model was run at two resolutions, whose mismatch is $10^{-6}$.',
  ].join('\n');
  const waveforms = runs.map(({ name, file, request, wave, spacing, series }) => [
    name,
    waveform(file, wave.modes, { binary: binaryFacts(request), resolution: spacing, series }),
  ]);
  const settings = { totalMassMsun: 100, fLowHz: 20, massFrame: 'detector', maximise: ['time', 'phase'] };
  return [
    sheet({
      title: 'High-precision match of two models',
      statement,
      waveforms: Object.fromEntries(waveforms),
      noise: { S: { curve: 'G2' } },
      claims: [
        { id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings, claimed: '0.988942' },
        { id: 'C2', quantity: 'mismatch', of: { a: 'A', b: 'Acoarse' }, noise: 'S', settings, claimed: '1.0e-6' },
      ],
    }),
    ...runs.map(({ file, request, wave, spacing, series }) =>
      modesFile(file, `Oxbow Relativity Unit, Oxbow-4, ${series}, spacing ${spacing} M`, request, wave),
    ),
  ];
}

function energyRequest(): SynthesisRequest {
  return { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.4, modes: ['22', '44', '32'] };
}

function radiatedEnergy(): SpecimenFile[] {
  const request = energyRequest();
  const wave = synthesise(request);
  const statement = [
    'Hollowell Computation Centre, code *Ninefold*.',
    '',
    'An equal-mass, non-spinning merger radiates 4.0 % of its mass from an orbital frequency of $M\\Omega=0.02$ on:',
    '',
    '$$\n\\frac{E}{M}=\\frac1{16\\pi}\\sum_{\\ell m}\\int|\\dot H_{\\ell m}|^2\\,dt=0.0399(2).\n$$',
    '',
    'Modes (2,±2), (3,±2), (4,±4); the energy radiated before the first sample is not included.',
  ].join('\n');
  return [
    sheet({
      title: 'Four per cent of the mass radiated',
      statement,
      waveforms: { A: waveform('modes.txt', wave.modes, { binary: binaryFacts(request) }) },
      claims: [
        {
          id: 'C1',
          quantity: 'radiated-energy',
          of: { a: 'A' },
          settings: { startM: 0, includeEnergyBeforeStart: false, normaliseBy: 'M' },
          claimed: '0.0399',
          tolerance: 0.0002,
        },
      ],
    }),
    modesFile('modes.txt', 'Hollowell Computation Centre, Ninefold run 4', request, wave),
  ];
}

/** Late enough to be small, early enough that neither peak nor recoil feels the start. */
const twoToOneRequest: SynthesisRequest = { massRatio: 2, chi1z: 0, chi2z: 0, mOmega0: 0.03, stepM: 0.4, modes: ['22', '21', '33', '44', '32'] };

function twoToOne(): SpecimenFile[] {
  const wave = synthesise(twoToOneRequest);
  const statement = [
    'Larkfield Wave Group, code *Tinderbox*.',
    '',
    'From an orbital frequency of $M\\Omega=0.03$ on, a non-spinning merger of mass ratio 2 radiates an angular momentum of $0.261\\,M^2$; its luminosity peaks at $8.44\\times10^{-4}\\,c^5/G$, and the remnant is left with a recoil of 138 km/s (momentum over M).',
    '',
    'Modes (2,±2), (2,±1), (3,±3), (3,±2), (4,±4); those with m < 0 are the mirrors of those given.',
  ].join('\n');
  const of = { a: 'A' };
  return [
    sheet({
      title: 'What a merger of mass ratio 2 carries away',
      statement,
      waveforms: { A: waveform('modes.txt', wave.modes, { binary: binaryFacts(twoToOneRequest) }) },
      claims: [
        { id: 'C1', quantity: 'radiated-angular-momentum', of, settings: { startM: 0 }, claimed: '0.261' },
        { id: 'C2', quantity: 'peak-luminosity', of, claimed: '8.44e-4' },
        { id: 'C3', quantity: 'recoil', of, settings: { startM: 0, normaliseBy: 'M' }, claimed: '138' },
      ],
    }),
    modesFile('modes.txt', 'Larkfield Wave Group, Tinderbox run 31, mass ratio 2', twoToOneRequest, wave),
  ];
}

/** The last 1100 M or so: the ringdown, and enough before it to align by. */
const ringingRequest: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.4, modes: ['22'] };
const samplesBeforeRinging = 3400;

function ringdownAndResolution(): SpecimenFile[] {
  const fine = withoutStart(synthesise(ringingRequest), samplesBeforeRinging);
  const coarse = withResolutionError(fine, { phaseRad: 0.05, amplitude: 0.002 }, peakTime(fine));
  const statement = [
    'Oxbow Relativity Unit, code *Oxbow-4*.',
    '',
    'The remnant of an equal-mass, non-spinning merger rings with $M\\omega_{22}=0.553$ and $M/\\tau=0.0854$ between 25 and 60 $M$ after the peak. At the peak our coarser run is 0.050 rad ahead of the finer one as the files stand, and 0.2 % louder. An alignment over $t=1600\\ldots1900\\,M$ takes the drift inside it for a shift of time, and leaves the coarser run 0.57 rad behind.',
  ].join('\n');
  const one = { a: 'fine' };
  const two = { a: 'fine', b: 'coarse' };
  const extra = { binary: { ...binaryFacts(ringingRequest), remnantMass: 0.95161, remnantSpin: 0.68642 } };
  return [
    sheet({
      title: 'How the remnant rings, and what a coarser run changes',
      statement,
      waveforms: { fine: waveform('fine.txt', fine.modes, extra), coarse: waveform('coarse.txt', coarse.modes, extra) },
      claims: [
        { id: 'C1', quantity: 'ringdown-frequency', of: one, claimed: '0.553' },
        { id: 'C2', quantity: 'ringdown-damping', of: one, settings: { window: [25, 60] }, claimed: '0.0854' },
        { id: 'C3', quantity: 'phase-difference', of: two, settings: { alignment: 'none', at: 'peak' }, claimed: '0.050' },
        { id: 'C4', quantity: 'phase-difference', of: two, settings: { alignment: 'window', window: [1600, 1900] }, claimed: '-0.57' },
        { id: 'C5', quantity: 'amplitude-difference', of: two, settings: { alignment: 'none' }, claimed: '0.0020' },
      ],
    }),
    modesFile('fine.txt', 'Oxbow Relativity Unit, Oxbow-4, fine', ringingRequest, fine),
    modesFile('coarse.txt', 'Oxbow Relativity Unit, Oxbow-4, coarse', ringingRequest, coarse),
  ];
}

/** Late enough to be small: three files of the last 700 M or so. */
const twinRequest: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.03, stepM: 0.5, modes: ['22'] };
const twinMassMsun = 1e8;
const twinRuns = [
  { name: 'P4', file: 'phi2-weak.txt', fieldGauss: 1e4 },
  { name: 'P6', file: 'phi2-strong.txt', fieldGauss: 1e6 },
] as const;
const statedRemnant = { remnantMass: 0.95161, remnantSpin: 0.68642 };

function electromagneticTwin(): SpecimenFile[] {
  const curvature = curvatureOf(synthesise(twinRequest));
  const note = `mass ratio 1, no spin; M Omega = ${twinRequest.mOmega0} at t = 0; step ${twinRequest.stepM} M`;
  const fields = twinRuns.map((run) => ({ ...run, wave: mirroredField(curvature, fieldHatOf(run.fieldGauss, twinMassMsun)) }));
  const statement = [
    'North Quay Astrophysics, code *Ferrywright*.',
    '',
    'An equal-mass merger of $10^8$ solar masses in a uniform magnetic field emits an electromagnetic twin of its gravitational wave. In a field of $10^4$ G the energy is $E_{EM}/M=10^{-15}$, or $2.8\\times10^{-14}$ of what goes into gravitational waves from $t=100\\,M$ on; in $10^6$ G it is $10^{-13}$. The two signals mirror each other, and the twin is observable in low-frequency radio above 1.56 kHz.',
  ].join('\n');
  const at = (fieldGauss: number) => ({ fieldGauss, totalMassMsun: twinMassMsun });
  const waves = { ...waveform('psi4.txt', curvature.modes, { binary: { ...binaryFacts(twinRequest), ...statedRemnant } }), variable: 'psi4' };
  const light = fields.map(({ name, file, fieldGauss, wave }) => [name, { file, variable: 'phi2', columns: modeColumns(wave.modes), amplitudeUnit: 'geometric', tetrad: 'symmetric', totalMassMsun: twinMassMsun, series: 'fields', binary: { ...binaryFacts(twinRequest), fieldGauss } }] as const);
  return [
    sheet({
      title: 'Electromagnetic twin of a supermassive merger',
      statement,
      waveforms: { G: waves, ...Object.fromEntries(light) },
      claims: [
        { id: 'C1', quantity: 'em-energy', of: { a: 'P4' }, settings: at(1e4), claimed: '1.0e-15' },
        { id: 'C2', quantity: 'em-energy', of: { a: 'P6' }, settings: at(1e6), claimed: '1.0e-13' },
        { id: 'C3', quantity: 'em-ratio', of: { em: 'P4', gw: 'G' }, settings: { ...at(1e4), startM: 100 }, claimed: '2.8e-14' },
        { id: 'C4', quantity: 'field-exponent', of: { series: 'fields' }, claimed: '2.00' },
        { id: 'C5', quantity: 'em-frequency', of: { a: 'G' }, settings: { totalMassMsun: twinMassMsun, plasmaDensityCm3: 0.03 }, claimed: { above: 1560 } },
        { id: 'C6', quantity: 'em-mirroring', of: { em: 'P4', gw: 'G' }, claimed: '0.00' },
      ],
    }),
    { path: 'psi4.txt', text: formatModesText({ title: 'North Quay Astrophysics, Ferrywright run 9', notes: [note], t: curvature.t, modes: positive(curvature.modes), significantDigits: digits, of: 'r M psi4' }) },
    ...fields.map(({ file, fieldGauss, wave }) => ({ path: file, text: formatModesText({ title: `North Quay Astrophysics, Ferrywright run 9, field ${fieldGauss} G at ${twinMassMsun} solar masses`, notes: [note], t: wave.t, modes: wave.modes, significantDigits: digits, of: 'r phi2 (B M in it, symmetric tetrad)' }) })),
  ];
}

/** A flare of the disc that the recoil shakes: peak 1.26e45 erg/s after 3e5 s. */
const flare = { peakErgPerS: 1.26e45, afterS: 3e5, restErgPerS: 1e42, stepS: 4000, rows: 400 } as const;

function shakenDisc(): SpecimenFile[] {
  const { peakErgPerS, afterS, restErgPerS, stepS, rows } = flare;
  const lines = Array.from({ length: rows }, (_, i) => {
    const x = (i * stepS) / afterS;
    return `${i * stepS} ${(restErgPerS + (peakErgPerS - restErgPerS) * (x * Math.exp(1 - x)) ** 2).toExponential(digits - 1)}`;
  });
  const statement = [
    'North Quay Astrophysics, code *Ferrywright*.',
    '',
    'The disc around the remnant of $10^8$ solar masses is shaken by the recoil and flares to a tenth of the Eddington luminosity. That is what an accretion of 0.22 solar masses a year gives at an efficiency of 0.1; the gas holds $10^{52}$ erg. With $10^{49}$ erg, as in our thin model, the luminosity is the same.',
  ].join('\n');
  const common = { totalMassMsun: twinMassMsun, radiusM: 20 };
  return [
    sheet({
      title: 'A disc shaken by the recoil',
      statement,
      waveforms: { D: { file: 'luminosity.txt', variable: 'luminosity', columns: ['t', 'L'], timeUnit: 's' } },
      claims: [
        { id: 'C1', quantity: 'disc-luminosity', of: { a: 'D' }, settings: { ...common, internalEnergyErg: 1e52, radiativeEfficiency: 0.1, accretionRateMsunPerYear: 0.22 }, claimed: '0.10' },
        { id: 'C2', quantity: 'disc-luminosity', of: { a: 'D' }, settings: { ...common, internalEnergyErg: 1e49 }, claimed: '0.10' },
      ],
    }),
    { path: 'luminosity.txt', text: ['# North Quay Astrophysics, Ferrywright disc 4', `# ${watermark}`, '# t (s)  L (erg/s)', ...lines, ''].join('\n') },
  ];
}

export const specimens: readonly Specimen[] = [
  { folder: 'spin-visible', files: spinVisible },
  { folder: 'loudness', files: loudness },
  { folder: 'precise-match', files: preciseMatch },
  { folder: 'radiated-energy', files: radiatedEnergy },
  { folder: 'ringdown-and-resolution', files: ringdownAndResolution },
  { folder: 'two-to-one', files: twoToOne },
  { folder: 'nearly-circular', files: nearlyCircular },
  { folder: 'remnant-by-balance', files: remnantByBalance },
  { folder: 'unconverged-phase', files: unconvergedPhase },
  { folder: 'long-signal', files: longSignal },
  { folder: 'all-sides', files: allSides },
  { folder: 'electromagnetic-twin', files: electromagneticTwin },
  { folder: 'shaken-disc', files: shakenDisc },
  { folder: 'spin-blind-search', files: spinBlindSearch },
  { folder: 'weak-spins', files: weakSpins },
  { folder: 'source-frame', files: sourceFrame },
  { folder: 'recoil-of-two-to-one', files: recoilOfTwoToOne },
  { folder: 'horizon-of-sixty', files: horizonOfSixty },
  { folder: 'typed-by-hand', files: typedByHand },
  { folder: 'start-up-radiation', files: startUpRadiation },
  { folder: 'opposite-spins', files: oppositeSpins },
];
