/**
 * Every finding, as a reader may look it up: number, level, the rule in words and what to do. The page
 * of findings is drawn from these rows, and a test holds them beside the code that raises them.
 */
import type { FindingLevel } from '../contract/finding';
import { furtherRows } from './catalogue-further';

export interface CatalogueLevel {
  readonly level: FindingLevel;
  readonly when?: string;
}

export interface CatalogueRow {
  readonly code: string;
  /** Of the house's list of validations; empty for what a quantity adds. */
  readonly numbers: readonly string[];
  readonly part: Part;
  /** Mildest last where a code has several. */
  readonly levels: readonly [CatalogueLevel, ...CatalogueLevel[]];
  /** Which claims it concerns. */
  readonly concerns: string;
  readonly rule: string;
  readonly advice: string;
}

export const parts = {
  files: 'Files',
  sampling: 'Sampling, length and band',
  modes: 'Modes',
  noise: 'Noise curves',
  facts: 'Units and facts of the binary',
  runs: 'Several runs',
  fields: 'Electromagnetic partners',
  stops: 'What else stops a claim',
} as const;
export type Part = keyof typeof parts;

const stops = [{ level: 'stops-lodging' }] as const;
const asks = [{ level: 'needs-answer' }] as const;
const look = [{ level: 'worth-a-look' }] as const;
const note = [{ level: 'note' }] as const;

