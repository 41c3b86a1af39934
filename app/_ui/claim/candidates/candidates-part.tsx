import Link from 'next/link';
import type { ReactNode } from 'react';
import type { ResultClaim } from '@/lib/pipeline/result';
import type { RecordSlots } from '../record-view';
import { CandidateCard } from './candidate-card';
import { CoincidenceTable } from './coincidence-table';
import { TriedTable } from './tried-table';

interface CandidatesPartProps {
  readonly claim: ResultClaim;
  readonly slots: Pick<RecordSlots, 'candidate' | 'extraNumber'>;
}

export const wasSearched = ({ search }: ResultClaim): boolean => search !== undefined;

/** Which other reading of a setting would close the gap: at most three, then what may be coincidence, then one number to ask for. */
export function CandidatesPart({ claim, slots }: CandidatesPartProps): ReactNode {
  const { search } = claim;
  if (search === undefined) return null;
  const shown = claim.candidates.filter(({ standing }) => standing === 'candidate');
  return (
    <div className="grid grid-cols-1 gap-3">
      {shown.map((candidate, i) => <CandidateCard key={candidate.id} claim={claim} candidate={candidate} place={`Candidate ${i + 1} of ${shown.length}`} below={slots.candidate?.(claim.id, candidate)} />)}
      <p className="text-ui">{search.sentence}</p>
      <CoincidenceTable claim={claim} />
      <TriedTable claim={claim} />
      {search.extraNumber && (
        <div className="grid gap-2 text-ui">
          <p className="max-w-[66ch]">{search.extraNumber.sentence}</p>
          {slots.extraNumber?.(claim.id, search.extraNumber)}
        </div>
      )}
      <p className="text-small"><Link href="/methods/candidates" className="inline-flex min-h-8 items-center">How the search works, and how often it errs</Link></p>
    </div>
  );
}
