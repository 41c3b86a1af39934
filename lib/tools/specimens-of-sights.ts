import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';
import { binaryFacts, modesFile, sheet, waveform, type SpecimenFile } from './specimen-parts';

/** Specimens of what one binary looks like from all sides, and of a signal longer than its simulation. */
const long: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.5, modes: ['22'] };

export function longSignal(): SpecimenFile[] {
  const wave = synthesise(long);
  const statement = [
    'North Quay Astrophysics, code *Ferrywright*.',
    '',
    'A binary of 20 solar masses at 400 Mpc is heard from 20 Hz on, our simulation from 65 Hz. Below 100 Hz we take the restricted post-Newtonian amplitude and find a signal-to-noise ratio of 42.7. With 60 solar masses at the source the same merger is heard to a redshift of 1.142.',
  ].join('\n');
  const of = { a: 'A' };
  return [
    sheet({
      title: 'Long signals by amplitude stitching',
      statement,
      waveforms: { A: waveform('modes.txt', wave.modes, { binary: binaryFacts(long) }) },
      noise: { S: { curve: 'G2' } },
      claims: [
        {
          id: 'C1',
          quantity: 'hybrid-snr',
          of,
          noise: 'S',
          settings: { totalMassMsun: 20, massFrame: 'detector', distanceMpc: 400, fLowHz: 20, joinHz: 100, amplitudeOrder: 0 },
          claimed: { value: '42.7', uncertainty: 0.4 },
        },
        { id: 'C2', quantity: 'horizon-redshift', of, noise: 'S', settings: { totalMassMsun: 60, massFrame: 'source', fLowHz: 20 }, claimed: '1.142' },
      ],
    }),
    modesFile('modes.txt', 'North Quay Astrophysics, Ferrywright, numerical part', long, wave),
  ];
}

const seen: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.025, stepM: 1 };
const unequal: SynthesisRequest = { ...seen, massRatio: 2 };
const opposite: SynthesisRequest = { ...seen, chi1z: 0.6, chi2z: -0.6 };

/** Modes that symmetry forbids are zero, and carry nothing. */
const present = (request: SynthesisRequest) => {
  const wave = synthesise(request);
  return { ...wave, modes: wave.modes.filter(({ re, im }) => re.some((x) => x !== 0) || im.some((x) => x !== 0)) };
};

export function allSides(): SpecimenFile[] {
  const [u, o, n] = [present(unequal), present(opposite), present(seen)];
  const statement = [
    'Hollowell Computation Centre, code *Ninefold*.',
    '',
    'At 100 solar masses and from 20 Hz on the quadrupole alone matches the whole signal of a binary of mass ratio 2 with 0.9924 at an inclination of 30° and with 0.9726 at 60°. Opposite spins cannot be told apart from none: between spins of 0.6 and −0.6 and no spin the match is above 0.999 at every inclination.',
  ].join('\n');
  const settings = { totalMassMsun: 100, massFrame: 'detector', fLowHz: 20 };
  return [
    sheet({
      title: 'One binary from all sides',
      statement,
      waveforms: {
        Q: waveform('unequal.txt', u.modes, { binary: binaryFacts(unequal) }),
        A: waveform('opposite.txt', o.modes, { binary: binaryFacts(opposite) }),
        B: waveform('none.txt', n.modes, { binary: binaryFacts(seen) }),
      },
      noise: { S: { curve: 'G2' } },
      claims: [
        { id: 'C1', quantity: 'mode-content', of: { a: 'Q' }, noise: 'S', settings, over: { inclinationRad: [0.5236, 1.0472] }, claimed: ['0.9924', '0.9726'] },
        { id: 'C2', quantity: 'degeneracy', of: { a: 'A', b: 'B' }, noise: 'S', settings, claimed: { above: 0.999 } },
      ],
    }),
    modesFile('unequal.txt', 'Hollowell Computation Centre, Ninefold, mass ratio 2', unequal, u),
    modesFile('opposite.txt', 'Hollowell Computation Centre, Ninefold, opposite spins', opposite, o),
    modesFile('none.txt', 'Hollowell Computation Centre, Ninefold, no spins', seen, n),
  ];
}
