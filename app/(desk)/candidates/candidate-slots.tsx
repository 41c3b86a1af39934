import Link from 'next/link';
import type { Route } from 'next';
import { askingQuery } from '@/app/(public)/variations/asked-variation';
import type { RecordSlots } from '@/app/_ui/claim/record-view';
import { formatDay } from '@/app/views/dates';
import type { Candidate } from '@/lib/explain/candidate';
import { answerToCandidate, type CandidateAnswerView } from '@/lib/services/candidates/candidate-answers';
import type { LodgedView } from '@/lib/services/submissions/submission-view';
import { AnswerCandidate } from './answer-candidate';
import { AskNumber } from './ask-number';
import { TakeOver } from './take-over';

const answerWords = { confirmed: 'confirmed', 'not-so': 'not so', 'cannot-tell': 'cannot tell' } as const;

export interface CandidateFacts {
  readonly submissionId: string;
  readonly runId: string | null;
  readonly answers: readonly CandidateAnswerView[];
  readonly mayAnswer: boolean;
  /** The revision is being written, so that a confirmed reading can be declared in it. */
  readonly mayTakeOver: boolean;
  readonly mayAsk: boolean;
  /** What has been said in threads of a claim: a number is asked for once. */
  readonly said?: (claimId: string) => readonly string[];
  /** Where a variation that reads it so can be tried; null where none can. */
  readonly varyAt: string | null;
}

/** A variation is of the latest lodged revision: from an earlier one it would try something else. */
export const isLatest = ({ revision, revisions }: Pick<LodgedView, 'revision' | 'revisions'>): boolean => revisions.every(({ number }) => number <= revision.number);

function Answer({ answer }: { readonly answer: CandidateAnswerView }) {
  return (
    <div className="text-ui">
      <p><b>The authors’ answer, {formatDay(answer.answeredAt)}: {answerWords[answer.answer]}.</b>{answer.answer === 'confirmed' && ` It was so: ${answer.clause}.`}</p>
      {answer.note !== '' && <p className="max-w-[66ch]">{answer.note}</p>}
    </div>
  );
}

/** One changed setting as a setting; a pair, or what no sheet can say, as readings by their names. */
function tryHref(varyAt: string, claimId: string, { id, settings, changes }: Candidate): Route {
  const says = changes === 1 && Object.keys(settings).length > 0;
  const query = askingQuery(claimId, says ? { settings } : { readings: id.split(' + ') });
  return `${varyAt}?${query.toString()}&open=${encodeURIComponent(claimId)}#${encodeURIComponent(claimId)}` as Route;
}

/** What stands under a candidate and under the number that tells candidates apart, for whoever looks. */
export function candidateSlots({ submissionId, runId, answers, mayAnswer, mayTakeOver, mayAsk, said = () => [], varyAt }: CandidateFacts): Pick<RecordSlots, 'candidate' | 'extraNumber'> {
  return {
    candidate: (claimId, candidate) => {
      const answer = answerToCandidate(answers, runId, claimId, candidate.id);
      return (
        <>
          {answer && <Answer answer={answer} />}
          {!answer && !mayAnswer && <p className="text-ui text-ink-2">The authors have not answered.</p>}
          {answer?.answer === 'confirmed' && mayTakeOver && runId !== null && <TakeOver submissionId={submissionId} runId={runId} claimId={claimId} candidateId={candidate.id} />}
          {mayAnswer && runId !== null && <AnswerCandidate key={answer?.answer ?? ''} submissionId={submissionId} runId={runId} claimId={claimId} candidate={candidate} again={answer !== null} />}
          {varyAt !== null && <p><Link href={tryHref(varyAt, claimId, candidate)} className="inline-flex min-h-8 items-center text-ui">Try it as a variation</Link></p>}
        </>
      );
    },
    ...(mayAsk ? { extraNumber: (claimId, extra) => <AskNumber submissionId={submissionId} claimId={claimId} extra={extra} asked={said(claimId).includes(extra.sentence)} /> } : {}),
  };
}
