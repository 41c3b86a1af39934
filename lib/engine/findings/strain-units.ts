import type { Finding } from '../contract/finding';
import type { Waveform } from '../contract/waveform';
import { radiationRecord, type RadiationVariable } from '../radiation/radiation-record';
import { readInspiral, type InspiralReading } from './inspiral-reading';
import { lateDecay, type LateDecay } from './late-decay';
import { peakOf } from './loud-modes';
import { scientific, short } from './spelt';

/** The measured amplitude over the leading order's is near this in the late inspiral, whatever the masses. */
const USUAL = 0.95;
/** So far from it, either way, nothing is asked: leading order, spins and eccentricity move it by less. */
const BAND = 1.2;
/** The leading-order chirp mass of a late inspiral is right to about a tenth. */
const CHIRP_BAND = 1.35;
/** An explanation fits when it brings the ratio back to within this of the usual one. */
const EXPLAINS = 1.12;

const words: Readonly<Record<RadiationVariable, string>> = { strain: 'r h/M', news: 'r ḣ', psi4: 'r M ψ₄' };
const order: Readonly<Record<RadiationVariable, number>> = { strain: 0, news: 1, psi4: 2 };
const FACE_ON = 0.6307831305;
/** |rh/M| of (2,2) at merger without spin; spins move it by a few per cent. From simulations, domain reference, appendix B. */
const peakStrain = (eta: number): number => eta * (1.45 + 0.49 * eta);
/** Peaks over that of the strain; spins move those of ḣ and ψ₄ most. */
const AT_PEAK: Readonly<Record<RadiationVariable, number>> = { strain: 1, news: 0.43, psi4: 0.2 };
const PEAK_BAND: Readonly<Record<RadiationVariable, number>> = { strain: 1.25, news: 1.6, psi4: 2.2 };
const PEAK_OMEGA = 0.4;
/** ω over the decay rate of a remnant's (2,2): 4.2 without spin, 6.5 of equal masses, 14 at a spin of 0.95. */
const USUAL_RING = 7;
const RING_BAND = 2.5;
const LEAST_RING = 0.25;
const MOST_RING = 1.2;
/** M over D of any source that is heard. */
const TINY = 1e-12;

const within = (ratio: number, band: number): boolean => ratio < band && ratio > 1 / band;

/** The (2,2) amplitude at one place, beside what its mass ratio lets expect there. */
interface Fingerprint {
  readonly variable: RadiationVariable;
  /** Where it was read, in words. */
  readonly place: string;
  /** ω₂₂ there, rad/M. */
  readonly omega: number;
  readonly amplitude: number;
  readonly expected: number;
  /** Measured over expected may differ from 1 by this, either way. */
  readonly band: number;
}

function ofReading({ omega, amplitude, atM }: InspiralReading, variable: RadiationVariable, eta: number): Fingerprint {
  const expected = USUAL * 8 * Math.sqrt(Math.PI / 5) * eta * omega ** (2 / 3) * (2 * omega) ** order[variable];
  return { variable, place: `At orbital frequency MΩ = ${short(omega)} (t = ${short(atM, 6)} M)`, omega: 2 * omega, amplitude, expected, band: BAND };
}

/** Does what follows the peak ring like a remnant, in whatever unit of time? Ratios of frequency to decay say so. */
const rings = (decay: LateDecay | null): decay is LateDecay & { readonly rate: number; readonly turning: number } =>
  decay !== null && decay.isExponential && decay.rate !== null && decay.turning !== null && within(decay.turning / decay.rate / USUAL_RING, RING_BAND);

/** Where a record begins too late for an inspiral: the peak, if a ringdown follows it. */
function ofPeak(axis: Float64Array, decay: LateDecay | null, variable: RadiationVariable, eta: number): Fingerprint | null {
  if (!rings(decay)) return null;
  const expected = peakStrain(eta) * AT_PEAK[variable];
  return { variable, place: `At its peak (t = ${short(axis[decay.peakIndex]!, 6)} M)`, omega: PEAK_OMEGA, amplitude: decay.peak, expected, band: PEAK_BAND[variable] };
}

interface Explanation {
  readonly factor: number;
  readonly says: string;
}

