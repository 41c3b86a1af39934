import type { DecisionView as DecisionOnScreen } from '@/app/_ui/claim/record-view';
import { DECISION_WORDS } from '@/lib/reviews/decision';
import type { DecisionView } from '@/lib/services/reviews/decision-view';
import { formatDay } from './dates';

function titleOf({ kind, level, signing }: DecisionView): string {
  if (kind !== 'enter') return DECISION_WORDS[kind];
  return `Entered at level ${level}${signing.state === 'signed' ? '' : ', not signed yet'}`;
}

/** What was last decided of one revision, of the decisions that the reader may see; null where nothing was. */
export function decisionOf(decisions: readonly DecisionView[], revision: number): DecisionOnScreen | null {
  const [last] = decisions.filter((one) => one.revision === revision).toSorted((a, b) => b.at.localeCompare(a.at));
  if (!last) return null;
  return { title: titleOf(last), by: last.by, on: formatDay(last.at), level: last.level, coveredClaims: last.covers, remarks: last.remarks, note: last.publicSentence || null };
}
