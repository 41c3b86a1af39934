import type { Candidate, SearchOfClaim } from '../candidate';
import { noneSentence } from './none-sentence';

/** What the search of a claim came to: none is an answer, and how far it got belongs to it. */
export function searchSentence(search: Omit<SearchOfClaim, 'sentence' | 'extraNumber' | 'readings'>, candidates: readonly Candidate[]): string {
  const ended = search.stoppedBecause === null ? '' : ` The search ended early: ${search.stoppedBecause}.`;
  if (candidates.length === 0) return `${noneSentence(search)}${ended}`;
  const none = candidates.some(({ standing }) => standing === 'candidate') ? '' : 'None: nothing that was tried stands out from chance. ';
  const without = search.failed > 0 ? `, ${search.failed} of them without a number` : '';
  const left = search.left > 0 ? ` ${search.left} more apply and were not tried.` : '';
  return `${none}${search.tried} readings tried${without}.${left}${ended}`;
}