const numbered: readonly CatalogueRow[] = [
  {
    code: 'formats/not-finite', numbers: ['V01'], part: 'files', levels: stops, concerns: 'all',
    rule: 'A value of a file is NaN or infinite. Nothing is patched over.',
    advice: 'Cut the file before the line that is named, or supply the missing piece.',
  },
  {
    code: 'formats/time-not-monotone', numbers: ['V02'], part: 'files', levels: stops, concerns: 'all',
    rule: 'Time or frequency stands still or goes backwards from one row to the next.',
    advice: 'Remove repeated rows; of two overlapping segments of a restarted run keep one.',
  },
  {
    code: 'formats/gap', numbers: ['V03'], part: 'files', levels: [{ level: 'needs-answer', when: 'above 0.1 cycle of the wave, or where a cycle cannot be told' }, { level: 'worth-a-look', when: 'up to 0.1 cycle; it is interpolated' }], concerns: 'all on series in time',
    rule: 'A step is wider than 1.5 times the median step and the record is not evenly sampled.',
    advice: 'Supply the missing samples, or say why the gap does no harm.',
  },
  {
    code: 'engine/sampling', numbers: ['V04'], part: 'sampling', levels: [{ level: 'stops-lodging', when: 'fewer than 4 samples to a period' }, { level: 'worth-a-look' }], concerns: 'sums over modes; tones',
    rule: 'The fastest mode that matters has fewer than 12 samples to a period. Differences of high order are used, so little is lost down to 4.',
    advice: 'Supply the record with a smaller step.',
  },
  {
    code: 'engine/band-beyond-sampling', numbers: ['V05'], part: 'sampling', levels: look, concerns: 'detectors',
    rule: 'The claim integrates beyond the Nyquist frequency of a record, where content counts as zero; or the ringdown lies in the band with fewer than 4 samples to its period.',
    advice: 'Lower fHighHz, or attach a finer record.',
  },
  {
    code: 'engine/aliasing', numbers: ['V06'], part: 'sampling', levels: look, concerns: 'detectors; sums over modes; tones',
    rule: 'Power of an evenly sampled record rises again towards its Nyquist frequency, more than tenfold above the lowest point between 0.5 and 0.8 of it.',
    advice: 'Filter the record before it is thinned, or supply it with its original step.',
  },
  {
    code: 'engine/signal-starts-in-band', numbers: ['V07'], part: 'sampling', levels: [{ level: 'needs-answer', when: 'two waveforms are compared' }, { level: 'worth-a-look', when: 'loudness; the number is a lower bound' }], concerns: 'detectors',
    rule: 'Where the start ramp of the taper ends, the frequency of the signal lies above fLowHz: part of the band is empty.',
    advice: 'Raise fLowHz, restrict the claim to heavier systems, or attach a longer waveform.',
  },
  {
    code: 'engine/taper-room', numbers: ['V08'], part: 'sampling', levels: look, concerns: 'detectors',
    rule: 'Fewer than two cycles lie below fLowHz, so that the start ramp reaches into the band; or the record is shorter than its ramps.',
    advice: 'Raise fLowHz, or attach a waveform that starts earlier.',
  },
  {
    code: 'engine/startup-burst', numbers: ['V09'], part: 'sampling', levels: [{ level: 'needs-answer', when: 'neither startM nor junkEndM is declared' }, { level: 'worth-a-look' }], concerns: 'sums over modes',
    rule: 'In the first tenth of the record, at most 150 M, the flux stands out of its smooth growth by more than 0.1 % of the whole energy.',
    advice: 'Declare where the start-up radiation ends: junkEndM beside the waveform or startM in the claim.',
  },
  {
    code: 'engine/drift', numbers: ['V10'], part: 'sampling', levels: look, concerns: 'detectors; sums over modes; tones',
    rule: 'The mean of a strain mode over the last quarter of the record after the peak exceeds 1 % of its peak. Modes with m = 0 may keep a memory and are left out.',
    advice: 'Supply ψ₄ or news, remove the drift, or raise integrationFloor where we integrate.',
  },
  {
    code: 'engine/short-ringdown', numbers: ['V11'], part: 'sampling', levels: look, concerns: 'what is integrated to the end of a record or fitted in the ringdown',
    rule: 'The record stops less than five damping times after the peak.',
    advice: 'Supply the record to five damping times after the peak.',
  },
  {
    code: 'engine/noise-floor', numbers: ['V12'], part: 'sampling', levels: note, concerns: 'what is integrated to the end of a record or fitted in the ringdown',
    rule: 'The amplitude stops decaying exponentially; for sums over modes above 10⁻⁴ of the peak.',
    advice: 'Cut the record there, or declare a window that ends earlier.',
  },
  {
    code: 'engine/modes-missing', numbers: ['V13'], part: 'modes', levels: [{ level: 'stops-lodging', when: 'a recoil from a file without (2,±2), (2,±1), (3,±3) and without negativeM: none; a mode that is followed alone' }, { level: 'worth-a-look' }], concerns: 'all on modes',
    rule: 'A mode that the claim lists, or that carries the quantity, is not in the file.',
    advice: 'Supply the mode, or list the modes that are meant.',
  },
  {
    code: 'engine/negative-m-assumed', numbers: ['V14'], part: 'modes', levels: asks, concerns: 'all on modes',
    rule: 'A file holds no modes with m < 0 and the sheet does not say why; they are taken as the mirror of the others, H(ℓ,−m) = (−1)^ℓ H*(ℓ,m).',
    advice: 'Declare negativeM: mirror, given or none.',
  },
  {
    code: 'engine/mirror-broken', numbers: ['V15'], part: 'modes', levels: look, concerns: 'detectors; sums over modes; tones',
    rule: 'A given mode with m < 0 differs from the mirror of its partner by more than 1 %, in pairs above 1 % of the loudest mode.',
    advice: 'Check the convention of modes with m < 0; a missing (−1)^ℓ leaves energies right and recoils wrong.',
  },
  {
    code: 'engine/odd-m-at-equal-mass', numbers: ['V16'], part: 'modes', levels: look, concerns: 'detectors; sums over modes; tones',
    rule: 'With massRatio 1 and equal spins a mode of odd m exceeds 10⁻³ of (2,2) after the first tenth of the record.',
    advice: 'Check massRatio and spins; else the sphere of extraction may lie off centre.',
  },
  {
    code: 'engine/centre-drift', numbers: ['V17'], part: 'modes', levels: look, concerns: 'sums over modes',
    rule: 'In (2,1) a part that turns with (2,2) grows steadily, as it does when the centre of mass moves by more than 0.1 M over the record.',
    advice: 'Remove the motion of the centre of mass from the modes, above all before a recoil is claimed.',
  },
  {
    code: 'engine/band-beyond-curve', numbers: ['V18'], part: 'noise', levels: stops, concerns: 'detectors',
    rule: 'The band reaches beyond the ends of the noise curve. Nothing is extrapolated.',
    advice: 'Move the edge, or attach a curve that reaches further.',
  },
  {
    code: 'engine/curve-invalid', numbers: ['V19'], part: 'noise', levels: stops, concerns: 'detectors',
    rule: 'A noise value is not positive or a frequency does not rise.',
    advice: 'Correct the row that is named, or attach another curve.',
  },
  {
    code: 'engine/curve-coarse', numbers: ['V19'], part: 'noise', levels: look, concerns: 'detectors',
    rule: 'The curve has fewer than 5 points an octave where it is not constant.',
    advice: 'Attach the curve with more points, or name a built-in curve.',
  },
  {
    code: 'engine/curve-identity', numbers: ['V20'], part: 'noise', levels: asks, concerns: 'detectors',
    rule: 'An attached curve is called like a published one, or repeats one digit for digit over two octaves, and differs from it elsewhere by more than 3 %; or it is that curve times or over two, its square, its root, or against 2πf.',
    advice: 'Correct the curve, name it otherwise, or say why it differs.',
  },
  {
    code: 'engine/strain-units', numbers: ['V21'], part: 'facts', levels: asks, concerns: 'detectors; sums over modes; tones',
    rule: 'In the late inspiral (else at the peak) the (2,2) amplitude, or the rate at which its frequency rises, does not fit the declared mass ratio: more than a fifth off in amplitude, a third in chirp mass. Nothing is asked where no massRatio is declared.',
    advice: 'Check variable, amplitudeUnit, timeUnit, psi4Factor and massRatio.',
  },
  {
    code: 'claims/mass-sums', numbers: ['V22'], part: 'facts', levels: asks, concerns: 'all',
    rule: 'Masses in the sheet or in a file’s header contradict each other: components that do not add to the total by more than 10⁻³, a mass ratio that is another or below one, a remnant heavier than the system.',
    advice: 'Give masses in units of the initial total mass, the heavier body first.',
  },
  {
    code: 'claims/spin-above-one', numbers: ['V23'], part: 'facts', levels: stops, concerns: 'all',
    rule: 'A dimensionless spin lies outside −1 … 1.',
    advice: 'Check whether S/m was given instead of S/m².',
  },
  {
    code: 'engine/energy-balance', numbers: ['V24'], part: 'facts', levels: look, concerns: 'remnant mass and spin; energies beside a stated remnant',
    rule: 'Initial energy less what was radiated less the stated remnant leaves more than five times their uncertainty.',
    advice: 'Check admEnergy, remnantMass and the start of the integral.',
  },
  {
    code: 'engine/energy-against-fits', numbers: ['V25'], part: 'facts', levels: note, concerns: 'radiated energy, remnant mass',
    rule: 'The energy lies more than 10 % outside what published fits give for the declared masses and spins.',
    advice: 'Say whether the energy before the record is meant to be in it.',
  },
  {
    code: 'engine/few-resolutions', numbers: ['V26'], part: 'runs', levels: look, concerns: 'orders and extrapolations',
    rule: 'Fewer than three resolutions, or resolutions that start at different times.',
    advice: 'Supply a third resolution; until then the error is taken as three times the difference.',
  },
  {
    code: 'engine/few-radii', numbers: ['V27'], part: 'runs', levels: [{ level: 'stops-lodging', when: 'no radius stated, or not two more than the degree of the polynomial' }, { level: 'worth-a-look' }], concerns: 'radius extrapolation',
    rule: 'Fewer than four radii, or radii that span less than a factor of two.',
    advice: 'Supply at least four radii over a factor of two.',
  },
  {
    code: 'formats/duplicate-files', numbers: ['V28'], part: 'files', levels: stops, concerns: 'all with several files',
    rule: 'Two files that the sheet gives as different are the same byte for byte.',
    advice: 'Attach the file that was meant.',
  },
  {
    code: 'formats/hidden-identity', numbers: ['V29'], part: 'files', levels: asks, concerns: 'all',
    rule: 'A comment line of a text file, or an attribute in an HDF5 file, holds a path with somebody’s directory, an address of e-mail, or the name of a user, an author or a machine. The finding says where and does not repeat it. The copy of a text file that referees download has such comments blanked; attributes are not.',
    advice: 'Attach the file without it, or answer that it may stay.',
  },
  {
    code: 'engine/not-test-field', numbers: ['V30'], part: 'fields', levels: look, concerns: 'ratio of electromagnetic to gravitational energy',
    rule: 'The field in units of the mass exceeds 10⁻², or the electromagnetic energy 10⁻³ of the gravitational one: the field is no test field and the rule of B² is not justified.',
    advice: 'Claim the number at a weaker field, or say why the rule still holds.',
  },
];

export const findingsCatalogue: readonly CatalogueRow[] = [...numbered, ...furtherRows];

/** V01 … V30. */
export const validationNumbers: readonly string[] = Array.from({ length: 30 }, (_, i) => `V${String(i + 1).padStart(2, '0')}`);
