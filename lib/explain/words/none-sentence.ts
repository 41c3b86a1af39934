import type { SearchOfClaim } from '../candidate';
import { capital, countWord } from './numbers';

/** What to say where nothing fits: none is an answer, and how far the search got belongs to it. */
export function noneSentence({ tried, failed, left }: Pick<SearchOfClaim, 'tried' | 'failed' | 'left'>): string {
  if (tried === 0 && left === 0) return 'No other reading applies to this claim.';
  const untried = left === 0 ? '' : `${capital(countWord(left))} more ${left === 1 ? 'applies and was' : 'apply and were'} not tried.`;
  const first = tried === 0 ? 'No reading was tried.' : tried === 1 ? 'The one reading tried does not give the claimed number.' : `None of the ${tried} readings tried gives the claimed number.`;
  const without = failed === 0 ? '' : failed === tried ? 'No number came of it.' : `${capital(countWord(failed))} of them gave no number at all.`;
  return [first, without, untried].filter((part) => part !== '').join(' ');
}
