/**
 * How a verdict looks: always a word, a shape and a colour together, so that none of the three
 * is needed to understand the others.
 */
import type { VerdictWord } from '@/lib/pipeline/result';

/** What the table may show in a verdict's place while a run has not ended. */
export type VerdictState = VerdictWord | 'waiting';
export type VerdictTone = 'agrees' | 'differs' | 'unsettled' | 'notcomp' | 'waiting';

interface VerdictLook {
  readonly word: string;
  readonly tone: VerdictTone;
  readonly meaning: string;
}

export const verdictLooks: Readonly<Record<VerdictState, VerdictLook>> = {
  agrees: { word: 'Agrees', tone: 'agrees', meaning: '|apart| + U ≤ T: the two values agree within the tolerance.' },
  differs: { word: 'Differs', tone: 'differs', meaning: '|apart| − U > T: they part by more than the tolerance, whatever the uncertainty.' },
  unsettled: { word: 'Unsettled', tone: 'unsettled', meaning: 'The computation cannot decide at this tolerance.' },
  'not-computable': { word: 'Not computable', tone: 'notcomp', meaning: 'A stopping finding stands; the finding says which.' },
  'routes-disagree': { word: 'Routes disagree', tone: 'notcomp', meaning: 'Routes A and B part; there is no verdict, and the administrator is told.' },
  waiting: { word: 'Waiting', tone: 'waiting', meaning: 'A run is queued or under way.' },
};

export const verdictOrder: readonly VerdictState[] = ['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree', 'waiting'];

const verbs: Record<VerdictState, readonly [one: string, many: string]> = {
  agrees: ['agrees', 'agree'],
  differs: ['differs', 'differ'],
  unsettled: ['is unsettled', 'are unsettled'],
  'not-computable': ['is not computable', 'are not computable'],
  'routes-disagree': ['has routes that disagree', 'have routes that disagree'],
  waiting: ['waits', 'wait'],
};

/** `5 agree, 1 differs and 1 is unsettled`. */
export function countVerdicts(verdicts: readonly VerdictState[]): string {
  const parts = verdictOrder.flatMap((state) => {
    const n = verdicts.filter((v) => v === state).length;
    return n === 0 ? [] : [`${n} ${verbs[state][n === 1 ? 0 : 1]}`];
  });
  return parts.length < 2 ? (parts[0] ?? 'none yet') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
}

/** The submission as a whole: all agree, some agree, none agrees, unsettled. */
export function overallWord(verdicts: readonly VerdictState[]): string {
  if (verdicts.length === 0) return 'No claims yet';
  if (verdicts.includes('waiting')) return 'A run is under way';
  const agreeing = verdicts.filter((v) => v === 'agrees').length;
  if (agreeing === verdicts.length) return verdicts.length === 1 ? 'The claim agrees' : 'All claims agree';
  if (agreeing > 0) return 'Some claims agree';
  return verdicts.every((v) => v === 'unsettled') ? 'Unsettled' : 'No claim agrees';
}
