import { RECORD_STANDINGS, RECORD_STANDING_WORDS } from '@/lib/badges/standing';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';

interface Choice {
  readonly value: string;
  readonly label: string;
}

export const verdictChoices: readonly Choice[] = [
  { value: 'agrees', label: 'agrees' },
  { value: 'differs', label: 'differs' },
  { value: 'unsettled', label: 'is unsettled' },
  { value: 'not-computable', label: 'is not computable' },
  { value: 'routes-disagree', label: 'has routes that disagree' },
];

export const standingChoices: readonly Choice[] = RECORD_STANDINGS.map((value) => ({ value, label: RECORD_STANDING_WORDS[value] }));

export const orderChoices: readonly Choice[] = [
  { value: 'newest', label: 'newest entry first' },
  { value: 'oldest', label: 'oldest entry first' },
  { value: 'title', label: 'title' },
  { value: 'relevance', label: 'nearest to the words' },
];

const labelIn = (choices: readonly Choice[], value: string): string => choices.find((choice) => choice.value === value)?.label ?? value;
export const verdictWord = (verdict: string): string => labelIn(verdictChoices, verdict);
export const standingWord = (standing: string): string => labelIn(standingChoices, standing);
export const orderWord = (order: string): string => labelIn(orderChoices, order);

export function noiseWord(id: string): string {
  if (id === 'attached') return 'Attached by the authors';
  if (id === 'none') return 'None needed';
  const curve = builtInCurves.find((known) => known.id === id);
  return curve ? `${curve.id}, ${curve.title.charAt(0).toLowerCase()}${curve.title.slice(1)}` : id;
}