/** What the amplitude would be over the expected one, if this had happened. */
function explanations({ variable, omega }: Fingerprint): Explanation[] {
  const others = (Object.keys(order) as RadiationVariable[]).filter((other) => other !== variable);
  return [
    ...others.map((other) => ({ factor: omega ** (order[other] - order[variable]), says: `As ${words[other]} it would fit: is the variable declared right?` })),
    { factor: FACE_ON, says: 'That is the factor 0.631 of a face-on view: is the angular factor in it already?' },
    { factor: 1 / FACE_ON, says: 'That is one over the factor 0.631 of a face-on view: was it divided out?' },
    { factor: 2, says: variable === 'psi4' ? 'That is another normalisation of ψ₄: psi4Factor?' : 'That is a factor of two.' },
    { factor: 0.5, says: variable === 'psi4' ? 'That is another normalisation of ψ₄: psi4Factor?' : 'That is a factor of two.' },
  ];
}

function amplitudeFinding(found: Fingerprint, peak: number, name: string): Finding | null {
  const { variable, amplitude, expected, band, place } = found;
  const ratio = amplitude / expected;
  if (within(ratio, band)) return null;
  const tiny = ratio < TINY ? 'It looks like a strain with the distance in it: amplitudeUnit "strain"?' : undefined;
  const off = ({ factor }: Explanation): number => Math.abs(Math.log(ratio / factor));
  const best = explanations(found).reduce((p, q) => (off(q) < off(p) ? q : p));
  const said = (off(best) < Math.log(EXPLAINS) ? best.says : tiny) ?? 'No usual change of units explains it.';
  return {
    code: 'engine/strain-units',
    level: 'needs-answer',
    where: name,
    text: `${place} the (2,2) amplitude of ${name} is ${scientific(amplitude, 3)}, and ${scientific(peak, 3)} at most. For ${words[variable]} of the declared mass ratio one expects ${scientific(expected, 3)} there; it is ×${scientific(ratio, 3)} of that. ${said}`,
    fix: 'Check variable, amplitudeUnit, psi4Factor and massRatio beside the file, or say why the amplitude is right.',
  };
}

const timeQuestion = (name: string, text: string): Finding => ({
  code: 'engine/strain-units',
  level: 'needs-answer',
  where: name,
  text,
  fix: 'Check timeUnit and massRatio beside the file, or say why the frequency is right.',
});

function chirpFinding(chirpMass: number | null, eta: number, name: string): Finding | null {
  const expected = eta ** 0.6;
  if (chirpMass === null || within(chirpMass / expected, CHIRP_BAND)) return null;
  return timeQuestion(name, `The frequency of (2,2) of ${name} rises as for a chirp mass of ${scientific(chirpMass, 3)} M; the declared mass ratio gives ${short(expected)} M, to about a tenth. The time may be in another unit, or the mass ratio is another.`);
}

function ringFinding(decay: LateDecay | null, name: string): Finding | null {
  if (!rings(decay) || (decay.turning > LEAST_RING && decay.turning < MOST_RING)) return null;
  return timeQuestion(name, `After its peak (2,2) of ${name} rings at Mω = ${scientific(decay.turning, 3)}; remnants ring between ${LEAST_RING} and ${MOST_RING}. The time may be in another unit.`);
}

/**
 * V21, by the fingerprint of the inspiral: amplitude and rate of frequency must fit the declared mass
 * ratio. Nothing is asked of files that state none, or that hold no inspiral.
 */
export function strainUnitsFindings(waveform: Waveform): Finding[] {
  if (waveform.content.kind !== 'modes') return [];
  const quadrupole = waveform.content.modes.filter(({ l, m }) => l === 2 && m === 2);
  const record = radiationRecord({ ...waveform, content: { kind: 'modes', modes: quadrupole } });
  if ('saw' in record || quadrupole.length === 0) return [];
  const { massRatio } = waveform.binary;
  if (massRatio === undefined || !(massRatio > 0)) return [];
  const eta = massRatio / (1 + massRatio) ** 2;
  const { re, im } = record.modes[0]!;
  const decay = lateDecay(record.axis, re, im);
  const inspiral = readInspiral(record);
  const reading = inspiral?.reading ?? null;
  const found = reading === null ? ofPeak(record.axis, decay, record.variable, eta) : ofReading(reading, record.variable, eta);
  // A wrong unit of time makes every amplitude meaningless: one question at a time.
  const asked =
    chirpFinding(inspiral?.chirpMass ?? null, eta, waveform.name) ??
    ringFinding(decay, waveform.name) ??
    (found === null ? null : amplitudeFinding(found, peakOf(record.modes[0]!), waveform.name));
  return asked === null ? [] : [asked];
}
