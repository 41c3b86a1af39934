import type { InspiralReading } from '../findings/inspiral-reading';
import { scientific, short } from '../findings/spelt';
import type { RadiationVariable } from '../radiation/radiation-record';
import type { Guess } from './guess';

/** Measured over leading order near MΩ = 0.03. */
const USUAL = 0.95;
const FACE_ON = 0.6307831305;
/** ln of measured over expected: nearer than the first it is clear, beyond the second nothing is guessed. */
const CLEAR = 0.1;
const FITS = Math.log(1.2);

const order: Readonly<Record<RadiationVariable, number>> = { strain: 0, news: 1, psi4: 2 };
const variables = ['strain', 'news', 'psi4'] as const;
const factors = [
  { factor: 2, says: 'twice what is declared' },
  { factor: 0.5, says: 'half of what is declared' },
  { factor: FACE_ON, says: 'the face-on angular factor 0.631 already in it' },
] as const;

interface Candidate {
  readonly expected: number;
  readonly guess: Pick<Guess, 'about' | 'convention' | 'proposed' | 'value' | 'agrees'>;
  readonly most: number;
}

/** M over D of any source that is heard. */
export const TINY = 1e-12;
/** With η from the chirp alone an amplitude is known to a third; the variables lie a factor of ten apart. */
const ROUGH = Math.log(1.6);

function candidates(declared: RadiationVariable, omega: number, rough: boolean): Candidate[] {
  const of = (variable: RadiationVariable): number => USUAL * (2 * omega) ** order[variable];
  return [
    ...variables.map((variable) => ({ expected: of(variable), most: 0.95, guess: { about: 'variable', convention: 'C19', proposed: variable, value: variable, agrees: variable === declared } as const })),
    // A strain as a detector measures it has M over D in it.
    { expected: 1e-20, most: 0.9, guess: { about: 'normalisation', convention: 'C27', proposed: 'strain at a distance, not r h/M', value: 'at-a-distance', agrees: false } as const },
    // Orbits and spins may move an amplitude by a tenth, and 0.5 and 0.631 lie a quarter apart.
    ...(rough ? [] : factors).map(({ factor, says }) => ({
      expected: of(declared) * factor,
      most: 0.85,
      guess: { about: 'normalisation', convention: factor === FACE_ON ? 'C09' : declared === 'psi4' ? 'C20' : 'C27', proposed: says, value: factor, agrees: false } as const,
    })),
  ];
}

/**
 * Variable and normalisation, by the amplitude of (2,2) over R = 8√(π/5) η x.
 * Shape:  one reading of the inspiral; `rough` where η is from the chirp alone.
 * Units:  r h/M, r ḣ or r M ψ₄, as declared; Ω in rad/M.
 * Error:  leading order with the usual 5 % taken off.
 * Fails:  null where no candidate is within a fifth.
 * Source: domain reference, 4.2 and conventions C09, C19, C20.
 */
export function guessAmplitude(name: string, { omega, amplitude, atM }: InspiralReading, declared: RadiationVariable, eta: number, rough: boolean): Guess | null {
  const measured = amplitude / (8 * Math.sqrt(Math.PI / 5) * eta * omega ** (2 / 3));
  if (!(measured > 0)) return null;
  const off = ({ expected, guess }: Candidate): number => (guess.value === 'at-a-distance' && measured < TINY ? 0 : Math.abs(Math.log(measured / expected)));
  const best = candidates(declared, omega, rough).reduce((p, q) => (off(q) < off(p) ? q : p));
  if (off(best) > (rough ? ROUGH : FITS)) return null;
  return {
    ...best.guess,
    declared,
    confidence: rough ? 0.75 : off(best) < CLEAR ? best.most : 0.6,
    reason: `At MΩ = ${short(omega)} (t = ${short(atM, 6)} M) the (2,2) amplitude of ${name} is ${scientific(measured, 3)} of leading order; ${declared} is expected at ${scientific(USUAL * (2 * omega) ** order[declared], 3)}, ${best.guess.agrees ? 'and is so' : best.guess.value === 'at-a-distance' ? 'a strain with M/D in it lies below 10⁻¹²' : `${best.guess.proposed} at ${scientific(best.expected, 3)}`}.`,
  };
}
