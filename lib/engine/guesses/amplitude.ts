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
  { factor: 2, says: 'twice the declared' },
  { factor: 0.5, says: 'half the declared' },
  { factor: FACE_ON, says: 'the face-on angular factor 0.631 already in it' },
] as const;

interface Candidate {
  readonly expected: number;
  readonly guess: Pick<Guess, 'about' | 'convention' | 'proposed' | 'agrees'>;
  readonly most: number;
}

function candidates(declared: RadiationVariable, omega: number): Candidate[] {
  const of = (variable: RadiationVariable): number => USUAL * (2 * omega) ** order[variable];
  return [
    ...variables.map((variable) => ({ expected: of(variable), most: 0.95, guess: { about: 'variable', convention: 'C19', proposed: variable, agrees: variable === declared } as const })),
    // Orbits and spins may move an amplitude by a tenth, and 0.5 and 0.631 lie a quarter apart.
    ...factors.map(({ factor, says }) => ({
      expected: of(declared) * factor,
      most: 0.85,
      guess: { about: 'normalisation', convention: factor === FACE_ON ? 'C09' : declared === 'psi4' ? 'C20' : 'C27', proposed: says, agrees: false } as const,
    })),
  ];
}

/**
 * Variable and normalisation, by the amplitude of (2,2) over R = 8√(π/5) η x.
 * Shape:  one reading of the inspiral.
 * Units:  r h/M, r ḣ or r M ψ₄, as declared; Ω in rad/M.
 * Error:  leading order with the usual 5 % taken off.
 * Fails:  null where no candidate is within a fifth.
 * Source: domain reference, 4.2 and conventions C09, C19, C20.
 */
export function guessAmplitude(name: string, { omega, amplitude, atM }: InspiralReading, declared: RadiationVariable, eta: number): Guess | null {
  const measured = amplitude / (8 * Math.sqrt(Math.PI / 5) * eta * omega ** (2 / 3));
  if (!(measured > 0)) return null;
  const off = ({ expected }: Candidate): number => Math.abs(Math.log(measured / expected));
  const best = candidates(declared, omega).reduce((p, q) => (off(q) < off(p) ? q : p));
  if (off(best) > FITS) return null;
  return {
    ...best.guess,
    declared,
    confidence: off(best) < CLEAR ? best.most : 0.6,
    reason: `At MΩ = ${short(omega)} (t = ${short(atM, 6)} M) the (2,2) amplitude of ${name} is ${scientific(measured, 3)} of leading order; ${declared} is expected at ${scientific(USUAL * (2 * omega) ** order[declared], 3)}, ${best.guess.agrees ? 'as declared' : `${best.guess.proposed} at ${scientific(best.expected, 3)}`}.`,
  };
}
