import { withEccentricity } from '@/lib/engine/synthesis/eccentric';
import { peakTime } from '@/lib/engine/synthesis/effects';
import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';
import { binaryFacts, modesFile, sheet, waveform, type SpecimenFile } from './specimen-parts';

/** Specimens of inspirals: how circular one is, and what published fits say that it leaves. */
const request: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.022, stepM: 0.5, modes: ['22'] };
const eccentricity = 0.005;

export function nearlyCircular(): SpecimenFile[] {
  const circular = synthesise(request);
  const wave = withEccentricity(circular, eccentricity, peakTime(circular));
  const statement = [
    'Oxbow Relativity Unit, code *Oxbow-4*.',
    '',
    'Our equal-mass, non-spinning inspiral makes 18.1 cycles before its peak. Between $t=100$ and $1300\\,M$ its frequency swings by an eccentricity of $e_\\omega=0.005$. Published fits give its remnant a mass of $0.9516\\,M$ and a spin of 0.6864, and it rings as one of $0.950(5)\\,M$; at mass ratio 2 they give a recoil of 157 km/s.',
  ].join('\n');
  const of = { a: 'A' };
  return [
    sheet({
      title: 'A nearly circular inspiral, and what it should leave',
      statement,
      waveforms: { A: waveform('modes.txt', wave.modes, { binary: binaryFacts(request) }) },
      claims: [
        { id: 'C1', quantity: 'eccentricity', of, settings: { window: [100, 1300] }, claimed: '0.005' },
        { id: 'C2', quantity: 'cycles', of, claimed: '18.1' },
        { id: 'C3', quantity: 'remnant-fit', of, settings: { observable: 'mass', fit: 'mean' }, claimed: '0.9516' },
        { id: 'C4', quantity: 'remnant-fit', of, settings: { observable: 'spin', fit: 'husa2016' }, claimed: '0.6864' },
        { id: 'C5', quantity: 'remnant-fit', of: {}, settings: { observable: 'recoil', fit: 'campanelli2007', massRatio: 2, chi1z: 0, chi2z: 0 }, claimed: '157' },
        { id: 'C6', quantity: 'remnant-mass', of, settings: { method: 'ringdown' }, claimed: '0.950(5)', tolerance: 0.005 },
      ],
    }),
    modesFile('modes.txt', `Oxbow Relativity Unit, Oxbow-4, eccentricity ${eccentricity}`, request, wave),
  ];
}
