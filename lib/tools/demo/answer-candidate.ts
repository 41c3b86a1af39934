import type { SignedInActor } from '@/lib/policy/actor';
import type { CandidateAnswer } from '@/db/schema/candidate-answers';
import { answerCandidate } from '@/lib/services/candidates/answer-candidate';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { must } from './demo-room';

interface Word {
  readonly claim: string;
  /** The reading that is meant, by its convention. */
  readonly convention: string;
  readonly answer: CandidateAnswer;
  readonly note: string;
}

/** The authors' word on a candidate of the official run. A search that was ended by the clock of a slow machine may have none to answer. */
export async function sayOfCandidate(author: SignedInActor, id: string, { claim, convention, answer, note }: Word): Promise<void> {
  const { run } = must(await getReview(author, id));
  if (run?.state !== 'measured') return;
  const candidate = run.result.claims.find((one) => one.id === claim)?.candidates.find(({ readings }) => readings.some(({ conventions }) => conventions.includes(convention as never)));
  if (!candidate) return;
  const reading = candidate.readings.findIndex(({ conventions }) => conventions.includes(convention as never));
  must(await answerCandidate(author, id, { runId: run.id, claim, candidate: candidate.id, reading: answer === 'confirmed' ? reading : null, answer, note }));
}
