import type { BinaryFacts } from '../contract/waveform';
import { short } from '../findings/spelt';
import type { Guess } from './guess';

/** What the head of the files says of the bodies, as it numbers them; null where it says nothing. */
export interface StatedBodies {
  readonly mass1: number | null;
  readonly mass2: number | null;
  readonly ratio: number | null;
  readonly spin1: number | null;
  readonly spin2: number | null;
  readonly effectiveSpin: number | null;
}

/** Printed mass ratios and spins are rounded. */
const RATIO_APART = 5e-3;
const SPIN_APART = 2e-3;

const neat = (x: number): number => Number(x.toPrecision(6));
const near = (a: number, b: number, by: number): boolean => Math.abs(a - b) <= by;
const nearRatio = (a: number, b: number): boolean => Math.abs(Math.log(a / b)) <= RATIO_APART;
const spell = (x: number): string => short(x, 5).replace('-', '−');

/** Heavier over lighter, and by which words of the head. */
function statedRatio({ mass1, mass2, ratio }: StatedBodies): { readonly q: number; readonly by: string } | null {
  if (mass1 !== null && mass2 !== null && mass1 > 0 && mass2 > 0) return { q: Math.max(mass1, mass2) / Math.min(mass1, mass2), by: `The head gives masses ${spell(mass1)} and ${spell(mass2)}` };
  return ratio !== null && ratio > 0 ? { q: Math.max(ratio, 1 / ratio), by: `The head gives a mass ratio of ${spell(ratio)}` } : null;
}

function ratioGuess(name: string, { massRatio }: BinaryFacts, bodies: StatedBodies): Guess | null {
  const guess = { about: 'mass-ratio', convention: 'C41' } as const;
  const head = statedRatio(bodies);
  if (massRatio === undefined || !(massRatio > 0))
    return head === null ? null : { ...guess, declared: 'nothing', proposed: spell(head.q), value: neat(head.q), agrees: false, confidence: 0.9, reason: `${head.by}; heavier over lighter that is ${spell(head.q)}.` };
  const declared = spell(massRatio);
  if (massRatio < 1)
    return { ...guess, declared, proposed: `${spell(1 / massRatio)}, with the spins exchanged`, value: neat(1 / massRatio), agrees: false, confidence: 0.8, reason: `massRatio of ${name} is ${declared}; heavier over lighter is expected, q ≥ 1, and chi1z on the heavier body.` };
  if (head === null) return null;
  const agrees = nearRatio(head.q, massRatio);
  return { ...guess, declared, proposed: spell(head.q), value: agrees ? massRatio : neat(head.q), agrees, confidence: 0.9, reason: `${head.by}, ${spell(head.q)} heavier over lighter; declared is ${declared}.` };
}

const effective = (q: number, chi1: number, chi2: number): number => (q * chi1 + chi2) / (1 + q);

/** Whether chi1z stands on the heavier body: +1 that it does, −1 that the two are exchanged, 0 that nothing tells. */
function spinsStand(q: number, chi1z: number, chi2z: number, { mass1, mass2, ratio, spin1, spin2, effectiveSpin }: StatedBodies): { readonly stand: 1 | -1; readonly confidence: number; readonly by: string } | null {
  const heavierFirst = mass1 !== null && mass2 !== null ? mass1 >= mass2 : ratio === null ? null : ratio >= 1;
  if (heavierFirst !== null && spin1 !== null && spin2 !== null) {
    const [heavier, lighter] = heavierFirst ? [spin1, spin2] : [spin2, spin1];
    const by = `The head gives the heavier body the spin ${spell(heavier)} and the lighter one ${spell(lighter)}`;
    if (near(chi1z, heavier, SPIN_APART) && near(chi2z, lighter, SPIN_APART)) return { stand: 1, confidence: 0.9, by };
    if (near(chi1z, lighter, SPIN_APART) && near(chi2z, heavier, SPIN_APART)) return { stand: -1, confidence: 0.9, by };
    return null;
  }
  if (effectiveSpin !== null) {
    const [as, turned] = [effective(q, chi1z, chi2z), effective(q, chi2z, chi1z)];
    const by = `The head gives an effective spin of ${spell(effectiveSpin)}; the declared spins give ${spell(as)}, exchanged ${spell(turned)}`;
    if (near(as, turned, 2 * SPIN_APART)) return null;
    if (near(as, effectiveSpin, SPIN_APART)) return { stand: 1, confidence: 0.85, by };
    if (near(turned, effectiveSpin, SPIN_APART)) return { stand: -1, confidence: 0.85, by };
    return null;
  }
  if (heavierFirst !== false) return null;
  return { stand: -1, confidence: 0.5, by: `The head numbers the lighter body first${mass1 !== null && mass2 !== null ? ` (${spell(mass1)} and ${spell(mass2)})` : ''}, and the spins may have kept its order` };
}

function labelGuess({ massRatio: q, chi1z, chi2z }: BinaryFacts, bodies: StatedBodies): Guess | null {
  if (q === undefined || !(q > 1) || chi1z === undefined || chi2z === undefined || near(chi1z, chi2z, SPIN_APART)) return null;
  const found = spinsStand(q, chi1z, chi2z, bodies);
  if (found === null) return null;
  const agrees = found.stand === 1;
  return {
    about: 'labels', convention: 'C41',
    declared: `chi1z ${spell(chi1z)}, chi2z ${spell(chi2z)}`,
    proposed: agrees ? 'as declared' : `chi1z ${spell(chi2z)}, chi2z ${spell(chi1z)}`,
    value: agrees ? 'as-declared' : 'exchanged',
    agrees, confidence: found.confidence,
    reason: `${found.by}; chi1z is expected on the heavier body.`,
  };
}

/** A spin above one, and what would bring it below: the square of the other body's mass under it. */
function spinGuesses(name: string, { massRatio: q = 1, chi1z, chi2z }: BinaryFacts): Guess[] {
  const spins = [['chi1z', chi1z, 1 / q ** 2], ['chi2z', chi2z, q ** 2]] as const;
  return spins.flatMap(([label, chi, factor]): Guess[] => {
    if (chi === undefined || Math.abs(chi) <= 1) return [];
    const turned = chi * factor;
    const fits = Math.abs(turned) <= 1;
    return [{
      about: 'spin', convention: 'C42', declared: `${label} ${spell(chi)}`,
      proposed: fits ? `${label} ${spell(turned)}` : 'another definition of the spin',
      value: fits ? neat(turned) : null, agrees: false,
      confidence: fits ? 0.5 : 0.9,
      reason: `${label} of ${name} is ${spell(chi)}, and no hole spins faster than 1${fits ? `; divided by the square of the other body’s mass, S/m² of ${spell(turned)} would look so` : ''}.`,
    }];
  });
}

/**
 * Mass ratio, order of the bodies and size of the spins, recomputed from what the head of the files says.
 * Shape:  facts of the sheet and numbers of the head.
 * Units:  masses in any one unit; spins without.
 * Error:  half a per cent in the ratio, 0.002 in a spin: heads are rounded.
 * Fails:  never; where the head is silent and the declared numbers are possible there is no guess.
 * Source: domain reference, 4.2 and conventions C41, C42.
 */
export function guessBinary(name: string, binary: BinaryFacts, bodies: StatedBodies): readonly Guess[] {
  return [ratioGuess(name, binary, bodies), labelGuess(binary, bodies), ...spinGuesses(name, binary)].filter((guess) => guess !== null);
}
