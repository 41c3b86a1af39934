import type { Waveform } from '../contract/waveform';
import { mirrorPairs, RESIDUAL, type MirrorPair } from '../findings/mode-symmetry';
import { modeName, percent } from '../findings/spelt';
import type { Guess } from './guess';

const names = (pairs: readonly MirrorPair[]): string => pairs.map(({ minus }) => modeName(minus)).join(', ');

/**
 * What modes of m < 0 are, beside the mirror (−1)^ℓ H* of their partners: a sign that is missing (C24), or a label
 * that does not mean −m (C23).
 * Shape:  modes against time of which some pair (ℓ, ±m) is loud.
 * Units:  none; distances are relative.
 * Error:  precessing systems break the rule by themselves, and then nothing is guessed.
 * Fails:  null without a pair, or where no relation fits every pair.
 * Source: domain reference, conventions C23 and C24.
 */
export function guessMirror({ name, domain, content, negativeM }: Waveform): Guess | null {
  if (domain !== 'time' || content.kind !== 'modes' || negativeM === 'mirror' || negativeM === 'none') return null;
  const pairs = mirrorPairs(content.modes);
  const [signOnly, plain] = [pairs.filter((pair) => pair.signOnly), pairs.filter((pair) => pair.plain)];
  const broken = pairs.filter(({ residual }) => residual > RESIDUAL);
  const worst = broken.reduce((most, { residual }) => Math.max(most, residual), 0);
  const guess = { about: 'negative-m', declared: negativeM ?? 'given' } as const;
  if (pairs.length === 0) return null;
  if (broken.length === 0)
    return { ...guess, convention: 'C24', proposed: 'given', value: 'given', agrees: true, confidence: 0.95, reason: `${names(pairs)} of ${name} ${pairs.length === 1 ? 'is the mirror of its partner' : 'are the mirrors of their partners'}, (−1)^ℓ H*, to within 1 %.` };
  if (plain.length === broken.length)
    return { ...guess, convention: 'C23', proposed: 'copies of m > 0 under the label −m', value: 'mirror', agrees: false, confidence: 0.9, reason: `${names(plain)} of ${name} ${plain.length === 1 ? 'is its partner itself and turns' : 'are their partners themselves and turn'} the same way; (−1)^ℓ H* is expected, ${percent(worst)} away.` };
  if (signOnly.length === broken.length)
    return { ...guess, convention: 'C24', proposed: 'the mirror without its sign (−1)^ℓ', value: 'mirror', agrees: false, confidence: 0.9, reason: `${names(signOnly)} of ${name} ${signOnly.length === 1 ? 'fits' : 'fit'} −(−1)^ℓ H* of the partner with m > 0; (−1)^ℓ H* is expected, ${percent(worst)} away.` };
  return null;
}
