import { binaryOf, findingsOf, inM, type FindingSpecimen } from './finding-specimen';

const clean = binaryOf();
const waves = inM(clean, { name: 'G', binary: { massRatio: 1, chi1z: 0, chi2z: 0 } });
/** φ₂ in the shape of the ringing, at a field of 10⁴ G and a mass of 10⁸ M☉. */
const partner = inM(
  { t: clean.t, modes: clean.modes.map((mode) => ({ ...mode, re: mode.re.map((x) => 1e-9 * x), im: mode.im.map((x) => 1e-9 * x) })) },
  { name: 'P', variable: 'phi2', amplitudeUnit: 'geometric', ownTotalMassMsun: 1e8, binary: { fieldGauss: 1e4 } },
);
const ratio = (fieldGauss: number) => findingsOf('em-ratio', { of: { em: partner, gw: waves }, settings: { fieldGauss, totalMassMsun: 1e8 } });

export const fieldSpecimens: readonly FindingSpecimen[] = [
  {
    number: 'V30', code: 'engine/not-test-field', level: 'worth-a-look', when: 'the field is 10¹⁰ G at 10⁸ M☉',
    raises: () => ratio(1e10), says: ['1×10¹⁰ G and 1×10⁸ M☉', 'B̂ = 0.042, above 0.01'], silent: () => ratio(1e4),
  },
];
